/** A straight line y = intercept + slope x fitted by least squares, as plain data. */
export interface Line {
  readonly intercept: number;
  readonly slope: number;
  readonly interceptError: number;
  readonly slopeError: number;
  /** of intercept and slope */
  readonly covariance: number;
  /** of intercept and slope; depends on where the x lie, not on y */
  readonly correlation: number;
  /** points less two */
  readonly degreesOfFreedom: number;
  /** sum of weight times squared residual; chi squared where standard deviations are given */
  readonly residualSumOfSquares: number;
  /** scatter of y about the line; with standard deviations given, that of a point of mean weight */
  readonly residualStandardDeviation: number;
  /** weighted means of x and y: the line passes through them */
  readonly centre: { readonly x: number; readonly y: number };
  /** sum of the weights (the number of points where none is given) */
  readonly totalWeight: number;
  /** weighted sum of (x - centre.x)^2 */
  readonly spread: number;
  /** variance of a point of weight 1 on which all errors rest */
  readonly unitVariance: number;
  /** at each point, in the order given */
  readonly fitted: readonly number[];
  /** y - fitted */
  readonly residuals: readonly number[];
  /** share of each point in its own fitted value, 0 to 1; they sum to 2 */
  readonly leverages: readonly number[];
}

/**
 * Straight line through points (x, y) by least squares, centred on the weighted means before solving.
 *
 * Without standard deviations every point weighs 1 and the errors rest on the scatter about the line.
 * With them the weights are 1/s^2, and the covariance is scaled by max(1, chi^2/dof): scatter beyond
 * the stated errors widens the result, scatter below them never narrows it.
 *
 * @param standardDeviations of each y, > 0
 * @throws RangeError with fewer than three points, a single x, or what is not finite
 * @see Draper & Smith, Applied Regression Analysis, ch. 1; Bevington & Robinson, Data Reduction and Error
 * Analysis, ch. 6 (weights)
 */
export function fitLine(
  x: readonly number[],
  y: readonly number[],
  standardDeviations?: readonly number[],
): Line {
  const count = x.length;
  if (count < 3 || y.length !== count || (standardDeviations?.length ?? count) !== count) {
    throw new RangeError(`A line with its errors needs three points or more, not ${count}`);
  }
  const weights = x.map((_, i) => (standardDeviations === undefined ? 1 : 1 / standardDeviations[i] ** 2));
  const sum = (term: (i: number) => number) => {
    let total = 0;
    for (let i = 0; i < count; i++) total += weights[i] * term(i);
    return total;
  };
  const totalWeight = sum(() => 1);
  const roughX = sum((i) => x[i]) / totalWeight;
  const roughY = sum((i) => y[i]) / totalWeight;
  // A second pass takes out what rounding left in the means.
  const centreX = roughX + sum((i) => x[i] - roughX) / totalWeight;
  const centreY = roughY + sum((i) => y[i] - roughY) / totalWeight;
  const spread = sum((i) => (x[i] - centreX) ** 2);
  const slope = sum((i) => (x[i] - centreX) * (y[i] - centreY)) / spread;
  const residuals = x.map((each, i) => y[i] - centreY - slope * (each - centreX));
  const residualSumOfSquares = sum((i) => residuals[i] ** 2);
  const degreesOfFreedom = count - 2;
  const perFreedom = residualSumOfSquares / degreesOfFreedom;
  if (!(spread > 0) || !Number.isFinite(spread) || !Number.isFinite(perFreedom)) {
    throw new RangeError("A line needs finite points at two or more different x");
  }
  const unitVariance = standardDeviations === undefined ? perFreedom : Math.max(1, perFreedom);
  const ownVariance = spread / totalWeight + centreX ** 2;
  return {
    intercept: centreY - slope * centreX,
    slope,
    interceptError: Math.sqrt((unitVariance * ownVariance) / spread),
    slopeError: Math.sqrt(unitVariance / spread),
    covariance: (-unitVariance * centreX) / spread,
    correlation: -centreX / Math.sqrt(ownVariance),
    degreesOfFreedom,
    residualSumOfSquares,
    residualStandardDeviation: Math.sqrt((perFreedom * count) / totalWeight),
    centre: { x: centreX, y: centreY },
    totalWeight,
    spread,
    unitVariance,
    fitted: x.map((each) => centreY + slope * (each - centreX)),
    residuals,
    leverages: x.map((each, i) => weights[i] * (1 / totalWeight + (each - centreX) ** 2 / spread)),
  };
}

/** A point of a fitted line and the standard error of the mean response there. */
export interface MeanResponse {
  readonly value: number;
  readonly standardError: number;
}

/**
 * Value of the line at x with its standard error,
 * s^2(x) = unitVariance [1/totalWeight + (x - centre)^2/spread].
 *
 * @param x may lie outside the points: the error then grows with the distance, but only as far as the line holds
 * @see Draper & Smith, Applied Regression Analysis, section 1.4
 */
export function meanResponse(line: Line, x: number): MeanResponse {
  const away = x - line.centre.x;
  return {
    value: line.centre.y + line.slope * away,
    standardError: Math.sqrt(line.unitVariance * (1 / line.totalWeight + away ** 2 / line.spread)),
  };
}
