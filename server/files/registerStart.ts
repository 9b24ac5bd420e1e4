import {
  digestOfFile,
  entryOf,
  entryText,
  noEntry,
  numberInName,
  places,
  readEntry,
  type VoidEntry,
} from "./registerEntry.js";
import type { Storage } from "./storage.js";

/** The numbers of all entries, the lowest first. */
export async function entryNumbers(storage: Storage): Promise<readonly number[]> {
  const names = await storage.list(places.entries);
  return names.flatMap((name) => numberInName(name) ?? []).sort((one, other) => one - other);
}

/**
 * Sets aside the last entry where it is torn, as a disk that lied about what it had written leaves one, and
 * enters in its place that its number is void. What stands before it is untouched. An entry further down that
 * cannot be read is another matter, for the check of the chain.
 *
 * @returns what was set aside, one sentence each
 */
export async function setTornAside(storage: Storage, now: () => Date): Promise<readonly string[]> {
  const torn: { number: number; digest: string }[] = [];
  const report: string[] = [];
  for (const number of (await entryNumbers(storage)).toReversed()) {
    const content = await storage.readBytes(places.entry(number));
    if (content === null || readEntry(content.toString("utf8")).state !== "torn") break;
    try {
      if (await moved(storage, number, content)) torn.unshift({ number, digest: digestOfFile(content) });
    } catch {
      return [`Entry ${number} is torn, and the disk refuses to have it set aside; nothing was changed.`];
    }
  }
  for (const { number, digest } of torn) {
    const aside = `Entry ${number} was torn and set aside as ${places.torn(number, digest)}`;
    const entered = await enterVoid(storage, number, digest, now()).then(
      () => true,
      () => false,
    );
    report.push(
      entered
        ? `${aside}; its number is void, and every entry before it is kept.`
        : `${aside}; that its number is void could not be entered, for the disk refuses. Every entry before it is kept.`,
    );
    if (!entered) break;
  }
  return report;
}

/** Another process that starts at the same time may have done it, and put a whole entry in its place. */
async function moved(storage: Storage, number: number, content: Buffer): Promise<boolean> {
  const aside = places.torn(number, digestOfFile(content));
  if (!(await storage.move(places.entry(number), aside))) return false;
  const taken = await storage.readBytes(aside);
  if (taken === null || taken.equals(content)) return true;
  await storage.create(places.entry(number), taken);
  await storage.write(aside, content);
  return false;
}

async function enterVoid(storage: Storage, number: number, torn: string, time: Date): Promise<void> {
  const before = number === 1 ? null : await storage.read(places.entry(number - 1));
  const entry = entryOf<VoidEntry>({
    kind: "void",
    number,
    time: time.toISOString(),
    previous: before === null ? noEntry : digestOfFile(before),
    torn,
  });
  await storage.create(places.entry(number), entryText(entry));
}
