import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { completeCase, demo, edited } from "./completeCases.js";

describe("never throws", () => {
  test("whatever JSON it is given", () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 6 }), (value) => {
        expect(readCase(value)).toMatchObject({ ok: false });
      }),
      { numRuns: 500 },
    );
  });

  test("whatever stands in the place of any field", () => {
    const pointers = pointersOf(completeCase());
    fc.assert(
      fc.property(
        fc.constantFrom(...pointers),
        fc.oneof(fc.jsonValue(), fc.string(), fc.string({ unit: "binary" }), fc.double()),
        (pointer, value) => {
          const read = readCase(edited(completeCase(), pointer, value));
          if (!read.ok) expect(read.faults.length).toBeGreaterThan(0);
          else expect(JSON.stringify(read.model)).not.toMatch(/NaN|Infinity/);
        },
      ),
      { numRuns: 1000 },
    );
  });

  test("things that are no JSON", () => {
    for (const odd of [undefined, Symbol("x"), () => 1, 1n, new Date(), new Map(), Number.NaN, /x/]) {
      expect(readCase(odd)).toMatchObject({ ok: false });
      expect(
        readCase(edited(demo("hydrolysis"), "/title", typeof odd === "symbol" ? null : 1)),
      ).toMatchObject({
        ok: false,
      });
    }
  });

  test("deep documents", () => {
    const deep = JSON.parse(`${"[".repeat(5000)}${"]".repeat(5000)}`);
    expect(readCase(deep)).toMatchObject({ ok: false });
    expect(readCase(edited(demo("hydrolysis"), "/mixture/mass", deep))).toMatchObject({ ok: false });
    expect(readCase(edited(demo("hydrolysis"), "/extra", deep))).toMatchObject({
      ok: false,
    });
  });

  test("huge documents, within reason of time", () => {
    const many = edited(
      demo("hydrolysis"),
      "/failures",
      Array.from({ length: 1e5 }, () => 1),
    );
    const long = edited(demo("hydrolysis"), "/mixture/mass", "1".repeat(1e6));
    const start = performance.now();
    for (const document of [many, long]) {
      const read = readCase(document);
      expect(read.ok).toBe(false);
      if (!read.ok) expect(JSON.stringify(read.faults).length).toBeLessThan(3e5);
    }
    expect(performance.now() - start).toBeLessThan(5000);
  });
});

/** Pointers of everything in a document. */
function pointersOf(value: unknown, at = ""): string[] {
  if (typeof value !== "object" || value === null) return [at];
  const below = Object.entries(value).flatMap(([key, member]) => pointersOf(member, `${at}/${key}`));
  return at === "" ? below : [at, ...below];
}
