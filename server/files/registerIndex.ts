import {
  digestOfFile,
  noEntry,
  type ReadEntry,
  type RegisterEntry,
  type ReviewEntry,
  readEntry,
  type SheetEntry,
  type VoidEntry,
} from "./registerEntry.js";

/** A sheet with what later entries say of it. */
export interface FiledSheet {
  readonly sheet: SheetEntry;
  /** number of the sheet that took its place; null: it stands */
  readonly supersededBy: number | null;
  /** in the order in which they were entered */
  readonly reviews: readonly ReviewEntry[];
}

/** The register in memory, filled entry by entry. Nothing in it is ever changed or removed. */
export interface RegisterIndex {
  /** Takes in the text of an entry's file. Entries come in the order of their numbers. */
  add(number: number, text: string): void;
  /** highest number taken in; 0: none */
  last(): number;
  /** digest of the entry of that number; of the one before the first where there is none */
  lastDigest(): string;
  /** newest first */
  sheets(): readonly FiledSheet[];
  sheet(number: number): FiledSheet | null;
  /** The sheet that stands for a batch record and step. */
  standing(record: string, step: string | null): SheetEntry | null;
  /** All sheets of the batch record and step of one, the first revision first. */
  revisions(of: SheetEntry): readonly SheetEntry[];
  /** The sheet whose PDF, or whose record, has this digest. */
  withDigest(digest: string): SheetEntry | null;
  voids(): readonly VoidEntry[];
  /** Numbers without an entry, and those whose entry cannot be read. */
  gaps(): { readonly missing: readonly number[]; readonly unreadable: readonly number[] };
  /** What stands in the place of the highest number. */
  lastState(): ReadEntry["state"] | null;
}

export function registerIndex(): RegisterIndex {
  const filed = new Map<number, { sheet: SheetEntry; supersededBy: number | null; reviews: ReviewEntry[] }>();
  const lines = new Map<string, SheetEntry[]>();
  const digests = new Map<string, SheetEntry>();
  const voids: VoidEntry[] = [];
  const missing: number[] = [];
  const unreadable: number[] = [];
  let last = 0;
  let lastDigest = noEntry;
  let lastState: ReadEntry["state"] | null = null;
  let newestFirst: readonly FiledSheet[] | null = null;

  function take(entry: RegisterEntry): void {
    if (entry.kind === "void") voids.push(entry);
    else if (entry.kind === "review") filed.get(entry.sheet)?.reviews.push(entry);
    else {
      filed.set(entry.number, { sheet: entry, supersededBy: null, reviews: [] });
      const before = entry.supersedes === null ? undefined : filed.get(entry.supersedes);
      if (before !== undefined) before.supersededBy = entry.number;
      const key = lineKey(entry.record, entry.step);
      lines.set(key, [...(lines.get(key) ?? []), entry]);
      digests.set(entry.digests.pdf, entry);
      digests.set(entry.digests.record, entry);
    }
  }

  return {
    add(number, text) {
      for (let absent = last + 1; absent < number; absent += 1) missing.push(absent);
      const read = readEntry(text);
      last = number;
      lastDigest = digestOfFile(text);
      lastState = read.state;
      newestFirst = null;
      if (read.state === "whole" && read.entry.number === number) take(read.entry);
      else unreadable.push(number);
    },
    last: () => last,
    lastDigest: () => lastDigest,
    lastState: () => lastState,
    sheets() {
      newestFirst ??= [...filed.values()].reverse();
      return newestFirst;
    },
    sheet: (number) => filed.get(number) ?? null,
    standing: (record, step) => lines.get(lineKey(record, step))?.at(-1) ?? null,
    revisions: (of) => lines.get(lineKey(of.record, of.step)) ?? [],
    withDigest: (digest) => digests.get(digest) ?? null,
    voids: () => voids,
    gaps: () => ({ missing, unreadable }),
  };
}

/**
 * Sheets of one batch record and step are revisions of each other. Two spellings that a reader takes
 * for the same name count as the same: a revision that was overlooked is worse than a question too many.
 */
function lineKey(record: string, step: string | null): string {
  return JSON.stringify([folded(record), folded(step ?? "")]);
}

/** Text without what does not matter in a name: case, width and kind of space. */
export function folded(text: string): string {
  return text.normalize("NFKC").toLowerCase().replace(/\s+/gu, " ").trim();
}
