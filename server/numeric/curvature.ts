import { fitLine } from "./leastSquares.js";
import { twoSidedP } from "./studentT.js";

/**
 * t-test of the quadratic term: the chance that points on a straight line would bend as much as these do.
 *
 * The quadratic is taken orthogonal to the line, so that its coefficient and the scatter left beside it
 * come without solving for three parameters. Weights and stated errors count as in `fitLine`.
 *
 * @param standardDeviations of each y, > 0
 * @returns two-sided p of the quadratic coefficient, one degree of freedom fewer than the line has; null
 * where fewer than four points or fewer than three different x leave nothing to test. Points that lie on
 * their line to rounding give 1.
 * @throws RangeError as `fitLine`
 * @see Draper & Smith, Applied Regression Analysis, ch. on orthogonal polynomials
 */
export function quadraticTermP(
  x: readonly number[],
  y: readonly number[],
  standardDeviations?: readonly number[],
): number | null {
  if (x.length < 4 || new Set(x).size < 3) return null;
  const line = fitLine(x, y, standardDeviations);
  const weights = x.map((_, i) => (standardDeviations === undefined ? 1 : 1 / standardDeviations[i] ** 2));
  // In units of the spread of x, so that squares and cubes keep their digits.
  const unit = Math.sqrt(line.spread / line.totalWeight);
  const u = x.map((each) => (each - line.centre.x) / unit);
  const skew = u.reduce((sum, each, i) => sum + weights[i] * each ** 3, 0) / line.totalWeight;
  const bend = u.map((each) => each ** 2 - 1 - skew * each);
  const bendSpread = bend.reduce((sum, each, i) => sum + weights[i] * each ** 2, 0);
  const along = bend.reduce((sum, each, i) => sum + weights[i] * each * line.residuals[i], 0);
  const explained = along ** 2 / bendSpread;
  const size = y.reduce((sum, each, i) => sum + weights[i] * each ** 2, 0);
  if (line.residualSumOfSquares <= 1e-26 * size) return 1;
  const degreesOfFreedom = line.degreesOfFreedom - 1;
  const perFreedom = Math.max(0, line.residualSumOfSquares - explained) / degreesOfFreedom;
  const variance = standardDeviations === undefined ? perFreedom : Math.max(1, perFreedom);
  return twoSidedP(Math.sqrt(explained / variance), degreesOfFreedom);
}
