import { describe, expect, test } from "vitest";
import { fitLine, meanResponse } from "../../server/numeric/leastSquares.js";

const x = [1, 2, 3.5, 4, 7];
const y = [2.1, 3.9, 7.4, 7.7, 14.6];

/** The normal equations without centring: another road to the same line. */
function plainSums(weights: readonly number[]) {
  let [w, wx, wy, wxx, wxy] = [0, 0, 0, 0, 0];
  x.forEach((each, i) => {
    w += weights[i];
    wx += weights[i] * each;
    wy += weights[i] * y[i];
    wxx += weights[i] * each * each;
    wxy += weights[i] * each * y[i];
  });
  const determinant = w * wxx - wx * wx;
  return {
    intercept: (wxx * wy - wx * wxy) / determinant,
    slope: (w * wxy - wx * wy) / determinant,
    // inverse of the normal matrix
    inverse: [wxx / determinant, -wx / determinant, w / determinant],
  };
}

describe("a line through points of equal weight", () => {
  const line = fitLine(x, y);
  const plain = plainSums([1, 1, 1, 1, 1]);

  test("solves the normal equations", () => {
    expect(line.intercept).toBeCloseTo(plain.intercept, 12);
    expect(line.slope).toBeCloseTo(plain.slope, 12);
  });

  test("has the covariance of the inverse normal matrix", () => {
    const variance = line.residualSumOfSquares / 3;
    expect(line.interceptError ** 2).toBeCloseTo(variance * plain.inverse[0], 13);
    expect(line.covariance).toBeCloseTo(variance * plain.inverse[1], 13);
    expect(line.slopeError ** 2).toBeCloseTo(variance * plain.inverse[2], 13);
    expect(line.correlation).toBeCloseTo(line.covariance / line.interceptError / line.slopeError, 13);
  });

  test("leaves residuals that vanish in sum and in moment", () => {
    expect(line.residuals.reduce((sum, each) => sum + each)).toBeCloseTo(0, 12);
    expect(line.residuals.reduce((sum, each, i) => sum + each * x[i], 0)).toBeCloseTo(0, 12);
  });

  test("has leverages that sum to its two parameters and follow from its own response to a moved point", () => {
    expect(line.leverages.reduce((sum, each) => sum + each)).toBeCloseTo(2, 13);
    x.forEach((_, i) => {
      const moved = fitLine(
        x,
        y.map((each, j) => (i === j ? each + 1 : each)),
      );
      expect(line.leverages[i]).toBeCloseTo(moved.fitted[i] - line.fitted[i], 12);
    });
  });

  test("has at each point a mean response with the leverage as its variance", () => {
    x.forEach((each, i) => {
      const { value, standardError } = meanResponse(line, each);
      expect(value).toBeCloseTo(line.fitted[i], 13);
      expect(standardError ** 2).toBeCloseTo(line.unitVariance * line.leverages[i], 13);
    });
  });

  test("has the mean response of a linear combination of its correlated parameters", () => {
    for (const at of [-3, 0, 2.2, 40]) {
      const variance = line.interceptError ** 2 + at ** 2 * line.slopeError ** 2 + 2 * at * line.covariance;
      expect(meanResponse(line, at).value).toBeCloseTo(line.intercept + line.slope * at, 12);
      expect(meanResponse(line, at).standardError).toBeCloseTo(Math.sqrt(variance), 12);
    }
  });
});

describe("a line through points with stated standard deviations", () => {
  const stated = [0.1, 0.2, 0.4, 0.1, 0.3];
  const line = fitLine(x, y, stated);
  const plain = plainSums(stated.map((each) => 1 / each ** 2));

  test("weighs them by the inverse square", () => {
    expect(line.intercept).toBeCloseTo(plain.intercept, 12);
    expect(line.slope).toBeCloseTo(plain.slope, 12);
  });

  test("rests its errors on the stated ones where the points scatter less", () => {
    const wide = fitLine(
      x,
      y,
      stated.map((each) => 100 * each),
    );
    expect(wide.residualSumOfSquares / 3).toBeLessThan(1);
    expect(wide.unitVariance).toBe(1);
    expect(wide.slopeError ** 2 / plain.inverse[2]).toBeCloseTo(1e4, 6);
  });

  test("widens them where the points scatter more", () => {
    const narrow = fitLine(
      x,
      y,
      stated.map((each) => each / 100),
    );
    expect(narrow.unitVariance).toBeCloseTo((1e4 * line.residualSumOfSquares) / 3, 6);
    expect(narrow.slopeError).toBeCloseTo(Math.sqrt((plain.inverse[2] * line.residualSumOfSquares) / 3), 12);
  });

  test("with equal ones is the line of equal weights, with the same scatter", () => {
    const equal = fitLine(x, y, [0.25, 0.25, 0.25, 0.25, 0.25]);
    expect(equal.slope).toBeCloseTo(fitLine(x, y).slope, 13);
    expect(equal.residualStandardDeviation).toBeCloseTo(fitLine(x, y).residualStandardDeviation, 13);
  });
});

test("a line keeps its digits where x are far from zero and close together", () => {
  const offset = 2 ** 40;
  const line = fitLine(
    x.map((each) => each + offset),
    y,
  );
  expect(line.slope).toBeCloseTo(fitLine(x, y).slope, 13);
  expect(line.slopeError).toBeCloseTo(fitLine(x, y).slopeError, 13);
});

test("a line is refused without three points, without two different x, and without finite numbers", () => {
  expect(() => fitLine([1, 2], [1, 2])).toThrow(RangeError);
  expect(() => fitLine([1, 1, 1], [1, 2, 3])).toThrow(RangeError);
  expect(() => fitLine([1, 2, 3], [1, 2])).toThrow(RangeError);
  expect(() => fitLine([1, 2, 3], [1, 2, NaN])).toThrow(RangeError);
  expect(() => fitLine([1, 2, 3], [1, 2, 3], [1, 1, 0])).toThrow(RangeError);
});
