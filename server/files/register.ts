import { digestOf } from "../case/canonical.js";
import type { Filing } from "../records/filing.js";
import { inGroups } from "./inGroups.js";
import { type ChainCheck, type ChainScope, checkChain } from "./registerChain.js";
import {
  digestOfFile,
  entryOf,
  entryText,
  ownFiles,
  places,
  type ReviewEntry,
  type SheetEntry,
  type SheetFacts,
} from "./registerEntry.js";
import { type RegisterIndex, registerIndex } from "./registerIndex.js";
import { entryNumbers, setTornAside } from "./registerStart.js";
import type { Storage } from "./storage.js";

/** A sheet as it is to be filed, for a place in the register that is known only when it is drawn. */
export interface SheetToFile {
  readonly facts: SheetFacts;
  readonly caseDigest: string;
  readonly findings: unknown;
  /** number of the sheet that this one is to supersede; null where there is said to be none */
  readonly supersedes: number | null;
  /** Draws the sheet for a place; called again where another process took the number meanwhile. */
  readonly draw: (place: Filing) => Promise<DrawnSheet>;
}

export interface DrawnSheet {
  readonly pdf: Uint8Array;
  /** the record that travels in the PDF, as JSON text */
  readonly record: Uint8Array;
}

export type FilingOutcome =
  | { readonly filed: true; readonly entry: SheetEntry }
  /** not what `supersedes` says stands for this batch record and step; nothing was written */
  | { readonly filed: false; readonly standing: SheetEntry | null };

/** A review as a person enters it. */
export type ReviewToEnter = Pick<ReviewEntry, "reviewer" | "reviewedOn" | "conclusion" | "remark">;

/** What a start found amiss, one sentence each. */
export type StartReport = readonly string[];

/** The filed sheets and what was entered about them. It grows; nothing in it is changed or removed. */
export interface Register {
  /** Reads the register, removes what killed processes left unfinished and sets a torn last entry aside. */
  start(): Promise<StartReport>;
  /** The register with everything that any process has entered up to now. */
  fresh(): Promise<RegisterIndex>;
  /** @throws what the storage throws where the disk is full or refuses; nothing is filed then */
  file(sheet: SheetToFile): Promise<FilingOutcome>;
  /** @returns null where there is no sheet of that number */
  review(sheet: number, review: ReviewToEnter): Promise<ReviewEntry | null>;
  /** The PDF or the record of a sheet; null where it is gone or is not what was filed. */
  pdf(sheet: SheetEntry): Promise<Buffer | null>;
  record(sheet: SheetEntry): Promise<Buffer | null>;
  /** Whether the chain of entries is whole, as `checkChain`. */
  check(scope: ChainScope): Promise<ChainCheck>;
}

/** Files read at once. */
const together = 64;

/**
 * The register of filed sheets: one file for each entry, named by its number and carrying the digest of the
 * entry before. An entry is made by creating a file that must not exist yet, so of several processes that try
 * for one number one gets it; the others draw their sheet again for the next. A sheet's PDF and record are on
 * the disk before its entry is: what is listed is whole.
 *
 * @param now the clock; tests bring their own
 */
