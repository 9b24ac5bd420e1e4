import { lnRateConstant } from "../kinetics/rateConstant.js";
import { lawLogSlope, lawValue } from "../kinetics/rateLaw.js";
import { gasConstant } from "../numeric/constants.js";
import { findRoot } from "../numeric/roots.js";
import type { Runaway } from "./runaway.js";

/**
 * Progress at which an adiabatic decomposition is fastest: the global maximum of k(T) f(alpha) on
 * [alpha0, 1] with T = T0 + dTad,d (alpha - alpha0). Interior maxima satisfy
 * Ea(T) dTad,d/(R T^2) + d ln f/d alpha = 0.
 *
 * @param runaway decomposition kinetics and rise
 * @param start T0, K
 * @param alpha0 progress at the start
 * @param tolerance of alpha*
 * @returns alpha*; equal to `alpha0` where the rate falls from the start
 * @see Keller et al. 1997, J. Loss Prev. Process Ind. 10:31 (autocatalytic laws)
 */
export function alphaAtLargestRate(
  runaway: Runaway,
  start: number,
  alpha0: number,
  tolerance = 1e-13,
): number {
  const { law, rate, rise } = runaway;
  if (alpha0 >= 1) return alpha0;
  const slope = (alpha: number): number => {
    const temperature = start + rise * (alpha - alpha0);
    const heating =
      rise *
      (rate.activationEnergy / (gasConstant * temperature * temperature) +
        rate.temperaturePower / temperature);
    return heating + lawLogSlope(law, alpha);
  };
  const rateFallsWithHeat = rate.activationEnergy < 0;
  if (law.order === 0 && !rateFallsWithHeat) return 1;
  if (rateFallsWithHeat || (law.autocatalytic && law.productOrder > 1)) {
    return largestBySearch(runaway, start, alpha0, slope);
  }
  // Here the slope falls monotonically, from +infinity at alpha = 0 where m < 1, to -infinity at 1.
  const inside = law.autocatalytic && law.productOrder < 1 ? Math.max(alpha0, 1e-300) : alpha0;
  if (slope(inside) <= 0) return alpha0;
  return findRoot((alpha) => slope(alpha) * (1 - alpha), inside, 1 - 1e-15, { tolerance });
}

/** Edges that crowd at both ends, where a narrow maximum can hide. */
function crowdedEdges(alpha0: number): number[] {
  const edges = [0];
  for (let exponent = -12; exponent < -1; exponent += 0.25) edges.push(10 ** exponent);
  for (let i = 2; i <= 18; i += 1) edges.push(i / 20);
  for (let exponent = -1.25; exponent > -12; exponent -= 0.25) edges.push(1 - 10 ** exponent);
  return edges.map((edge) => alpha0 + edge * (1 - alpha0));
}

function largestBySearch(
  runaway: Runaway,
  start: number,
  alpha0: number,
  slope: (alpha: number) => number,
): number {
  const { law, rate, rise } = runaway;
  const lnRate = (alpha: number): number =>
    lnRateConstant(rate, start + rise * (alpha - alpha0)) + Math.log(lawValue(law, alpha));
  let best = alpha0;
  let bestRate = lnRate(alpha0);
  const consider = (alpha: number): void => {
    const value = lnRate(alpha);
    if (value > bestRate) {
      best = alpha;
      bestRate = value;
    }
  };
  const edges = crowdedEdges(alpha0);
  for (let i = 1; i < edges.length; i += 1) {
    const low = edges[i - 1];
    const high = edges[i];
    if (slope(low) > 0 && slope(high) <= 0) consider(findRoot(slope, low, high, { tolerance: 1e-13 }));
  }
  if (law.order === 0) consider(1);
  return best;
}
