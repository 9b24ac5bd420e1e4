import { describe, expect, test } from "vitest";
import { integratePanels } from "../../server/numeric/quadrature.js";
import {
  type Bottom,
  ellipsoidalBottom,
  flatBottom,
  torisphericalBottom,
} from "../../server/thermal/dishedHead.js";

/** Radius of the inside at a height, straight from each shape's own equation. */
const radius = {
  ellipsoidal: (diameter: number, h: number) => (z: number) =>
    (diameter / 2) * Math.sqrt(Math.max(0, 1 - (1 - z / h) ** 2)),
  torispherical: (diameter: number, dish: number, knuckle: number, h: number) => (z: number) => {
    // The two circles touch on the line through their centres, (0, dish) and (D/2 - knuckle, h).
    const seam = dish + ((h - dish) * dish) / (dish - knuckle);
    if (z <= seam) return Math.sqrt(z * (2 * dish - z));
    return diameter / 2 - knuckle + Math.sqrt(knuckle ** 2 - (h - z) ** 2);
  },
};

/** Panels that shrink towards both ends, where a wall stands upright or lies flat. */
function panels(from: number, to: number): number[] {
  const half = Array.from({ length: 40 }, (_, i) => 0.5 * 0.6 ** (39 - i));
  const fractions = [
    0,
    ...half,
    ...half
      .toReversed()
      .slice(1)
      .map((part) => 1 - part),
    1,
  ];
  return fractions.map((part) => from + part * (to - from));
}

const volumeOf = (x: (z: number) => number, edges: number[]) =>
  integratePanels((z) => Math.PI * x(z) ** 2, edges, 12);

/** Surface as the sum of many narrow frustums. */
function areaOf(x: (z: number) => number, from: number, to: number): number {
  const steps = 40_000;
  let sum = 0;
  for (let i = 0; i < steps; i++) {
    // Narrower towards both ends, as the panels are.
    const at = (j: number) => from + (to - from) * 0.5 * (1 - Math.cos((Math.PI * j) / steps));
    const [z1, z2] = [at(i), at(i + 1)];
    const [x1, x2] = [x(z1), x(z2)];
    sum += Math.PI * (x1 + x2) * Math.hypot(z2 - z1, x2 - x1);
  }
  return sum;
}

const heads: readonly { name: string; bottom: Bottom; x: (z: number) => number }[] = [
  ...[0.4, 0.7, 1.2].map((h) => ({
    name: `half an ellipsoid of 1.4 m, ${h} m high`,
    bottom: ellipsoidalBottom(1.4, h),
    x: radius.ellipsoidal(1.4, h),
  })),
  ...[
    [1.4, 1.4, 0.14],
    [1.4, 1.12, 0.2156],
    [2.2, 2.6, 0.1],
    [1, 0.5, 0.2],
    [1, 3, 0.5],
  ].map(([diameter, dish, knuckle]) => {
    const bottom = torisphericalBottom(diameter, dish, knuckle);
    const x = radius.torispherical(diameter, dish, knuckle, bottom.height);
    return { name: `dish ${dish} m and knuckle ${knuckle} m under ${diameter} m`, bottom, x };
  }),
];

describe.each(heads)("$name", ({ bottom, x }) => {
  const levels = [0.03, 0.2, 0.5, 0.8, 0.97, 1].map((part) => part * bottom.height);

  test("ends at the radius of the shell", () => {
    expect(x(bottom.height)).toBeCloseTo(bottom.diameter / 2, 9);
  });

  test("holds below a level what its cross-sections integrate to", () => {
    for (const level of levels) {
      const independent = volumeOf(x, panels(0, level));
      expect(bottom.volumeBelow(level) / independent).toBeCloseTo(1, 5);
    }
  });

  test("has below a level the wall that narrow frustums add up to", () => {
    for (const level of levels) {
      expect(bottom.areaBelow(level) / areaOf(x, 0, level)).toBeCloseTo(1, 5);
    }
  });

  test("is empty at its lowest point", () => {
    expect(bottom.volumeBelow(0)).toBeCloseTo(0, 15);
    expect(bottom.areaBelow(0)).toBeCloseTo(0, 14);
  });
});

test("a hemisphere comes out of all three descriptions", () => {
  const half = { volume: (2 / 3) * Math.PI, area: 2 * Math.PI };
  for (const bottom of [
    ellipsoidalBottom(2, 1),
    torisphericalBottom(2, 1, 1),
    torisphericalBottom(2, 1, 0.3),
  ]) {
    expect(bottom.height).toBeCloseTo(1, 12);
    expect(bottom.volumeBelow(1)).toBeCloseTo(half.volume, 12);
    expect(bottom.areaBelow(1)).toBeCloseTo(half.area, 12);
    // A cap of height h has the volume pi h^2 (1 - h/3) and the area 2 pi h.
    expect(bottom.volumeBelow(0.4)).toBeCloseTo(Math.PI * 0.16 * (1 - 0.4 / 3), 12);
    expect(bottom.areaBelow(0.4)).toBeCloseTo(2 * Math.PI * 0.4, 12);
  }
});

test("a flat bottom holds nothing of its own and counts no wall", () => {
  const bottom = flatBottom(1.2);
  expect([bottom.height, bottom.volumeBelow(0), bottom.areaBelow(0)]).toEqual([0, 0, 0]);
});

test.each([
  [1, 0.49, 0.1],
  [1, 1, 0.51],
  [1, 1, 0],
  [1, Number.NaN, 0.1],
])("no head of %d m has the radii %d m and %d m", (diameter, dish, knuckle) => {
  expect(() => torisphericalBottom(diameter, dish, knuckle)).toThrow(RangeError);
});
