import { gasConstant } from "../numeric/constants.js";
import { lnVariance, type PairCovariance } from "./interval.js";

/**
 * Variance of ln k at one temperature after one more rate constant was measured at another. The covariance S of
 * (ln A, E) becomes S - S x x' S/(s^2 + x' S x), x = (1, -1/(R T')), and so
 * var = (s^2 v(T) + det S [1/(R T) - 1/(R T')]^2)/(s^2 + v(T')), v(T) the variance before. In this form nothing
 * cancels however close the correlation is to one.
 *
 * @param covariance of ln A and E, in J and mol
 * @param matters T at which ln k matters, K
 * @param measured T' of the new rate constant, K
 * @param relativeError s, standard error of the new k over k, > 0
 * @returns dimensionless, >= 0
 * @see Sherman & Morrison 1950, Ann. Math. Stat. 21:124 (the update; citation from memory); rearranged
 * by Lagrange's identity
 */
export function varianceAfter(
  covariance: PairCovariance,
  matters: number,
  measured: number,
  relativeError: number,
): number {
  const apart = (1 / matters - 1 / measured) / gasConstant;
  const own = relativeError ** 2;
  return (
    (own * lnVariance(covariance, matters) + determinant(covariance) * apart ** 2) /
    (own + lnVariance(covariance, measured))
  );
}

/**
 * Temperature within a range at which one more rate constant leaves the least variance of ln k where it matters.
 * With z = 1/(R T') - 1/(R T) the variance is a ratio of two quadratics in z: it is least at an end of the range
 * or where d D1 z^2 + 2 (d D0 - N0 c) z - N0 D1 = 0, N = N0 + d z^2 over D = D0 + D1 z + c z^2.
 *
 * @param covariance of ln A and E, in J and mol
 * @param matters T at which ln k matters, K
 * @param range lowest and highest T' that can be measured, K
 * @param relativeError s of the new rate constant, > 0
 * @returns K
 */
export function bestMeasurement(
  covariance: PairCovariance,
  matters: number,
  range: readonly [number, number],
  relativeError: number,
): number {
  const inverse = 1 / (gasConstant * matters);
  const own = relativeError ** 2;
  const variance = lnVariance(covariance, matters);
  const slope = 2 * (covariance.barrier * inverse - covariance.both);
  const det = determinant(covariance);
  const stationary = quadraticRoots(
    det * slope,
    2 * (det * (own + variance) - own * variance * covariance.barrier),
    -own * variance * slope,
  )
    .map((z) => 1 / (gasConstant * (inverse + z)))
    .filter((temperature) => temperature > range[0] && temperature < range[1]);
  const left = (temperature: number) => varianceAfter(covariance, matters, temperature, relativeError);
  return [range[1], ...stationary].reduce((best, each) => (left(each) < left(best) ? each : best), range[0]);
}

function determinant({ intercept, barrier, both }: PairCovariance): number {
  return Math.max(0, intercept * barrier - both ** 2);
}

/** Real roots of a z^2 + b z + c, each without cancellation. */
function quadraticRoots(a: number, b: number, c: number): number[] {
  const inside = b * b - 4 * a * c;
  if (!(inside >= 0)) return [];
  const q = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(inside));
  return [q / a, c / q].filter(Number.isFinite);
}
