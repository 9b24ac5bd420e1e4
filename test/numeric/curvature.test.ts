import { describe, expect, test } from "vitest";
import { quadraticTermP } from "../../server/numeric/curvature.js";
import { twoSidedP } from "../../server/numeric/studentT.js";

const x = [0.5, 1, 2, 3.5, 4, 6];
const y = [1.2, 1.9, 4.3, 7.1, 8.6, 13.4];

/** t of the quadratic coefficient from the normal equations of all three parameters, by Gaussian elimination. */
function directT(weights: readonly number[], knownVariance: boolean): number {
  const m = [0, 1, 2].map((i) => [
    ...[0, 1, 2].map((j) => x.reduce((sum, each, n) => sum + weights[n] * each ** (i + j), 0)),
    x.reduce((sum, each, n) => sum + weights[n] * each ** i * y[n], 0),
    i === 2 ? 1 : 0,
  ]);
  for (let i = 0; i < 3; i++) {
    const pivot = m[i][i];
    for (let j = i; j < 5; j++) m[i][j] /= pivot;
    for (let k = 0; k < 3; k++) {
      if (k === i) continue;
      const factor = m[k][i];
      for (let j = i; j < 5; j++) m[k][j] -= factor * m[i][j];
    }
  }
  const left = x.reduce(
    (sum, each, n) => sum + weights[n] * (y[n] - m[0][3] - m[1][3] * each - m[2][3] * each ** 2) ** 2,
    0,
  );
  const perFreedom = left / (x.length - 3);
  const variance = knownVariance ? Math.max(1, perFreedom) : perFreedom;
  return m[2][3] / Math.sqrt(m[2][4] * variance);
}

describe("the test of the quadratic term", () => {
  test("equals the t-test of all three parameters solved together", () => {
    const direct = twoSidedP(directT([1, 1, 1, 1, 1, 1], false), 3);
    expect(quadraticTermP(x, y)).toBeCloseTo(direct, 10);
  });

  test.each([0.02, 0.2, 2])("equals it with stated errors about %d", (s) => {
    const stated = [s, 2 * s, s, 0.5 * s, s, s];
    const weights = stated.map((each) => 1 / each ** 2);
    expect(quadraticTermP(x, y, stated)).toBeCloseTo(twoSidedP(directT(weights, true), 3), 10);
  });

  test("finds a bend of a hundredth in points without scatter, and none in a straight line", () => {
    const bent = x.map((each) => 3 - 2 * each + 0.01 * each ** 2);
    expect(quadraticTermP(x, bent)).toBeLessThan(1e-10);
    const straight = x.map((each) => 3 - 2 * each);
    expect(quadraticTermP(x, straight)).toBe(1);
  });

  test("keeps its digits where the x are inverse temperatures", () => {
    const inverse = [320, 330, 340, 350, 360].map((each) => 1 / each);
    const values = [-3, -2.02, -1.01, -0.13, 0.71];
    const scaled = inverse.map((each) => 1e5 * (each - inverse[2]));
    expect(quadraticTermP(inverse, values)).toBeCloseTo(quadraticTermP(scaled, values) ?? NaN, 10);
  });

  test("has nothing to say of fewer than four points or three different x", () => {
    expect(quadraticTermP([1, 2, 3], [1, 2, 4])).toBeNull();
    expect(quadraticTermP([1, 1, 2, 2], [1, 2, 4, 5])).toBeNull();
  });
});
