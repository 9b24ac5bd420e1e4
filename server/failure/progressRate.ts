import type { RateLaw } from "../kinetics/rateLaw.js";
import { amountPower, amountPowerSlope } from "../thermal/reactionRate.js";

/** alpha^m with m < 1 goes linearly to zero below `linearPart` of this: an initiation may be small itself. */
const smallProgress = 1e-6;

/**
 * f(alpha) of a decomposition's law for an integration that runs to its end: like `lawValue` inside, but
 * continued oddly beyond alpha = 1, where a step may land, so that the solution is pulled back; and with powers
 * below one, zero order above all, falling linearly over the last part, so that they stop at 1 by themselves.
 *
 * @param law rate law
 * @param alpha progress; may lie a rounding outside [0, 1]
 * @param scale of the last part over which they fall, in units of `linearPart`
 * @returns dimensionless
 */
export function continuedLaw(law: RateLaw, alpha: number, scale = 1): number {
  const left = amountPower(1 - alpha, law.order, scale);
  return law.autocatalytic
    ? left * (law.initiation + amountPower(alpha, law.productOrder, smallProgress))
    : left;
}

/**
 * d f/d alpha of `continuedLaw`.
 *
 * @param law rate law
 * @param alpha progress
 * @param scale as there
 * @returns dimensionless
 */
export function continuedLawSlope(law: RateLaw, alpha: number, scale = 1): number {
  const leftSlope = -amountPowerSlope(1 - alpha, law.order, scale);
  if (!law.autocatalytic) return leftSlope;
  const left = amountPower(1 - alpha, law.order, scale);
  const made = law.initiation + amountPower(alpha, law.productOrder, smallProgress);
  return leftSlope * made + left * amountPowerSlope(alpha, law.productOrder, smallProgress);
}
