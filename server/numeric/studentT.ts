import { findRoot } from "./roots.js";

/**
 * Probability that Student's t lies further from zero than |t|, both tails together: the p-value of a
 * two-sided t-test. Good to 1e-13 of itself, in the tails too.
 *
 * It is the incomplete beta function I_x(nu/2, 1/2) at x = nu/(nu + t^2), by its continued fraction.
 *
 * @param t any number; infinite gives 0
 * @param degreesOfFreedom nu, a whole number from 1
 * @throws RangeError where nu is not a whole number from 1, or t not a number
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions, 26.7.1 and 26.5.8
 */
export function twoSidedP(t: number, degreesOfFreedom: number): number {
  const nu = degreesOfFreedom;
  if (!Number.isInteger(nu) || nu < 1 || Number.isNaN(t)) {
    throw new RangeError(`Student's t needs a number and whole degrees of freedom, not ${t} and ${nu}`);
  }
  if (!Number.isFinite(t)) return 0;
  if (t === 0) return 1;
  const ratio = (t * t) / nu;
  const x = 1 / (1 + ratio);
  const rest = ratio * x;
  // x^(nu/2) (1 - x)^(1/2) / B(nu/2, 1/2)
  const front = Math.exp(-0.5 * nu * Math.log1p(ratio)) * Math.sqrt(rest) * inverseBeta(nu);
  return x < (0.5 * nu + 1) / (0.5 * nu + 2.5)
    ? front / (0.5 * nu * betaFraction(x, 0.5 * nu, 0.5))
    : 1 - front / (0.5 * betaFraction(rest, 0.5, 0.5 * nu));
}

/** 1/B(nu/2, 1/2) = Gamma((nu+1)/2)/(Gamma(nu/2) sqrt(pi)), by its exact steps of two in nu. */
function inverseBeta(nu: number): number {
  const odd = nu % 2 === 1;
  let value = odd ? 1 / Math.PI : 0.5;
  for (let k = odd ? 3 : 4; k <= nu; k += 2) value *= (k - 1) / (k - 2);
  return value;
}

/** Continued fraction of the incomplete beta function, evaluated by Lentz's method (A&S 26.5.8). */
function betaFraction(x: number, a: number, b: number): number {
  let value = 1;
  let c = 1;
  let d = 0;
  for (let i = 1; i < 10_000; i++) {
    const m = Math.floor(i / 2);
    const term =
      i % 2 === 0
        ? (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
        : (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / (1 + term * d);
    c = 1 + term / c;
    const change = c * d;
    value *= change;
    if (Math.abs(change - 1) <= Number.EPSILON) break;
  }
  return value;
}

/**
 * Distribution function of Student's t: the probability of a value below t.
 *
 * @param degreesOfFreedom a whole number from 1
 * @throws RangeError as `twoSidedP`
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions, 26.7.1
 */
export function studentTDistribution(t: number, degreesOfFreedom: number): number {
  const tail = 0.5 * twoSidedP(t, degreesOfFreedom);
  return t < 0 ? tail : 1 - tail;
}

/**
 * Quantile of Student's t: the t below which lies the given probability. Good to about 1e-13 of itself.
 *
 * @param probability strictly between 0 and 1
 * @param degreesOfFreedom a whole number from 1
 * @throws RangeError where either is outside these bounds
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions, table 26.10
 */
export function studentTQuantile(probability: number, degreesOfFreedom: number): number {
  if (!(probability > 0 && probability < 1)) {
    throw new RangeError(`A quantile needs a probability between 0 and 1, not ${probability}`);
  }
  const upper = probability > 0.5;
  // 1 - p is exact from 0.5 up, so both sides keep all their digits.
  const tails = 2 * (upper ? 1 - probability : probability);
  if (tails === 1) return 0;
  let far = 2;
  while (twoSidedP(far, degreesOfFreedom) > tails) far *= 2;
  const size = findRoot((t) => twoSidedP(t, degreesOfFreedom) / tails - 1, far > 2 ? far / 2 : 0, far);
  return upper ? size : -size;
}

const familiar = new Map<number, number>();

/**
 * Half-width of a two-sided 95 % interval in standard errors: Student's t with the given degrees of
 * freedom, 1.960 of the normal distribution where they are unknown.
 *
 * @param degreesOfFreedom a whole number from 1, or null
 * @throws RangeError where they are neither
 */
export function coverage95(degreesOfFreedom: number | null): number {
  if (degreesOfFreedom === null) return 1.959963984540054;
  const known = familiar.get(degreesOfFreedom);
  if (known !== undefined) return known;
  const value = studentTQuantile(0.975, degreesOfFreedom);
  familiar.set(degreesOfFreedom, value);
  return value;
}
