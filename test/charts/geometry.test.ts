import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { clipPolyline, clipSegment, type Point, simplified } from "../../server/charts/geometry.js";

const box = { left: 0, right: 10, top: 0, bottom: 10 };

describe("clipping", () => {
  test("cuts a line that passes through at both edges", () => {
    expect(clipSegment([-5, 5], [15, 5], box)).toEqual([
      [0, 5],
      [10, 5],
    ]);
  });

  test("keeps nothing of a line that misses the box", () => {
    expect(clipSegment([-5, 5], [5, 20], box)).toBeNull();
  });

  test("leaves and enters again as two pieces", () => {
    const pieces = clipPolyline(
      [
        [1, 5],
        [5, 15],
        [9, 5],
      ],
      box,
    );
    expect(pieces).toEqual([
      [
        [1, 5],
        [3, 10],
      ],
      [
        [7, 10],
        [9, 5],
      ],
    ]);
  });

  test("is interrupted by null and by numbers that are not finite", () => {
    const pieces = clipPolyline(
      [
        [1, 1],
        [2, 2],
        null,
        [3, 3],
        [4, 4],
        [5, Number.NaN],
        [6, 6],
        [7, Number.POSITIVE_INFINITY],
        [8, 8],
        [9, 9],
      ],
      box,
    );
    expect(pieces.map((piece) => piece.length)).toEqual([2, 2, 2]);
  });

  test("whatever comes, every point that is drawn lies in the box", () => {
    const number = fc.double({ min: -30, max: 30, noNaN: true });
    fc.assert(
      fc.property(fc.array(fc.tuple(number, number), { maxLength: 20 }), (points) => {
        for (const [x, y] of clipPolyline(points, box).flat()) {
          expect(Math.min(x, y)).toBeGreaterThanOrEqual(-1e-9);
          expect(Math.max(x, y)).toBeLessThanOrEqual(10 + 1e-9);
        }
      }),
    );
  });
});

test("a simplified curve stays within its tolerance, keeps its ends and has far fewer points", () => {
  const curve = Array.from({ length: 2001 }, (_, at): Point => [at / 4, 100 * Math.sin(at / 300)]);
  const few = simplified(curve, 0.2);
  expect(few.length).toBeLessThan(80);
  expect(few[0]).toEqual(curve[0]);
  expect(few.at(-1)).toEqual(curve.at(-1));
  for (const [x, y] of curve) {
    const after = few.findIndex((point) => point[0] >= x);
    const [x1, y1] = few[after] as Point;
    const [x0, y0] = few[Math.max(0, after - 1)] as Point;
    const length = Math.hypot(x1 - x0, y1 - y0);
    const off = length === 0 ? 0 : Math.abs((x1 - x0) * (y0 - y) - (x0 - x) * (y1 - y0)) / length;
    expect(off).toBeLessThanOrEqual(0.2 + 1e-9);
  }
});
