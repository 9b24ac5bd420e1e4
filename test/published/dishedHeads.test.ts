import { describe, expect, test } from "vitest";
import { dinRadii, ellipsoidalBottom, torisphericalBottom } from "../../server/thermal/dishedHead.js";

const areaOf = (bottom: ReturnType<typeof ellipsoidalBottom>) => bottom.areaBelow(bottom.height);
const volumeOf = (bottom: ReturnType<typeof ellipsoidalBottom>) => bottom.volumeBelow(bottom.height);

test("a torispherical head of 2.54 m has the volume and height of an independent implementation", () => {
  const head = torisphericalBottom(2.54, 1.039370079 * 2.54, 0.062362205 * 2.54);
  expect(volumeOf(head)).toBeCloseTo(1.315762103724892, 12);
  expect(head.height).toBeCloseTo(0.421287761238738, 12);
});

describe("the two DIN forms", () => {
  // Published rules: h2 = 0.1935 Do - 0.455 t (DIN 28011), h2 = 0.255 Do - 0.635 t (DIN 28013).
  test.each([
    { form: "kloepper", ofOuter: 0.1935, ofWall: 0.455 },
    { form: "korbbogen", ofOuter: 0.255, ofWall: 0.635 },
  ] as const)("$form: the height follows the norm's rule within 0.1 % of Do", ({ form, ofOuter, ofWall }) => {
    for (const wall of [0.004, 0.008, 0.012, 0.02]) {
      for (const outer of [1, 1.6, 2.4]) {
        const inner = outer - 2 * wall;
        const { dish, knuckle } = dinRadii(form, inner, wall);
        const { height } = torisphericalBottom(inner, dish, knuckle);
        expect(Math.abs(height - (ofOuter * outer - ofWall * wall))).toBeLessThan(1e-3 * outer);
      }
    }
  });

  test("radii are parts of the outer diameter", () => {
    expect(dinRadii("kloepper", 1.576, 0.012)).toEqual({ dish: 1.6, knuckle: expect.closeTo(0.16, 12) });
    expect(dinRadii("korbbogen", 1.576, 0.012)).toEqual({
      dish: expect.closeTo(1.28, 12),
      knuckle: expect.closeTo(0.2464, 12),
    });
  });
});

// Factors of D, D^2 and D^3: independent implementation.
describe.each([
  { name: "dish D, knuckle 0.1 D", dish: 1, knuckle: 0.1, h: 0.193774225, A: 0.989987103, V: 0.098965995 },
  {
    name: "dish 0.8 D, knuckle 0.154 D",
    dish: 0.8,
    knuckle: 0.154,
    h: 0.254472732,
    A: 1.087920861,
    V: 0.130771734,
  },
  { name: "dish D, knuckle 0.06 D", dish: 1, knuckle: 0.06, h: 0.169337614, A: 0.93058283, V: 0.080999004 },
])("factors of a head of $name", ({ dish, knuckle, h, A, V }) => {
  test.each([0.5, 1, 2.5])("at a diameter of %d m", (diameter) => {
    const head = torisphericalBottom(diameter, dish * diameter, knuckle * diameter);
    expect(head.height / diameter).toBeCloseTo(h, 9);
    expect(areaOf(head) / diameter ** 2).toBeCloseTo(A, 8);
    expect(volumeOf(head) / diameter ** 3).toBeCloseTo(V, 9);
  });
});

test("factors of the 2:1 ellipsoidal head, its height the published D/4", () => {
  const head = ellipsoidalBottom(1.8);
  expect(head.height / 1.8).toBe(0.25);
  expect(areaOf(head) / 1.8 ** 2).toBeCloseTo(1.083985338, 9);
  expect(volumeOf(head) / 1.8 ** 3).toBeCloseTo(0.130899694, 9);
});
