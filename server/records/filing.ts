/** Where a sheet stands in the register. It is printed on the sheet, so that paper copies hold the chain of entries. */
export interface Filing {
  /** number of its entry in the register, from 1 */
  readonly number: number;
  /** counts the sheets of one batch record and step, from 1 */
  readonly revision: number;
  /** number of the sheet that this one takes the place of */
  readonly supersedes: number | null;
  /** ISO 8601, UTC */
  readonly filedAt: string;
  /** SHA-256 of the entry before, 64 hexadecimal digits; zeros before the first one */
  readonly previousDigest: string;
}

/**
 * The filing that a record holds.
 *
 * @returns null where it is none
 */
export function readFiling(value: unknown): Filing | null {
  if (typeof value !== "object" || value === null) return null;
  const { number, revision, supersedes, filedAt, previousDigest, ...more } = { ...value } as Record<
    string,
    unknown
  >;
  const sound =
    isCount(number) &&
    isCount(revision) &&
    (supersedes === null || isCount(supersedes)) &&
    isMatch(filedAt, /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/) &&
    isMatch(previousDigest, /^[0-9a-f]{64}$/) &&
    Object.keys(more).length === 0;
  return sound ? { number, revision, supersedes, filedAt, previousDigest } : null;
}

function isCount(value: unknown): value is number {
  return typeof value === "number" && Number.isSafeInteger(value) && value > 0;
}

function isMatch(value: unknown, pattern: RegExp): value is string {
  return typeof value === "string" && pattern.test(value);
}

/** The place in words: "No. 12, revision 2". */
export function filingText({ number, revision }: Pick<Filing, "number" | "revision">): string {
  return `No. ${number}, revision ${revision}`;
}
