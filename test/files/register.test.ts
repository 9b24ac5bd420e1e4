import { createHash } from "node:crypto";
import { describe, expect, test } from "vitest";
import { type Register, register } from "../../server/files/register.js";
import type { SheetEntry } from "../../server/files/registerEntry.js";
import { noEntry, places } from "../../server/files/registerEntry.js";
import type { Storage } from "../../server/files/storage.js";
import { memoryStorage } from "./memoryStorage.js";
import { plainSheet, ticking } from "./registerSheets.js";

function sha256(text: string | Uint8Array | null): string {
  return createHash("sha256")
    .update(text ?? "")
    .digest("hex");
}

async function filed(into: Register, ...sheet: Parameters<typeof plainSheet>): Promise<SheetEntry> {
  const outcome = await into.file(plainSheet(...sheet));
  if (!outcome.filed) throw new Error("The sheet was not filed.");
  return outcome.entry;
}

const review = {
  reviewer: "B. Reviewer",
  reviewedOn: "2026-02-03",
  conclusion: "no objection",
  remark: null,
} as const;

describe("filing a sheet", () => {
  test("gives numbers from 1 on, and each entry the digest of the file before", async () => {
    const storage = memoryStorage();
    const sheets = register(storage, ticking());
    const first = await filed(sheets, { record: "B-1" });
    const second = await filed(sheets, { record: "B-2" });
    expect([first.number, second.number]).toEqual([1, 2]);
    expect(first.previous).toBe(noEntry);
    expect(second.previous).toBe(sha256(await storage.read(places.entry(1))));
  });

  test("draws the sheet with its number, revision, what it supersedes and the digest before it", async () => {
    const sheets = register(memoryStorage(), ticking());
    const first = await filed(sheets);
    const second = await filed(sheets, {}, first.number);
    const pdf = (await sheets.pdf(second))?.toString() ?? "";
    expect(JSON.parse(pdf.slice(5)).filing).toEqual({
      number: 2,
      revision: 2,
      supersedes: 1,
      filedAt: second.time,
      previousDigest: second.previous,
    });
    expect(second.digests.pdf).toBe(sha256(pdf));
    expect(second.digests.record).toBe(sha256(await sheets.record(second)));
  });

  test("carries the time of the clock, the facts and unreviewed", async () => {
    const told = { stop: true, class: "none", vessel: " " } as const;
    const entry = await filed(register(memoryStorage(), ticking()), told);
    expect(entry).toMatchObject({
      time: "2026-01-01T00:00:00.000Z",
      record: "B-0001",
      stop: true,
      class: "none",
      vessel: null,
      review: "unreviewed",
    });
  });

  test("under a batch record and step that has a sheet asks first, and writes nothing", async () => {
    const storage = memoryStorage();
    const sheets = register(storage, ticking());
    const first = await filed(sheets, { record: "B-17", step: "Step 1" });
    const again = await sheets.file(plainSheet({ record: " b-17", step: "step  1" }));
    expect(again).toEqual({ filed: false, standing: first });
    expect((await storage.list(places.entries)).length + (await storage.list(places.sheets)).length).toBe(3);
  });

  test("another step of the same batch record is no revision", async () => {
    const sheets = register(memoryStorage(), ticking());
    await filed(sheets, { step: "Step 1" });
    expect(await filed(sheets, { step: "Step 2" })).toMatchObject({ revision: 1, supersedes: null });
    expect(await filed(sheets, { step: "" })).toMatchObject({ revision: 1, supersedes: null });
  });

  test("over a sheet that was superseded meanwhile is refused and shows the one that stands", async () => {
    const sheets = register(memoryStorage(), ticking());
    const first = await filed(sheets);
    const second = await filed(sheets, {}, first.number);
    expect(await sheets.file(plainSheet({}, first.number))).toEqual({ filed: false, standing: second });
    expect(await sheets.file(plainSheet({ record: "B-9" }, 1))).toEqual({ filed: false, standing: null });
  });

  test("draws again where another process took the number meanwhile", async () => {
    const storage = memoryStorage();
    const other = register(storage, ticking());
    const mine = register(storage, ticking());
    const slow = plainSheet({ record: "B-2" });
    const drawn: number[] = [];
    const outcome = await mine.file({
      ...slow,
      draw: async (place) => {
        if (drawn.length === 0) await filed(other, { record: "B-1" });
        drawn.push(place.number);
        return slow.draw(place);
      },
    });
    expect(drawn).toEqual([1, 2]);
    expect(outcome).toMatchObject({ filed: true, entry: { number: 2 } });
    expect(await storage.list(places.sheets)).toHaveLength(4);
  });

  test("leaves no files behind where the number is lost at the last moment", async () => {
    const storage = memoryStorage();
    const other = register(storage, ticking());
    let late = true;
    const hurried: Storage = {
      ...storage,
      create: async (path, content) => {
        if (late) {
          late = false;
          await filed(other, { record: "B-1" });
        }
        return storage.create(path, content);
      },
    };
    expect(await filed(register(hurried, ticking()), { record: "B-2" })).toMatchObject({ number: 2 });
    expect(await storage.list(places.sheets)).toHaveLength(4);
  });
});

