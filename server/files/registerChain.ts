import { inGroups } from "./inGroups.js";
import {
  digestOfFile,
  noEntry,
  places,
  type ReadEntry,
  type RegisterEntry,
  readEntry,
  type SheetEntry,
} from "./registerEntry.js";
import { contradictions } from "./registerFacts.js";
import { entryNumbers } from "./registerStart.js";
import type { Storage } from "./storage.js";

/** Whether the register still hangs together. */
export interface ChainCheck {
  /** number of the last entry that was looked at; 0: there is none */
  readonly upTo: number;
  /** what is wrong, one plain sentence each; none: the chain is whole */
  readonly faults: readonly string[];
}

/** What of a register is looked at. */
export interface ChainScope {
  /** the entry whose standing matters, also against those after it; all entries unless given */
  readonly upTo?: number;
  /** whose files are read too and compared with their digests: one sheet by its number, or all; none unless given */
  readonly sheet?: number | "all";
}

interface Found {
  readonly number: number;
  readonly digest: string;
  readonly read: ReadEntry;
}

/** Files read at once. */
const together = 32;

/**
 * Follows the chain of entries from the first one, each of which carries the digest of the one before.
 */
export async function checkChain(storage: Storage, scope: ChainScope = {}): Promise<ChainCheck> {
  const numbers = await entryNumbers(storage);
  const upTo = Math.min(scope.upTo ?? Number.POSITIVE_INFINITY, numbers.at(-1) ?? 0);
  const found = new Map<number, Found>();
  await inGroups(
    numbers.filter((number) => number <= upTo + 2),
    together,
    async (number) => {
      const content = await storage.readBytes(places.entry(number));
      if (content === null) return;
      const read = readEntry(content.toString("utf8"));
      found.set(number, { number, digest: digestOfFile(content), read });
    },
  );
  const faults = [...missing(found, upTo), ...wrongEntries(found, upTo), ...brokenLinks(found, upTo)];
  const last = found.get(numbers.at(-1) ?? 0);
  if (last !== undefined && last.number <= upTo) faults.push(...(await lastFaults(storage, last)));
  const sheets = [...found.values()].flatMap((each) => {
    const wanted = each.number <= upTo && (scope.sheet === "all" || scope.sheet === each.number);
    return (wanted ? sheetIn(each) : null) ?? [];
  });
  faults.push(...(await inGroups(sheets, together, (sheet) => sheetFaults(storage, sheet))).flat());
  return { upTo, faults };
}

/** Why the two files of a sheet are not what was filed, one sentence each; none: they are. */
async function sheetFaults(storage: Storage, sheet: SheetEntry): Promise<readonly string[]> {
  const files = [
    { name: "PDF", path: places.pdf(sheet), digest: sheet.digests.pdf },
    { name: "record", path: places.record(sheet), digest: sheet.digests.record },
  ];
  const faults: string[] = [];
  for (const { name, path, digest } of files) {
    const content = await storage.readBytes(path);
    if (content === null) faults.push(`The ${name} of sheet ${sheet.number} is missing: it was removed.`);
    else if (digestOfFile(content) !== digest) {
      faults.push(
        `The ${name} of sheet ${sheet.number} was changed: its digest is not the one in entry ${sheet.number}.`,
      );
    }
  }
  return faults;
}

/** Nothing follows from the last entry yet; where it is a sheet's, the sheet itself tells what it must say. */
async function lastFaults(storage: Storage, last: Found): Promise<readonly string[]> {
  const sheet = sheetIn(last);
  const record = sheet === null ? null : await storage.readBytes(places.record(sheet));
  if (sheet === null || record === null) return [];
  const keys = contradictions(sheet, record);
  return keys.length === 0
    ? []
    : [
        `Entry ${last.number}, the last one, was changed: it does not agree with its sheet (${keys.join(", ")}).`,
      ];
}

function missing(found: ReadonlyMap<number, Found>, upTo: number): string[] {
  const faults: string[] = [];
  for (let first = 1; first <= upTo; first += 1) {
    if (found.has(first)) continue;
    let last = first;
    while (last < upTo && !found.has(last + 1)) last += 1;
    faults.push(
      first === last
        ? `Entry ${first} is missing: it was removed.`
        : `Entries ${first} to ${last} are missing: they were removed.`,
    );
    first = last;
  }
  return faults;
}

function wrongEntries(found: ReadonlyMap<number, Found>, upTo: number): string[] {
  return [...found.values()].flatMap(({ number, read }) => {
    if (number > upTo) return [];
    if (read.state !== "whole") {
      return [`Entry ${number} cannot be read: it was changed, or a later version of the program made it.`];
    }
    return read.entry.number === number
      ? []
      : [
          `In the place of entry ${number} stands entry ${read.entry.number}: entries were swapped or renamed.`,
        ];
  });
}

function brokenLinks(found: ReadonlyMap<number, Found>, upTo: number): string[] {
  const faults: string[] = [];
  for (let number = 1; number <= upTo + 1; number += 1) {
    if (followed(found, number) !== false) continue;
    if (number === 1) faults.push("Entry 1 was changed: it names an entry before it, and there is none.");
    // Where the entry after them follows from the later of the two, it vouches for that one.
    else if (followed(found, number + 1) === true) {
      faults.push(`Entry ${number - 1} was changed: its digest is not the one that entry ${number} carries.`);
    } else {
      faults.push(`Entry ${number} does not follow from entry ${number - 1}: one of the two was changed.`);
    }
  }
  return faults;
}

/** Whether an entry carries the digest of the one before; null where one of the two cannot tell. */
function followed(found: ReadonlyMap<number, Found>, number: number): boolean | null {
  const entry = entryIn(found.get(number));
  if (entry === null) return null;
  if (number === 1) return entry.previous === noEntry;
  const before = found.get(number - 1);
  if (before === undefined || entryIn(before) === null) return null;
  return entry.previous === before.digest;
}

/** The entry that belongs in its place; one that cannot be read or stands elsewhere is reported as such. */
function entryIn(found: Found | undefined): RegisterEntry | null {
  if (found?.read.state !== "whole" || found.read.entry.number !== found.number) return null;
  return found.read.entry;
}

function sheetIn(found: Found): SheetEntry | null {
  const entry = entryIn(found);
  return entry?.kind === "sheet" ? entry : null;
}
