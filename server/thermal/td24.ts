import { apparentActivationEnergy } from "../kinetics/rateConstant.js";
import { gasConstant } from "../numeric/constants.js";
import { findRoot } from "../numeric/roots.js";
import { type Accuracy, type Runaway, timeToMaximumRate } from "./runaway.js";

/** 24 h in s. */
export const day = 86_400;

/** The span in which T_D24 is looked for, K. */
export const td24Range: readonly [number, number] = [180, 800];

/**
 * T_D24: the temperature from which fresh material has an adiabatic time to maximum rate of 24 h.
 *
 * @param runaway decomposition kinetics and rise
 * @param guess K, where the search begins
 * @param accuracy "full" is good to the last digits, "draws" to 0.001 K
 * @returns K, or null where it lies outside 180 to 800 K
 * @see Stoessel 2008, Thermal Safety of Chemical Processes
 */
export function td24(runaway: Runaway, guess = 400, accuracy: Accuracy = "full"): number | null {
  const lnDays = (inverse: number): number =>
    Math.log(timeToMaximumRate(runaway, 1 / inverse, 0, accuracy).time / day);
  // A secant's next step is smaller by three orders at least: past 1e-5 of T it is not worth an evaluation.
  const tolerance = accuracy === "full" ? 1e-13 : 1e-5;
  return secantInInverse(runaway, lnDays, guess, tolerance) ?? bracketed(lnDays);
}

/** ln TMRad is nearly straight in 1/T: a secant from the guess needs three or four evaluations. */
function secantInInverse(
  runaway: Runaway,
  lnDays: (inverse: number) => number,
  guess: number,
  tolerance: number,
): number | null {
  let x = 1 / guess;
  let y = lnDays(x);
  let slope = apparentActivationEnergy(runaway.rate, guess) / gasConstant + 2 * guess;
  for (let i = 0; i < 20; i += 1) {
    if (!(Number.isFinite(y) && slope > 0)) return null;
    const next = x - y / slope;
    if (!(next > 1 / td24Range[1] && next < 1 / td24Range[0])) return null;
    if (Math.abs(next - x) <= tolerance * next) return 1 / next;
    const nextY = lnDays(next);
    if (nextY === 0) return 1 / next;
    slope = (nextY - y) / (next - x);
    x = next;
    y = nextY;
  }
  return null;
}

function bracketed(lnDays: (inverse: number) => number): number | null {
  // Times beyond the range of doubles still have a sign, which is all that a bracket needs.
  const bounded = (inverse: number): number => Math.min(Math.max(lnDays(inverse), -700), 700);
  const cold = 1 / td24Range[0];
  const hot = 1 / td24Range[1];
  if (!(bounded(cold) > 0 && bounded(hot) < 0)) return null;
  return 1 / findRoot(bounded, hot, cold, { tolerance: 1e-16 });
}
