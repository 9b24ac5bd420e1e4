/** Where two JSON values differ. */
export interface Difference {
  /** JSON pointer */
  readonly pointer: string;
  /** |a - b| over the larger of the two, where both are numbers; else null */
  readonly relative: number | null;
}

/**
 * All places where two JSON values differ, in the order of the first one's keys.
 *
 * @param most stops after so many
 */
export function differencesOf(one: unknown, other: unknown, most = 1000): Difference[] {
  const found: Difference[] = [];
  compare(one, other, "", found, most);
  return found;
}

function compare(one: unknown, other: unknown, pointer: string, found: Difference[], most: number): void {
  if (found.length >= most || Object.is(one, other)) return;
  if (typeof one === "number" && typeof other === "number") {
    if (one === other) return;
    const size = Math.max(Math.abs(one), Math.abs(other));
    found.push({ pointer, relative: Math.abs(one - other) / size });
    return;
  }
  if (!isBranch(one) || !isBranch(other) || Array.isArray(one) !== Array.isArray(other)) {
    found.push({ pointer, relative: null });
    return;
  }
  const keys = new Set([...Object.keys(one), ...Object.keys(other)]);
  for (const key of keys) {
    const below = `${pointer}/${key.replaceAll("~", "~0").replaceAll("/", "~1")}`;
    compare(one[key], other[key], below, found, most);
  }
}

function isBranch(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === "object" && value !== null;
}
