import { describe, expect, test } from "vitest";
import { differencesOf } from "../../server/records/differences.js";

describe("differences of two records", () => {
  test("are none where the content is the same, whatever the order of its keys", () => {
    expect(differencesOf({ a: [1, { b: null }], c: "x" }, { c: "x", a: [1, { b: null }] })).toEqual([]);
    expect(differencesOf({ a: 0 }, { a: -0 })).toEqual([]);
  });

  test("name each place by its JSON pointer, numbers with their relative difference", () => {
    const found = differencesOf(
      { "a/b": { "c~": [1, 200] }, word: "holds", gone: 1 },
      { "a/b": { "c~": [1, 201] }, word: "lost", added: null },
    );
    expect(found.map((difference) => difference.pointer)).toEqual([
      "/a~1b/c~0/1",
      "/word",
      "/gone",
      "/added",
    ]);
    expect(found[0]?.relative).toBeCloseTo(1 / 201, 12);
    expect(found[1]?.relative).toBeNull();
  });

  test("tell null from a missing key, a list from an object, and a number from its text", () => {
    for (const [one, other] of [
      [{ a: null }, {}],
      [{ a: [] }, { a: {} }],
      [{ a: 1 }, { a: "1" }],
      [{ a: 1 }, { a: null }],
      [1, 2],
    ]) {
      expect([one, differencesOf(one, other).length]).toEqual([one, 1]);
    }
  });

  test("stop at the most that is asked for", () => {
    expect(differencesOf(Array(50).fill(1), Array(50).fill(2), 7)).toHaveLength(7);
  });
});
