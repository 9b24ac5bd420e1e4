import { lnRateConstant, type ModifiedArrhenius } from "../kinetics/rateConstant.js";
import { findRoot } from "../numeric/roots.js";
import type { Trajectory } from "../numeric/trajectory.js";
import { adiabaticRise, fedMass, heatCapacityOf } from "./balance.js";
import { type IsothermalBalance, isothermalBalance, runFeed, stoichiometricTime } from "./isothermal.js";
import type { Step } from "./step.js";

/** A moment of the step and a value that is largest there. */
export interface Extreme {
  readonly value: number;
  /** s from the start of the feed */
  readonly at: number;
}

/** What the desired reaction does at one constant temperature. */
export interface Dosing {
  readonly balance: IsothermalBalance;
  /** largest accumulation, part of the limiting amount */
  readonly accumulation: Extreme;
  /** largest rise that the accumulation could still bring, K: MTSR less the process temperature */
  readonly rise: Extreme;
  /** largest rate of the reaction, mol/s */
  readonly fastest: Extreme & { readonly extent: number };
  /** extent at the end of the feed, part of the limiting amount; 0 for a batch */
  readonly endExtent: number;
  /** extent over the feed; null for a batch */
  readonly trajectory: Trajectory | null;
}

/**
 * The isothermal step: accumulation, the rise it holds and the largest rate of reaction, each located on the
 * continuous solution. The feed is taken to stop with the cooling.
 *
 * @param step SI numbers, with a rate constant
 * @param rate of the desired reaction
 * @param temperature K
 * @returns null where the balance could not be integrated
 * @see Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008
 */
export function doseAt(step: Step, rate: ModifiedArrhenius, temperature: number): Dosing | null {
  const balance = isothermalBalance(step, lnRateConstant(rate, temperature));
  if (step.reaction.feed === null) {
    return {
      balance,
      accumulation: { value: 1, at: 0 },
      rise: { value: adiabaticRise(step), at: 0 },
      fastest: { value: balance.limiting * balance.rate(0, 0), at: 0, extent: 0 },
      endExtent: 0,
      trajectory: null,
    };
  }
  const trajectory = runFeed(balance);
  if (trajectory === null) return null;
  const extentAt = (time: number): number => trajectory.component(time, 0);
  const heat = balance.limiting * -step.reaction.heat;
  const capacityAt = (time: number): number => heatCapacityOf(step, fedMass(step, time));
  const capacityRate = (step.reaction.feed.mass * step.reaction.feed.heatCapacity) / balance.feedEnd;
  const accumulated = (time: number): number =>
    Math.max(0, Math.min(balance.fed(time), balance.charged) - extentAt(time));

  // After the stoichiometric point nothing adds to the accumulation: its largest values lie before.
  const stoichiometric = stoichiometricTime(balance);
  const early = trajectory.times().filter((time) => time <= stoichiometric);
  const gain = (time: number): number => balance.feedRate - balance.rate(time, extentAt(time));
  const accumulation = largest(accumulated, gain, early);
  const rise = largest(
    (time) => (accumulated(time) * heat) / capacityAt(time),
    (time) => gain(time) * capacityAt(time) - accumulated(time) * capacityRate,
    early,
  );
  const fastest = largest(
    (time) => balance.limiting * balance.rate(time, extentAt(time)),
    (time) => balance.rateSlope(time, extentAt(time)),
    trajectory.times(),
  );
  return {
    balance,
    accumulation,
    rise,
    fastest: { ...fastest, extent: extentAt(fastest.at) },
    endExtent: extentAt(balance.feedEnd),
    trajectory,
  };
}

/**
 * Largest value of a smooth function on the span of `times`: at an end, or where its slope turns from rising
 * to falling. Each step is looked at in two halves.
 */
function largest(
  value: (time: number) => number,
  slope: (time: number) => number,
  times: Float64Array,
): Extreme {
  let best: Extreme = { value: value(times[0]), at: times[0] };
  const consider = (at: number): void => {
    const found = value(at);
    if (found > best.value) best = { value: found, at };
  };
  let before = times[0];
  let slopeBefore = slope(before);
  for (let i = 1; i < times.length; i += 1) {
    const start = times[i - 1];
    for (const time of [0.5 * (start + times[i]), times[i]]) {
      const here = slope(time);
      if (slopeBefore > 0 && here <= 0) {
        consider(here === 0 ? time : findRoot(slope, before, time, { tolerance: 1e-9 * times[i] }));
      }
      before = time;
      slopeBefore = here;
    }
  }
  consider(times[times.length - 1]);
  return best;
}
