import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { createCoverage } from "../../server/uncertainty/coverage.js";
import { holds, type Span } from "../../server/window/spans.js";

function covered(sets: readonly (readonly Span[])[], needed: number) {
  const coverage = createCoverage();
  for (const spans of sets) coverage.add(spans);
  return coverage.coveredBy(needed);
}

describe("temperatures covered by enough draws", () => {
  test("lie where enough spans overlap, ends included", () => {
    const sets: Span[][] = [[[0, 10]], [[2, 12]], [[4, 14]]];
    expect(covered(sets, 1)).toEqual([[0, 14]]);
    expect(covered(sets, 2)).toEqual([[2, 12]]);
    expect(covered(sets, 3)).toEqual([[4, 10]]);
    expect(covered(sets, 4)).toEqual([]);
  });

  test("may come in several parts, and spans that only touch make one", () => {
    expect(
      covered(
        [
          [
            [0, 1],
            [5, 6],
          ],
          [[0, 6]],
        ],
        2,
      ),
    ).toEqual([
      [0, 1],
      [5, 6],
    ]);
    expect(covered([[[0, 5]], [[5, 9]], [[0, 9]]], 2)).toEqual([[0, 9]]);
  });

  test("a draw that holds nowhere covers nothing", () => {
    expect(covered([[], [[0, 1]]], 2)).toEqual([]);
    expect(covered([], 1)).toEqual([]);
  });

  test("are those that a count at each temperature finds", () => {
    const draw = fc
      .uniqueArray(fc.integer({ min: 0, max: 40 }), { maxLength: 6 })
      .map((ends) => [...ends].sort((a, b) => a - b))
      .map((ends) =>
        Array.from(
          { length: Math.floor(ends.length / 2) },
          (_, i): Span => [ends[2 * i] ?? 0, ends[2 * i + 1] ?? 0],
        ),
      );
    fc.assert(
      fc.property(fc.array(draw, { maxLength: 8 }), fc.integer({ min: 1, max: 8 }), (sets, needed) => {
        const found = covered(sets, needed);
        for (let at = -0.5; at <= 40.5; at += 0.25) {
          const count = sets.filter((spans) => holds(spans, at)).length;
          expect(holds(found, at)).toBe(count >= needed);
        }
      }),
    );
  });
});
