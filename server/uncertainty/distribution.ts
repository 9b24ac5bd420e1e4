import type { Estimate } from "../numeric/estimate.js";

/**
 * Value of a normal quantity at a standard normal score, v + s z. Temperatures, energies, entropies, heats of
 * reaction and orders are drawn so.
 *
 * @param estimate v and s, SI; without s every score gives v
 * @param score z
 */
export function normalValue(estimate: Estimate, score: number): number {
  return estimate.value + (estimate.standardError ?? 0) * score;
}

/**
 * Value of a log-normal quantity at a standard normal score, v exp(sigma z), with the median v and the standard
 * deviation s exactly. Amounts, masses, heat capacities, densities, heat transfer coefficients and areas, heats
 * of decomposition, flows, reference rate constants and the initiation are drawn so.
 *
 * @param estimate v and s, SI; without s every score gives v. A v that is not positive has no such
 * distribution: drawn as a normal one, not below zero
 * @param score z
 * @see Johnson, Kotz & Balakrishnan, Continuous Univariate Distributions, vol. 1, ch. 14 (moments)
 */
export function logNormalValue(estimate: Estimate, score: number): number {
  const { value, standardError } = estimate;
  if (standardError === null || standardError === 0) return value;
  if (!(value > 0)) return Math.max(0, normalValue(estimate, score));
  return value * Math.exp(logDeviation(standardError / value) * score);
}

/**
 * Standard deviation of the logarithm of a log-normal quantity,
 * sigma^2 = ln((1 + sqrt(1 + 4 r^2))/2), from its standard deviation over its median.
 *
 * @param relativeError r = s/v, >= 0
 */
export function logDeviation(relativeError: number): number {
  // (sqrt(1 + 4 r^2) - 1)/2 in a form that keeps its digits where r is small.
  const squared = relativeError ** 2;
  return Math.sqrt(Math.log1p((2 * squared) / (1 + Math.sqrt(1 + 4 * squared))));
}
