/** One figure that the program computes, held against one that stands somewhere else. */
export interface Check {
  /** what is computed, so that a second person finds it in the source */
  readonly what: string;
  /** as printed there, in plain digits such as "-17.208822" */
  readonly printed: string;
  /** of both figures; "" for a plain number */
  readonly unit: string;
  /** how far apart they may lie; without it they agree to the digits printed */
  readonly within?: Allowance;
  compute(): number;
}

export interface Allowance {
  /** in `unit` */
  readonly apart: number;
  readonly because: string;
}

/** Checks against one source. */
export interface CheckGroup {
  readonly title: string;
  /** the publication, or that an independent implementation gave the figures */
  readonly source: string;
  readonly kind: "published" | "independent";
  /** remembered rather than read in the source */
  readonly fromMemory: boolean;
  readonly checks: readonly Check[];
}

/** A check that has run. */
export interface Checked {
  readonly what: string;
  readonly printed: string;
  readonly unit: string;
  readonly computed: number;
  /** computed less printed */
  readonly difference: number;
  readonly allowed: number;
  readonly because: string;
  readonly agrees: boolean;
}

/** Rounding of the last bits must not decide at the very edge of an allowance. */
const edge = 1 + 1e-9;

/** Runs one check and judges it; what is not a number never agrees. */
export function judge(check: Check): Checked {
  const { what, printed, unit } = check;
  const computed = check.compute();
  const difference = computed - Number(printed);
  const { apart: allowed, because } = check.within ?? {
    apart: halfLastDigit(printed),
    because: "half a unit of the last digit printed",
  };
  const agrees = Math.abs(difference) <= allowed * edge;
  return { what, printed, unit, computed, difference, allowed, because, agrees };
}

/** Half a unit of the last digit: what rounding to the digits printed may take away. */
function halfLastDigit(printed: string): number {
  const [mantissa = "", exponent = "0"] = printed.toLowerCase().split("e");
  const decimals = mantissa.split(".")[1]?.length ?? 0;
  return 0.5 * 10 ** (Number(exponent) - decimals);
}
