import type { RateLaw } from "../kinetics/rateLaw.js";
import { amountPower, amountPowerSlope } from "../thermal/reactionRate.js";

/** alpha^m with m < 1 goes linearly to zero below a billionth of this. */
const smallProgress = 1e-6;

/**
 * f(alpha) of a decomposition's law for an integration that runs to its end: like `lawValue` inside, but
 * continued oddly beyond alpha = 1, where a step may land, so that the solution is pulled back; and with powers
 * below one, zero order above all, falling linearly over the last billionth, so that they stop at 1 by themselves.
 *
 * @param law rate law
 * @param alpha progress; may lie a rounding outside [0, 1]
 * @returns dimensionless
 */
export function continuedLaw(law: RateLaw, alpha: number): number {
  const left = amountPower(1 - alpha, law.order, 1);
  return law.autocatalytic
    ? left * (law.initiation + amountPower(alpha, law.productOrder, smallProgress))
    : left;
}

/**
 * d f/d alpha of `continuedLaw`.
 *
 * @param law rate law
 * @param alpha progress
 * @returns dimensionless
 */
export function continuedLawSlope(law: RateLaw, alpha: number): number {
  const leftSlope = -amountPowerSlope(1 - alpha, law.order, 1);
  if (!law.autocatalytic) return leftSlope;
  const left = amountPower(1 - alpha, law.order, 1);
  const made = law.initiation + amountPower(alpha, law.productOrder, smallProgress);
  return leftSlope * made + left * amountPowerSlope(alpha, law.productOrder, smallProgress);
}
