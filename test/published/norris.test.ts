import { expect, test } from "vitest";
import { fitLine } from "../../server/numeric/leastSquares.js";

// NIST Statistical Reference Datasets, linear regression, Norris.dat (calibration of ozone monitors, lower
// level of difficulty, observed data): certified values to 15 digits.
const x = [
  0.2, 337.4, 118.2, 884.6, 10.1, 226.5, 666.3, 996.3, 448.6, 777.0, 558.2, 0.4, 0.6, 775.5, 666.9, 338.0,
  447.5, 11.6, 556.0, 228.1, 995.8, 887.6, 120.2, 0.3, 0.3, 556.8, 339.1, 887.2, 999.0, 779.0, 11.1, 118.3,
  229.2, 669.1, 448.9, 0.5,
];
const y = [
  0.1, 338.8, 118.1, 888.0, 9.2, 228.1, 668.5, 998.5, 449.1, 778.9, 559.2, 0.3, 0.1, 778.1, 668.8, 339.3,
  448.9, 10.8, 557.7, 228.3, 998.0, 888.8, 119.6, 0.3, 0.6, 557.6, 339.3, 888.0, 998.5, 778.9, 10.2, 117.6,
  228.9, 668.4, 449.2, 0.2,
];

const line = fitLine(x, y);

test.each([
  ["intercept", line.intercept, -0.262323073774029],
  ["slope", line.slope, 1.00211681802045],
  ["standard deviation of the intercept", line.interceptError, 0.232818234301152],
  ["standard deviation of the slope", line.slopeError, 0.000429796848199937],
  ["residual standard deviation", line.residualStandardDeviation, 0.884796396144373],
  ["residual sum of squares", line.residualSumOfSquares, 26.6173985294224],
  ["residual mean square", line.unitVariance, 0.782864662630069],
  ["regression sum of squares", line.slope ** 2 * line.spread, 4255954.13232369],
  ["F statistic", (line.slope ** 2 * line.spread) / line.unitVariance, 5436385.54079785],
  [
    "R squared",
    (line.slope ** 2 * line.spread) / (line.slope ** 2 * line.spread + line.residualSumOfSquares),
    0.999993745883712,
  ],
])("the Norris %s equals the certified one to 12 digits", (_, ours, certified) => {
  expect(Math.abs(ours / certified - 1)).toBeLessThan(5e-13);
});

test("the Norris line has the certified degrees of freedom", () => {
  expect(line.degreesOfFreedom).toBe(34);
});
