import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { alike, followed, heldAlong, type Trail, trailOf } from "../../server/uncertainty/trail.js";
import { spansWhere } from "../../server/window/spans.js";

type Margin = (at: number) => number;
const [low, high] = [280, 360] as const;

function trail(margin: Margin): Trail {
  return trailOf(margin, spansWhere(margin, low, high), low, high);
}

describe("a criterion's ends, followed from the estimates", () => {
  const steep: Margin = (at) => 9000 * (1 / at - 1 / 320);

  test("agree with a search of the whole range where the margin shifts and tilts", () => {
    const nominal = trail(steep);
    fc.assert(
      fc.property(
        fc.double({ min: -60, max: 60, noNaN: true }),
        fc.double({ min: 0.7, max: 1.4, noNaN: true }),
        (shift, tilt) => {
          const margin: Margin = (at) => tilt * 9000 * (1 / at - 1 / (320 + shift));
          const spans = followed(nominal, margin);
          expect(spans).not.toBeNull();
          expect(alike(spans ?? [], spansWhere(margin, low, high), 0.01)).toBe(true);
        },
      ),
    );
  });

  test("are two where a hump is cut, and leave together where it sinks", () => {
    const hump =
      (top: number, middle: number): Margin =>
      (at) =>
        top - ((at - middle) / 10) ** 2;
    const nominal = trail(hump(1, 320));
    expect(nominal.ends.map((end) => end.falling)).toEqual([false, true]);
    expect(alike(followed(nominal, hump(4, 325)) ?? [], [[305, 345]], 0.01)).toBe(true);
    expect(alike(followed(nominal, hump(4, 345)) ?? [], [[325, 360]], 0.01)).toBe(true);
    // It has sunk, or passed by the end that was followed: the search says so, not the trail.
    expect(followed(nominal, hump(-1, 320))).toBeNull();
    expect(followed(nominal, hump(1, 359))).toBeNull();
    expect(alike(heldAlong(nominal, hump(1, 359), low, high), [[349, 360]], 0.01)).toBe(true);
    expect(heldAlong(nominal, hump(-1, 320), low, high)).toEqual([]);
  });

  test("go on where the margin falls to minus infinity beyond the end", () => {
    const cliff =
      (edge: number): Margin =>
      (at) =>
        at < edge ? Math.log(edge - at) + 0.05 : Number.NEGATIVE_INFINITY;
    const nominal = trail(cliff(330));
    for (const edge of [300, 318.3, 331, 352]) {
      const spans = followed(nominal, cliff(edge)) ?? [];
      expect(alike(spans, spansWhere(cliff(edge), low, high), 0.02)).toBe(true);
    }
  });

  test("take a margin that is not a number as one that fails", () => {
    const nominal = trail(steep);
    expect(followed(nominal, () => Number.NaN)).toEqual([]);
  });
});

describe("a criterion without ends at the estimates", () => {
  const always: Margin = () => 1;
  const never: Margin = () => -1;
  const falling: Margin = (at) => 333.3 - at;

  test("keeps to the estimates where both ends of the range do", () => {
    expect(followed(trail(always), always)).toEqual([[low, high]]);
    expect(followed(trail(never), never)).toEqual([]);
  });

  test("has one end where the two ends of the range part", () => {
    expect(alike(followed(trail(always), falling) ?? [], [[low, 333.3]], 0.01)).toBe(true);
    expect(alike(followed(trail(never), falling) ?? [], [[low, 333.3]], 0.01)).toBe(true);
    expect(alike(followed(trail(never), (at) => -falling(at)) ?? [], [[333.3, high]], 0.01)).toBe(true);
  });

  test("is searched where the draw says the opposite", () => {
    expect(followed(trail(always), never)).toBeNull();
    expect(followed(trail(never), always)).toBeNull();
    expect(heldAlong(trail(never), always, low, high)).toEqual([[low, high]]);
  });
});

test("spans are alike only with as many parts and ends within the tolerance", () => {
  expect(alike([[1, 2]], [[1.005, 2]], 0.01)).toBe(true);
  expect(alike([[1, 2]], [[1.02, 2]], 0.01)).toBe(false);
  expect(alike([[1, 2]], [], 0.01)).toBe(false);
  expect(
    alike(
      [[1, 2]],
      [
        [1, 1.5],
        [1.6, 2],
      ],
      0.01,
    ),
  ).toBe(false);
});
