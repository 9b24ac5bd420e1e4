import { expect, test } from "vitest";
import { normalQuantile } from "../../server/numeric/normal.js";
import { integratePanels } from "../../server/numeric/quadrature.js";

const density = (z: number) => Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);

/** Upper tail of the normal distribution beyond z > 0, by Laplace's continued fraction (A&S 26.2.14). */
function upperTail(z: number): number {
  let fraction = z;
  for (let k = 400; k >= 1; k--) fraction = z + k / fraction;
  return density(z) / fraction;
}

// 40-digit inverse error function, independent implementation.
test.each([
  [1e-300, -37.0470962993612],
  [1e-20, -9.26234008979841],
  [1e-8, -5.61200124417479],
  [0.001, -3.090232306167813],
  [0.075, -1.4395314709384563],
  [0.1, -1.2815515655446004],
  [0.25, -0.6744897501960817],
  [0.6, 0.2533471031357997],
  [0.975, 1.959963984540054],
  [0.999, 3.090232306167813],
])("the normal quantile at %d is %d to 1e-14", (p, z) => {
  expect(Math.abs(normalQuantile(p) / z - 1)).toBeLessThan(1e-14);
});

test("the normal quantile is where the integral of the density reaches the probability", () => {
  for (const p of [0.5001, 0.55, 0.7, 0.9, 0.92, 0.93, 0.99]) {
    const z = normalQuantile(p);
    const edges = Array.from({ length: 11 }, (_, i) => (i * z) / 10);
    expect(Math.abs(0.5 + integratePanels(density, edges) - p)).toBeLessThan(1e-15);
  }
});

test("the normal quantile is where the continued fraction of the tail gives the probability", () => {
  for (const p of [0.01, 1e-4, 1e-9, 1e-11, 1e-12, 1e-40, 1e-200]) {
    expect(Math.abs(upperTail(-normalQuantile(p)) / p - 1)).toBeLessThan(1e-12);
  }
});

test("the normal quantile is odd about one half, infinite at the ends and refused beyond", () => {
  expect(normalQuantile(0.5)).toBe(0);
  expect(normalQuantile(0.25)).toBe(-normalQuantile(0.75));
  expect(normalQuantile(0)).toBe(-Infinity);
  expect(normalQuantile(1)).toBe(Infinity);
  expect(() => normalQuantile(-0.1)).toThrow(RangeError);
  expect(() => normalQuantile(NaN)).toThrow(RangeError);
});
