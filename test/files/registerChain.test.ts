import { describe, expect, test } from "vitest";
import { register } from "../../server/files/register.js";
import { checkChain } from "../../server/files/registerChain.js";
import { places, type SheetEntry } from "../../server/files/registerEntry.js";
import type { Storage } from "../../server/files/storage.js";
import { memoryStorage } from "./memoryStorage.js";
import { plainSheet, ticking } from "./registerSheets.js";

/** A register of six sheets and a review of the third, which is entry 7. */
async function seven(): Promise<{ storage: Storage; sheets: readonly SheetEntry[] }> {
  const storage = memoryStorage();
  const filing = register(storage, ticking());
  const sheets: SheetEntry[] = [];
  for (const record of ["B-1", "B-2", "B-3", "B-4", "B-5", "B-6"]) {
    const outcome = await filing.file(plainSheet({ record }));
    if (outcome.filed) sheets.push(outcome.entry);
  }
  await filing.review(3, {
    reviewer: "B. Reviewer",
    reviewedOn: "2026-02-03",
    conclusion: "objection",
    remark: null,
  });
  return { storage, sheets };
}

async function edit(storage: Storage, number: number, from: string | RegExp, to: string): Promise<void> {
  const text = (await storage.read(places.entry(number))) ?? "";
  const edited = text.replace(from, to);
  expect(edited).not.toBe(text);
  await storage.write(places.entry(number), edited);
}

async function swap(storage: Storage, one: number, other: number): Promise<void> {
  const [first, second] = [await storage.read(places.entry(one)), await storage.read(places.entry(other))];
  await storage.write(places.entry(one), second ?? "");
  await storage.write(places.entry(other), first ?? "");
}

describe("the chain of entries", () => {
  test("is whole as it was filed, in all or up to any entry", async () => {
    const { storage } = await seven();
    expect(await checkChain(storage, { sheet: "all" })).toEqual({ upTo: 7, faults: [] });
    expect(await checkChain(storage, { upTo: 4 })).toEqual({ upTo: 4, faults: [] });
    expect(await checkChain(memoryStorage())).toEqual({ upTo: 0, faults: [] });
  });

  test("a changed entry is found by the one after it", async () => {
    const { storage } = await seven();
    await edit(storage, 4, '"class":2', '"class":1');
    expect((await checkChain(storage)).faults).toEqual([
      "Entry 4 was changed: its digest is not the one that entry 5 carries.",
    ]);
    expect((await checkChain(storage, { upTo: 4 })).faults).toHaveLength(1);
    expect((await checkChain(storage, { upTo: 3 })).faults).toEqual([]);
  });

  test("one added space is a change", async () => {
    const { storage } = await seven();
    await edit(storage, 2, /\}$/, "} ");
    expect((await checkChain(storage)).faults).toEqual([
      "Entry 2 was changed: its digest is not the one that entry 3 carries.",
    ]);
  });

  test("an entry whose link was rewritten is told from the one before it", async () => {
    const { storage } = await seven();
    await edit(storage, 4, /"previous":"[0-9a-f]{4}/, '"previous":"0000');
    const { faults } = await checkChain(storage);
    expect(faults).toEqual([
      "Entry 4 does not follow from entry 3: one of the two was changed.",
      "Entry 4 was changed: its digest is not the one that entry 5 carries.",
    ]);
  });

  test("the first entry names none before it", async () => {
    const { storage } = await seven();
    await edit(storage, 1, /"previous":"0{4}/, '"previous":"1111');
    expect((await checkChain(storage)).faults).toEqual([
      "Entry 1 was changed: it names an entry before it, and there is none.",
      "Entry 1 was changed: its digest is not the one that entry 2 carries.",
    ]);
  });

  test("removed entries are named, at the beginning too", async () => {
    const { storage } = await seven();
    for (const number of [1, 4, 5]) await storage.remove(places.entry(number));
    expect((await checkChain(storage)).faults).toEqual([
      "Entry 1 is missing: it was removed.",
      "Entries 4 to 5 are missing: they were removed.",
    ]);
  });

  test("swapped entries are named, and so is a copy in another's place", async () => {
    const { storage } = await seven();
    await swap(storage, 2, 5);
    expect((await checkChain(storage)).faults).toEqual([
      "In the place of entry 2 stands entry 5: entries were swapped or renamed.",
      "In the place of entry 5 stands entry 2: entries were swapped or renamed.",
    ]);
    const other = await seven();
    await other.storage.write(places.entry(8), (await other.storage.read(places.entry(6))) ?? "");
    expect((await checkChain(other.storage)).faults).toEqual([
      "In the place of entry 8 stands entry 6: entries were swapped or renamed.",
    ]);
  });

  test("an entry that cannot be read, and one of a later version, are named", async () => {
    const { storage } = await seven();
    await storage.write(places.entry(3), "{ half");
    await edit(storage, 5, "entry-1", "entry-9");
    const { faults } = await checkChain(storage);
    expect(faults).toEqual([
      "Entry 3 cannot be read: it was changed, or a later version of the program made it.",
      "Entry 5 cannot be read: it was changed, or a later version of the program made it.",
    ]);
  });

  test("files with other names are no entries", async () => {
    const { storage } = await seven();
    for (const name of ["000000.json", "7.json", "000008.json.bak", "0000009.json", "notes.txt"]) {
      await storage.write(`${places.entries}/${name}`, "{}");
    }
    expect(await checkChain(storage)).toEqual({ upTo: 7, faults: [] });
  });
});

describe("the last entry", () => {
  test.each([
    ['"class":2', '"class":1', "class"],
    ['"stop":false', '"stop":true', "stop"],
    ['"revision":1', '"revision":2', "revision"],
    ['"time":"2026', '"time":"2025', "time"],
    ['"title":"Coupling', '"title":"Uncoupling', "title"],
    [/"previous":"[0-9a-f]{4}/, '"previous":"0000', "previous"],
    [/"findings":"[0-9a-f]{4}/, '"findings":"0000', "digests"],
  ])("is held against its own sheet: %s", async (from, to, key) => {
    const { storage } = await seven();
    await storage.remove(places.entry(7));
    await edit(storage, 6, from, to);
    const { faults } = await checkChain(storage);
    expect(faults).toContain(
      `Entry 6, the last one, was changed: it does not agree with its sheet (${key}).`,
    );
  });
});

describe("the files of the sheets", () => {
  test("one changed byte of a PDF, and a record that was removed, are named with their sheet", async () => {
    const { storage, sheets } = await seven();
    const [, second, third] = sheets;
    if (second === undefined || third === undefined) throw new Error("Too few sheets.");
    const pdf = (await storage.readBytes(places.pdf(second))) ?? Buffer.alloc(0);
    await storage.write(places.pdf(second), Buffer.from(pdf.map((byte, at) => (at === 9 ? byte ^ 1 : byte))));
    await storage.remove(places.record(third));
    expect((await checkChain(storage, { sheet: "all" })).faults.toSorted()).toEqual([
      "The PDF of sheet 2 was changed: its digest is not the one in entry 2.",
      "The record of sheet 3 is missing: it was removed.",
    ]);
    expect((await checkChain(storage)).faults).toEqual([]);
  });
});