describe("reviews", () => {
  test("are entries of their own; the sheet's entry stays as it was filed", async () => {
    const storage = memoryStorage();
    const sheets = register(storage, ticking());
    const sheet = await filed(sheets);
    const before = await storage.read(places.entry(1));
    const entered = await sheets.review(sheet.number, review);
    expect(entered).toMatchObject({ number: 2, sheet: 1, pdf: sheet.digests.pdf, ...review });
    expect(await storage.read(places.entry(1))).toBe(before);
    expect((await sheets.fresh()).sheet(1)?.reviews).toEqual([entered]);
  });

  test("of a sheet that is not there, or of another review, are not entered", async () => {
    const sheets = register(memoryStorage(), ticking());
    await filed(sheets);
    await sheets.review(1, review);
    expect(await sheets.review(2, review)).toBeNull();
    expect(await sheets.review(99, review)).toBeNull();
    expect((await sheets.fresh()).last()).toBe(2);
  });
});

describe("the register in memory", () => {
  test("takes in what another process filed, and reads no old entry again", async () => {
    const storage = memoryStorage();
    const read: string[] = [];
    const watched: Storage = {
      ...storage,
      read: (path) => {
        read.push(path);
        return storage.read(path);
      },
    };
    const mine = register(watched, ticking());
    const other = register(storage, ticking());
    for (const record of ["B-1", "B-2", "B-3"]) await filed(other, { record });
    expect((await mine.fresh()).last()).toBe(3);
    read.length = 0;
    await filed(other, { record: "B-4" });
    expect((await mine.fresh()).sheets().map(({ sheet }) => sheet.record)).toEqual([
      "B-4",
      "B-3",
      "B-2",
      "B-1",
    ]);
    expect(read).toEqual([places.entry(4), places.entry(5)]);
  });

  test("knows which sheet stands, and every revision", async () => {
    const sheets = register(memoryStorage(), ticking());
    const first = await filed(sheets);
    const second = await filed(sheets, {}, 1);
    const index = await sheets.fresh();
    expect(index.sheet(1)?.supersededBy).toBe(2);
    expect(index.sheet(2)?.supersededBy).toBeNull();
    expect(index.standing("B-0001", "Step 2, coupling")).toEqual(second);
    expect(index.revisions(second)).toEqual([first, second]);
    expect(index.withDigest(first.digests.pdf)).toEqual(first);
  });

  test("a file whose bytes changed is not handed out as the sheet", async () => {
    const storage = memoryStorage();
    const sheets = register(storage, ticking());
    const sheet = await filed(sheets);
    await storage.write(places.pdf(sheet), "%PDF of another kind");
    await storage.remove(places.record(sheet));
    expect(await sheets.pdf(sheet)).toBeNull();
    expect(await sheets.record(sheet)).toBeNull();
  });
});

describe("a start", () => {
  async function threeFiled() {
    const storage = memoryStorage();
    const sheets = register(storage, ticking());
    for (const record of ["B-1", "B-2", "B-3"]) await filed(sheets, { record });
    return storage;
  }

  test("finds nothing amiss in a whole register, or in none", async () => {
    expect(await register(memoryStorage(), ticking()).start()).toEqual([]);
    expect(await register(await threeFiled(), ticking()).start()).toEqual([]);
  });

  test.each(["", "\0".repeat(300), '{"class":2,"digests":{"cas'])(
    "sets a torn last entry aside, reports it, keeps the rest and never gives its number again: %j",
    async (text) => {
      const storage = await threeFiled();
      await storage.write(places.entry(3), text);
      const sheets = register(storage, ticking());
      const report = await sheets.start();
      expect(report).toHaveLength(1);
      expect(report[0]).toMatch(/^Entry 3 was torn and set aside as register\/aside\/000003-/);
      const index = await sheets.fresh();
      expect(index.sheets().map(({ sheet }) => sheet.record)).toEqual(["B-2", "B-1"]);
      expect(index.voids()).toMatchObject([{ number: 3, torn: sha256(text) }]);
      const [aside = ""] = await storage.list(places.aside);
      expect(await storage.read(`${places.aside}/${aside}`)).toBe(text);
      expect(await filed(sheets, { record: "B-4" })).toMatchObject({
        number: 4,
        previous: sha256(await storage.read(places.entry(3))),
      });
    },
  );

  test("sets aside every torn entry at the end, and none before a whole one", async () => {
    const storage = await threeFiled();
    for (const number of [2, 3]) await storage.write(places.entry(number), "{");
    expect(await register(storage, ticking()).start()).toHaveLength(2);

    const middle = await threeFiled();
    await middle.write(places.entry(2), "{");
    const sheets = register(middle, ticking());
    expect(await sheets.start()).toEqual([]);
    expect((await sheets.fresh()).gaps()).toEqual({ missing: [], unreadable: [2] });
  });

  test("leaves an entry of a later version where it is", async () => {
    const storage = await threeFiled();
    await storage.write(places.entry(3), '{"format":"thermal-window/entry-2"}');
    expect(await register(storage, ticking()).start()).toEqual([]);
    expect(await storage.read(places.entry(3))).toContain("entry-2");
  });

  test("in one process is seen by another that had read the torn entry", async () => {
    const storage = await threeFiled();
    await storage.write(places.entry(3), "{");
    const old = register(storage, ticking());
    await old.fresh();
    await register(storage, ticking()).start();
    expect(await filed(old, { record: "B-5" })).toMatchObject({
      number: 4,
      previous: sha256(await storage.read(places.entry(3))),
    });
  });

  test("puts back a whole entry that another process set in the torn one's place", async () => {
    const storage = await threeFiled();
    const whole = await storage.read(places.entry(3));
    await storage.write(places.entry(3), "{");
    const late: Storage = {
      ...storage,
      move: async (from, to) => {
        await storage.write(places.entry(3), whole ?? "");
        return storage.move(from, to);
      },
    };
    expect(await register(late, ticking()).start()).toEqual([]);
    expect(await storage.read(places.entry(3))).toBe(whole);
  });
});
