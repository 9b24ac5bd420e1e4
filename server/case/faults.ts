/** What is wrong with one field of a case document. */
export interface Fault {
  /** RFC 6901 JSON pointer of the field */
  readonly pointer: string;
  /** what came, what was expected, what would do */
  readonly message: string;
}

/**
 * RFC 6901 JSON pointer of a path.
 *
 * @see RFC 6901, section 3: `~` and `/` inside a key are written `~0` and `~1`
 */
export function pointerOf(path: readonly PropertyKey[]): string {
  return path.map((key) => `/${String(key).replaceAll("~", "~0").replaceAll("/", "~1")}`).join("");
}

/** The keys of a JSON pointer; the inverse of `pointerOf`. */
export function pathOf(pointer: string): string[] {
  return pointer
    .split("/")
    .slice(1)
    .map((key) => key.replaceAll("~1", "/").replaceAll("~0", "~"));
}

/** A value as a fault names it: short, and never the whole of a long text. */
export function cameAs(value: unknown): string {
  if (value === undefined) return "is missing";
  if (value === null) return "came as null";
  if (Array.isArray(value)) return "came as a list";
  if (typeof value === "object") return "came as a group of fields";
  if (typeof value === "string") return `came as ${shortened(value)}`;
  return `came as ${typeof value === "number" ? "the number " : ""}${String(value)}`;
}

/** Text in quotation marks, cut where it is long, without characters that a terminal would act on. */
export function shortened(text: string): string {
  const safe = Array.from(text.slice(0, 80))
    .slice(0, 60)
    .join("")
    .replace(/[\p{Cc}\p{Cf}\p{Surrogate}]/gu, "\ufffd");
  return safe.length < text.length ? `"${safe}…"` : `"${safe}"`;
}

/** The known key that was probably meant, if one is near. */
export function nearestKey(key: string, known: readonly string[]): string | null {
  if (key.length > 60) return null;
  let best: string | null = null;
  let least = Math.max(2, Math.floor(key.length / 3)) + 1;
  for (const candidate of known) {
    const distance = editDistance(key.toLowerCase(), candidate.toLowerCase());
    if (distance < least) {
      best = candidate;
      least = distance;
    }
  }
  return best;
}

/** Levenshtein distance of two short texts. */
function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      const swap = row[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(swap, row[j] + 1, next[j - 1] + 1));
    }
    row = next;
  }
  return row[b.length];
}
