import { inGroups } from "./inGroups.js";
import { checkChain } from "./registerChain.js";
import { digestOfFile, noEntry, places, readEntry } from "./registerEntry.js";
import { entryNumbers } from "./registerStart.js";
import type { Storage } from "./storage.js";

/** What a copy holds, and whether its register hangs together. */
export interface Backup {
  readonly format: "thermal-window/backup-1";
  /** ISO 8601, UTC */
  readonly begunAt: string;
  readonly cases: number;
  readonly entries: number;
  readonly sheets: number;
  /** SHA-256 of the last entry; note it elsewhere, and the copy can be held against it */
  readonly lastEntry: string;
  /** one sentence each; none: the chain is whole and every sheet is what was filed */
  readonly faults: readonly string[];
}

/** Written last: a copy without it was interrupted. */
export const backupName = "backup.json";

/** Files copied at once. */
const together = 16;

/**
 * Copies saved cases and the register while the program goes on saving and filing. Entries never change, and a
 * sheet's files are there before its entry is: the entries that there are at the beginning, with their files,
 * make a whole register whatever is filed meanwhile. They are copied last, so that even a copy that was
 * interrupted lists nothing that it does not hold.
 *
 * @param to empty
 */
export async function backUp(from: Storage, to: Storage, begun: Date): Promise<Backup> {
  const numbers = await entryNumbers(from);
  const entries = new Map<number, Buffer>();
  await inGroups(numbers, together, async (number) => {
    const content = await from.readBytes(places.entry(number));
    if (content !== null) entries.set(number, content);
  });
  const files = [...entries.values()].flatMap((content) => {
    const read = readEntry(content.toString("utf8"));
    return read.state === "whole" && read.entry.kind === "sheet" ? [read.entry] : [];
  });
  const aside = (await from.list(places.aside)).map((name) => `${places.aside}/${name}`);
  const paths = [...files.flatMap((sheet) => [places.pdf(sheet), places.record(sheet)]), ...aside];
  await inGroups(paths, together, (path) => copied(from, to, path));
  await inGroups([...entries], together, ([number, content]) => to.write(places.entry(number), content));
  const cases = await copyCases(from, to);
  const { faults } = await checkChain(to, { sheet: "all" });
  const last = entries.get(numbers.at(-1) ?? 0);
  const backup: Backup = {
    format: "thermal-window/backup-1",
    begunAt: begun.toISOString(),
    cases,
    entries: entries.size,
    sheets: files.length,
    lastEntry: last === undefined ? noEntry : digestOfFile(last),
    faults,
  };
  await to.write(backupName, `${JSON.stringify(backup, null, 2)}\n`);
  return backup;
}

/** A case that is saved meanwhile has its file replaced by the next one: another look finds that. */
async function copyCases(from: Storage, to: Storage): Promise<number> {
  const done = new Set<string>();
  for (let settled = false; !settled; ) {
    const names = (await from.list("cases")).filter((name) => !done.has(name));
    settled = true;
    await inGroups(names, together, async (name) => {
      if (await copied(from, to, `cases/${name}`)) done.add(name);
      else settled = false;
    });
  }
  return new Set([...done].map((name) => name.split("-")[0])).size;
}

/** @returns false where there is no such file */
async function copied(from: Storage, to: Storage, path: string): Promise<boolean> {
  const content = await from.readBytes(path);
  if (content === null) return false;
  await to.write(path, content);
  return true;
}
