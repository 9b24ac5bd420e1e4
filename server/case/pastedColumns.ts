import type { Leaf } from "./leaves.js";
import { plainCharacters } from "./pasted.js";

/** A column that a pasted table may have: a field of its rows. */
export interface Column {
  /** key of the field in a row */
  readonly key: string;
  readonly leaf: Leaf;
  readonly required: boolean;
}

/** A column as it was found: where its cells go, and the unit that its heading gives them. */
export interface FoundColumn {
  readonly column: Column;
  /** the cells are standard errors of the column's field */
  readonly isError: boolean;
  /** "" where the heading gives none */
  readonly unit: string;
}

/** What a heading came to: a column, one that is passed over, or what is wrong with it. */
export type Heading =
  | { readonly kind: "column"; readonly found: FoundColumn }
  | { readonly kind: "unknown" }
  | { readonly kind: "fault"; readonly message: string };

/** How people head the fields of rows. A lower-case k, since K is a unit. */
const names: Readonly<Record<string, RegExp>> = {
  temperature: /^(?:t|temp\.?|temperature|theta|θ|ϑ)(?:[ _]\w+)?$/i,
  rateConstant:
    /^(?:k(?:[_ ]?[A-Za-z0-9']{1,4})?|[Rr]ate(?:[ _-](?:constant|coefficient))?s?(?: k\w{0,4})?)$/,
  relativeError:
    /^(?:rel(?:\.|ative)?[ _-]*(?:std\.?|standard)?[ _-]*(?:err(?:or)?|uncertainty)\.?(?: of k)?|s\(k\) ?\/ ?k)$/i,
  leftOut: /^(?:left[ _-]?out|excluded|omitted|reason)(?: .*)?$/i,
  time: /^(?:t|time|elapsed(?: time)?)$/i,
  releasedFraction: /^(?:released(?: fraction| part)?|fraction(?: released)?|thermal conversion|x)$/i,
};
const standardError =
  /^(?:(?:std\.?|standard)[ _-]*(?:err(?:or)?|dev(?:iation)?)\.?(?: of k)?|s\(k\)|s_?k|(?:σ|sigma)(?:_?k|\(k\))?|±)$/i;
const someError = /^(?:err(?:or)?|uncertainty)\.?(?: of k)?$/i;
/** "10^5 k", "k x 10^5", "1000 k": the numbers below are not k. */
const scaled =
  /^10(?: ?\^ ?[+-]?\d+|0*)(?: ?[*x])? |^10(?: ?\^ ?[+-]?\d+|0*) ?[*x] ?| ?[*x] ?10(?: ?\^ ?[+-]?\d+|0*)$/i;

/** A heading that would do for a column, with a unit that its cells may have. */
export function exampleHeading({ key, leaf }: Column): string {
  if (leaf.kind === "rate") return "k [1/s]";
  const unit = key === "time" ? "min" : leaf.kind === "quantity" ? leaf.dimension.unit : "";
  return unit === "" ? leaf.label : `${leaf.label} [${unit}]`;
}

/** Reads one heading, such as `Temperature [degC]`, `k / s^-1` or `rel. error in %`. */
export function readHeading(text: string, columns: readonly Column[]): Heading {
  const plain = plainCharacters(text);
  for (const { name, unit } of splits(plain)) {
    const bare = name.replace(scaled, "").trim();
    const found = named(bare, unit, columns);
    if (found === null) continue;
    if (bare !== name) {
      return {
        kind: "fault",
        message: `The heading "${text}" multiplies its column: paste the numbers themselves, or put the factor before the unit, as in "k [10^-5 1/s]"`,
      };
    }
    return found;
  }
  return { kind: "unknown" };
}

/** The ways in which a heading may part into a name and a unit, the whole as a name first. */
function splits(plain: string): { name: string; unit: string }[] {
  const parts = [
    [plain, ""],
    bracketed(plain),
    /^(.*?)\s+in\s+(.+)$/i.exec(plain)?.slice(1),
    /^([^/]*?)\s*\/\s*(.+)$/.exec(plain)?.slice(1),
    /^(.*?),\s*(.+)$/.exec(plain)?.slice(1),
  ];
  return parts.flatMap((part) =>
    part === undefined ? [] : [{ name: (part[0] ?? "").trim(), unit: (part[1] ?? "").trim() }],
  );
}

/** `k (L/(mol s))` and `k/(1/s)`: the last bracket with what stands before it. */
function bracketed(plain: string): readonly string[] | undefined {
  const close = plain.at(-1);
  if (close !== ")" && close !== "]") return undefined;
  let depth = 0;
  for (let at = plain.length - 1; at > 0; at -= 1) {
    const character = plain.charAt(at);
    if (character === ")" || character === "]") depth += 1;
    if (character === "(" || character === "[") depth -= 1;
    if (depth === 0) return [plain.slice(0, at).replace(/\s*\/\s*$/, ""), plain.slice(at + 1, -1)];
  }
  return undefined;
}

function named(name: string, unit: string, columns: readonly Column[]): Heading | null {
  const column = columns.find(({ key }) => names[key]?.test(name));
  if (column !== undefined) return { kind: "column", found: { column, isError: false, unit } };
  const measured = columns.find(({ leaf }) => leaf.kind === "rate");
  const relative = columns.find(({ key }) => key === "relativeError");
  if (measured === undefined || relative === undefined) return null;
  if (standardError.test(name)) {
    const found = unit === "%" ? { column: relative, isError: false } : { column: measured, isError: true };
    return { kind: "column", found: { ...found, unit } };
  }
  if (!someError.test(name)) return null;
  if (unit === "") {
    return {
      kind: "fault",
      message: `The heading "${name}" does not say which error: "relative error", or "standard error" with its unit`,
    };
  }
  return named("standard error", unit, columns);
}