export function register(storage: Storage, now: () => Date = () => new Date()): Register {
  let index = registerIndex();
  let complete = false;
  let reading: Promise<unknown> = Promise.resolve();
  let writing: Promise<unknown> = Promise.resolve();

  /** Reads what is new. One look after the other, for a look under way may have come too early. */
  function fresh(): Promise<RegisterIndex> {
    const read = reading.then(async () => {
      if (!(await isLastAsRead())) {
        index = registerIndex();
        complete = false;
      }
      if (!complete) await readAll();
      complete = true;
      for (;;) {
        const text = await storage.read(places.entry(index.last() + 1));
        if (text === null) return index;
        index.add(index.last() + 1, text);
      }
    });
    reading = read.catch(() => undefined);
    return read;
  }

  /** A torn entry may have been set aside by another process since; whole ones never change. */
  async function isLastAsRead(): Promise<boolean> {
    if (index.lastState() === null || index.lastState() === "whole") return true;
    return digestOfFile((await storage.read(places.entry(index.last()))) ?? "") === index.lastDigest();
  }

  async function readAll(): Promise<void> {
    const numbers = (await entryNumbers(storage)).filter((number) => number > index.last());
    const texts = await inGroups(numbers, together, (number) => storage.read(places.entry(number)));
    numbers.forEach((number, position) => {
      const text = texts[position] ?? null;
      if (text !== null) index.add(number, text);
    });
  }

  /** One after the other: each entry of this process carries the digest of the one before. */
  function inTurn<Result>(work: () => Promise<Result>): Promise<Result> {
    const done = writing.then(work);
    writing = done.catch(() => undefined);
    return done;
  }

  function file(sheet: SheetToFile): Promise<FilingOutcome> {
    return inTurn(async () => {
      for (;;) {
        const known = await fresh();
        const standing = known.standing(sheet.facts.record, sheet.facts.step);
        if ((standing?.number ?? null) !== sheet.supersedes) return { filed: false, standing };
        const place: Filing = {
          number: known.last() + 1,
          revision: (standing?.revision ?? 0) + 1,
          supersedes: sheet.supersedes,
          filedAt: now().toISOString(),
          previousDigest: known.lastDigest(),
        };
        const drawn = await sheet.draw(place);
        // Before anything is written: drawing takes long, and the number may have gone meanwhile.
        if ((await fresh()).last() >= place.number) continue;
        const entry = sheetEntry(sheet, place, drawn);
        if (await fileWhole(storage, entry, drawn)) return { filed: true, entry };
      }
    });
  }

  function review(number: number, content: ReviewToEnter): Promise<ReviewEntry | null> {
    return inTurn(async () => {
      for (;;) {
        const known = await fresh();
        const filed = known.sheet(number);
        if (filed === null) return null;
        const entry = entryOf<ReviewEntry>({
          kind: "review",
          number: known.last() + 1,
          time: now().toISOString(),
          previous: known.lastDigest(),
          sheet: number,
          pdf: filed.sheet.digests.pdf,
          ...content,
        });
        if (await storage.create(places.entry(entry.number), entryText(entry))) return entry;
      }
    });
  }

  return {
    start: async () => {
      const report = await setTornAside(storage, now);
      // What a killed process left is in nobody's way; a disk that refuses must not keep the register closed.
      const folders = [places.entries, places.sheets, places.aside];
      await Promise.allSettled(folders.map(storage.sweep));
      await fresh();
      return report;
    },
    fresh,
    file,
    review,
    pdf: (sheet) => unchanged(storage, places.pdf(sheet), sheet.digests.pdf),
    check: (scope) => checkChain(storage, scope),
    record: (sheet) => unchanged(storage, places.record(sheet), sheet.digests.record),
  };
}

function sheetEntry(sheet: SheetToFile, place: Filing, drawn: DrawnSheet): SheetEntry {
  return entryOf<SheetEntry>({
    kind: "sheet",
    number: place.number,
    time: place.filedAt,
    previous: place.previousDigest,
    ...sheet.facts,
    revision: place.revision,
    supersedes: place.supersedes,
    review: "unreviewed",
    digests: {
      case: sheet.caseDigest,
      findings: digestOf(sheet.findings),
      record: digestOfFile(drawn.record),
      pdf: digestOfFile(drawn.pdf),
    },
    files: ownFiles(place.number),
  });
}

/**
 * Puts a sheet's two files on the disk and then its entry, which is what files it.
 *
 * @returns false where the number is taken; the two files are gone again then, as after an error
 */
async function fileWhole(storage: Storage, entry: SheetEntry, drawn: DrawnSheet): Promise<boolean> {
  const own = entryText(entry);
  try {
    await storage.write(places.pdf(entry), drawn.pdf);
    await storage.write(places.record(entry), drawn.record);
    if (await storage.create(places.entry(entry.number), own)) return true;
  } catch (error) {
    // The entry may stand already and only its folder not have been forced to the disk: its files stay then.
    const found = await storage.read(places.entry(entry.number)).catch(() => own);
    if (found !== own) await removeFiles(storage, entry);
    throw error;
  }
  await removeFiles(storage, entry);
  return false;
}

async function removeFiles(storage: Storage, sheet: SheetEntry): Promise<void> {
  await Promise.allSettled([places.pdf(sheet), places.record(sheet)].map(storage.remove));
}

async function unchanged(storage: Storage, path: string, digest: string): Promise<Buffer | null> {
  const content = await storage.readBytes(path);
  return content !== null && digestOfFile(content) === digest ? content : null;
}
