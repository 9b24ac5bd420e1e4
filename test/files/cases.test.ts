import { describe, expect, test } from "vitest";
import { caseStore } from "../../server/files/cases.js";
import { memoryStorage } from "./memoryStorage.js";

/** A clock that moves one second at each look. */
function ticking(): () => Date {
  let seconds = 0;
  return () => new Date(Date.UTC(2026, 0, 1) + 1000 * seconds++);
}

describe("saved cases", () => {
  test("a document comes back as it was saved, faults and all", async () => {
    const cases = caseStore(memoryStorage(), ticking());
    const document = { title: "Ring closure", mixture: { mass: "-3 parsec" }, odd: [1, null] };
    const made = await cases.create(document);
    expect(await cases.read(made.id)).toEqual({ ...made, revision: 1, archived: false, document });
  });

  test("the list is newest first and names untitled ones", async () => {
    const cases = caseStore(memoryStorage(), ticking());
    const first = await cases.create({ title: "First" });
    await cases.create({ title: "  " });
    await cases.create("not even an object");
    await cases.save(first.id, 1, { document: { title: "First again" } });
    expect((await cases.list()).map((entry) => entry.title)).toEqual([
      "First again",
      "Untitled case",
      "Untitled case",
    ]);
  });

  test("saving over a newer copy is refused and shows it", async () => {
    const cases = caseStore(memoryStorage(), ticking());
    const { id } = await cases.create({ title: "Mine" });
    await cases.save(id, 1, { document: { title: "Theirs" } });
    const outcome = await cases.save(id, 1, { document: { title: "Mine, later" } });
    expect(outcome).toMatchObject({ saved: false, current: { revision: 2, document: { title: "Theirs" } } });
    expect((await cases.read(id))?.document).toEqual({ title: "Theirs" });
  });

  test("of many that save over the same revision at once, one succeeds", async () => {
    const cases = caseStore(memoryStorage(), ticking());
    const { id } = await cases.create({ n: -1 });
    const outcomes = await Promise.all(
      Array.from({ length: 10 }, (_, n) => cases.save(id, 1, { document: { n } })),
    );
    expect(outcomes.filter((outcome) => outcome?.saved)).toHaveLength(1);
    expect((await cases.read(id))?.document).toEqual({ n: outcomes.findIndex((outcome) => outcome?.saved) });
  });

  test("a save is refused even where several newer ones came between its look and its write", async () => {
    const storage = memoryStorage();
    const others = caseStore(storage, ticking());
    const { id } = await others.create({ title: "Old" });
    let intrude = true;
    const slow = caseStore(
      {
        ...storage,
        create: async (path, content) => {
          if (intrude) {
            intrude = false;
            await others.save(id, 1, { document: { title: "Newer" } });
            await others.save(id, 2, { document: { title: "Newest" } });
          }
          return storage.create(path, content);
        },
      },
      ticking(),
    );
    expect(await slow.save(id, 1, { document: { title: "Late" } })).toMatchObject({ saved: false });
    expect(await others.read(id)).toMatchObject({ revision: 3, document: { title: "Newest" } });
  });

  test("an id that the program did not make finds nothing", async () => {
    const storage = memoryStorage();
    await storage.write("secret.json", "{}");
    const cases = caseStore(storage);
    for (const id of ["", "../secret", "..%2fsecret", "aaaaaaaaaaaa", "__proto__", "a".repeat(5000)]) {
      expect(await cases.read(id)).toBeNull();
      expect(await cases.save(id, 1, { document: {} })).toBeNull();
    }
  });

  test("a file that someone edited into something else is left out", async () => {
    const storage = memoryStorage();
    const cases = caseStore(storage, ticking());
    const { id } = await cases.create({ title: "Whole" });
    for (const [name, text] of [
      ["abcdefghjkmn", "{ half"],
      ["bbcdefghjkmn", "null"],
      ["cbcdefghjkmn", '{"format":"other"}'],
    ]) {
      await storage.write(`cases/${name}-000001.json`, text ?? "");
    }
    expect((await cases.list()).map((entry) => entry.id)).toEqual([id]);
  });
});
