import { describe, expect, test } from "vitest";
import { canonicalJson } from "../../server/case/canonical.js";
import { register } from "../../server/files/register.js";
import { places, type SheetEntry } from "../../server/files/registerEntry.js";
import { standingOf } from "../../server/files/registerStanding.js";
import { memoryStorage } from "./memoryStorage.js";
import { plainSheet, ticking } from "./registerSheets.js";

async function threeFiled() {
  const storage = memoryStorage();
  const sheets = register(storage, ticking());
  const entries: SheetEntry[] = [];
  for (const [record, supersedes] of [
    ["B-1", null],
    ["B-2", null],
    ["B-1", 1],
  ] as const) {
    const outcome = await sheets.file(plainSheet({ record }, supersedes));
    if (outcome.filed) entries.push(outcome.entry);
  }
  const record = async (number: number) => {
    const entry = entries[number - 1];
    return (entry && (await sheets.record(entry))) ?? Buffer.alloc(0);
  };
  const pdf = async (number: number) => {
    const entry = entries[number - 1];
    return (entry && (await sheets.pdf(entry))) ?? Buffer.alloc(0);
  };
  return { storage, sheets, entries, record, pdf };
}

describe("what a register says of a file", () => {
  test("a filed PDF or record is in it, with its number, its revision and what superseded it", async () => {
    const { sheets, pdf, record } = await threeFiled();
    const first = await standingOf(sheets, await pdf(1));
    expect(first).toMatchObject({ state: "in", faults: [], filed: { sheet: { number: 1 } } });
    expect(first.sentence).toBe(
      "In this register as No. 1, revision 1, filed at 2026-01-01 00:00 UTC. It was superseded by No. 3. Unreviewed.",
    );
    expect((await standingOf(sheets, await record(3))).sentence).toContain("No. 3, revision 2");
  });

  test("the reviews are told, and that they differ", async () => {
    const { sheets, pdf } = await threeFiled();
    const review = { reviewer: "B", reviewedOn: "2026-02-03", remark: null };
    await sheets.review(2, { ...review, conclusion: "no objection" });
    expect((await standingOf(sheets, await pdf(2))).sentence).toContain("Reviewed, no objection.");
    await sheets.review(2, { ...review, conclusion: "objection" });
    expect((await standingOf(sheets, await pdf(2))).sentence).toContain("Reviewed, opinions differ.");
  });

  test("the chain up to the sheet is followed, and no further", async () => {
    const { storage, sheets, pdf, entries } = await threeFiled();
    const text = (await storage.read(places.entry(2))) ?? "";
    await storage.write(places.entry(2), text.replace('"class":2', '"class":1'));
    expect((await standingOf(sheets, await pdf(2))).faults).toEqual([
      "Entry 3 does not follow from entry 2: one of the two was changed.",
    ]);
    expect((await standingOf(sheets, await pdf(1))).faults).toEqual([]);
    const first = await pdf(1);
    await storage.remove(places.pdf(entries[0] ?? { files: "" }));
    expect((await standingOf(sheets, first)).faults).toEqual([
      "The PDF of sheet 1 is missing: it was removed.",
    ]);
  });

  test("a changed record is told from the one that was filed under its number", async () => {
    const { sheets, record } = await threeFiled();
    const text = (await record(2)).toString().replace('"title":"Coupling', '"title":"Uncoupling');
    expect(await standingOf(sheets, Buffer.from(text))).toMatchObject({
      state: "against",
      sentence: expect.stringContaining("The sheet of that number in this register is another file"),
    });
  });

  test("a sheet whose entry was removed, or of another register, is not borne out", async () => {
    const { storage, record } = await threeFiled();
    const file = await record(3);
    await storage.remove(places.entry(3));
    const { state, sentence } = await standingOf(register(storage, ticking()), file);
    expect(state).toBe("against");
    expect(sentence).toContain("No. 3, revision 2. This register holds no sheet of that number");
  });

  test("a sheet that was only printed, and a file that is none, are out", async () => {
    const { sheets, record } = await threeFiled();
    const { filing, ...printed } = JSON.parse((await record(1)).toString());
    expect(filing.number).toBe(1);
    const out = await standingOf(sheets, Buffer.from(canonicalJson(printed)));
    expect(out).toMatchObject({ state: "out", sentence: expect.stringContaining("without being filed") });
    for (const file of ["", "%PDF-1.7", "{}", "{", "\0".repeat(1000)]) {
      expect(await standingOf(sheets, Buffer.from(file))).toMatchObject({ state: "out", faults: [] });
    }
  });
});
