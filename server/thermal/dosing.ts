import { lnRateConstant, type ModifiedArrhenius } from "../kinetics/rateConstant.js";
import { findRoot } from "../numeric/roots.js";
import { adiabaticRise, fedMass, heatCapacityOf } from "./balance.js";
import {
  type FeedRun,
  type IsothermalBalance,
  isothermalBalance,
  runFeed,
  stoichiometricTime,
} from "./isothermal.js";
import type { Step } from "./step.js";

/** A moment of the step and a value that is largest there. */
export interface Extreme {
  readonly value: number;
  /** s from the start of the feed */
  readonly at: number;
}

/** What the limits on a step need to know of it at one constant temperature. */
export interface DosingFigures {
  /** largest rise that the accumulation could still bring, K: MTSR less the process temperature */
  readonly rise: number;
  /** largest rate of the reaction, mol/s, and its time, s from the start of the feed */
  readonly fastest: Extreme;
  /** rate of the reaction at the end of the feed, mol/s; for a batch that of the start */
  readonly endRate: number;
}

/** The rate of reaction over the feed. */
export interface RateCourse {
  /** s, ascending from 0 to the end of the feed, close enough that the rate turns at most once between two */
  readonly times: readonly number[];
  /** at `times`, mol/s */
  readonly rates: ArrayLike<number>;
  /** mol/s */
  rateAt(time: number): number;
}

/** What the desired reaction does at one constant temperature. */
export interface Dosing {
  readonly balance: IsothermalBalance;
  /** largest accumulation, part of the limiting amount */
  readonly accumulation: Extreme;
  /** largest rise that the accumulation could still bring, K: MTSR less the process temperature; not below a measured one */
  readonly rise: Extreme;
  /** largest rate of the reaction, mol/s */
  readonly fastest: Extreme & { readonly extent: number };
  /** extent at the end of the feed, part of the limiting amount; 0 for a batch */
  readonly endExtent: number;
  /** rate of the reaction at the end of the feed, mol/s; for a batch that of the start */
  readonly endRate: number;
  /** null for a batch */
  readonly run: FeedRun | null;
}

/**
 * The isothermal step: accumulation, the rise it holds and the largest rate of reaction, each located on the
 * continuous solution. The feed is taken to stop with the cooling.
 *
 * @param step SI numbers, with a rate constant
 * @param rate of the desired reaction
 * @param temperature K
 * @param relativeTolerance of the integration
 * @returns null where the balance could not be integrated
 * @see Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008
 */
export function doseAt(
  step: Step,
  rate: ModifiedArrhenius,
  temperature: number,
  relativeTolerance = 1e-8,
): Dosing | null {
  const balance = isothermalBalance(step, lnRateConstant(rate, temperature));
  if (step.reaction.feed === null) {
    const initialRate = balance.limiting * balance.rate(0, 0);
    return {
      balance,
      accumulation: { value: 1, at: 0 },
      rise: { value: adiabaticRise(step), at: 0 },
      fastest: { value: initialRate, at: 0, extent: 0 },
      endExtent: 0,
      endRate: initialRate,
      run: null,
    };
  }
  const run = runFeed(balance, relativeTolerance);
  if (run === null) return null;
  // After the stoichiometric point nothing adds to the accumulation: its largest values lie before.
  const accumulation = largest(
    run,
    stoichiometricTime(balance),
    (time, extent) => accumulated(balance, time, extent),
    (time, extent) => gain(balance, time, extent),
  );
  const rise = largestRise(step, balance, run);
  const fastest = largest(
    run,
    balance.feedEnd,
    (time, extent) => balance.limiting * balance.rate(time, extent),
    (time, extent) => balance.rateSlope(time, extent),
  );
  const endExtent = run.extents[run.extents.length - 1];
  return {
    balance,
    accumulation,
    rise: { value: rise.value + step.reaction.measuredExcess, at: rise.at },
    fastest: { ...fastest, extent: run.extentAt(fastest.at) },
    endExtent,
    endRate: balance.limiting * balance.rate(balance.feedEnd, endExtent),
    run,
  };
}

/** Part of the limiting amount that has been fed, could react and has not. */
function accumulated(balance: IsothermalBalance, time: number, extent: number): number {
  return Math.max(0, Math.min(balance.fed(time), balance.charged) - extent);
}

/** How fast the accumulation grows before the stoichiometric point, 1/s. */
function gain(balance: IsothermalBalance, time: number, extent: number): number {
  return balance.feedRate - balance.rate(time, extent);
}

/**
 * Largest rise that the accumulation of a semibatch could bring, max over the feed of nacc (-dHr)/C(t).
 *
 * @param step SI numbers; its heat and heat capacities may be others than those of the run
 * @param balance of the run
 * @param run over the feed
 * @returns K, and the time in s from the start of the feed
 * @see Gygax 1988, Chem. Eng. Sci. 43:1759
 */
export function largestRise(step: Step, balance: IsothermalBalance, run: FeedRun): Extreme {
  const { feed, heat: perMol } = step.reaction;
  const heat = balance.limiting * -perMol;
  const capacityAt = (time: number): number => heatCapacityOf(step, fedMass(step, time));
  const capacityRate = feed === null ? 0 : (feed.mass * feed.heatCapacity) / balance.feedEnd;
  return largest(
    run,
    stoichiometricTime(balance),
    (time, extent) => (accumulated(balance, time, extent) * heat) / capacityAt(time),
    (time, extent) =>
      gain(balance, time, extent) * capacityAt(time) - accumulated(balance, time, extent) * capacityRate,
  );
}

/** The rate of reaction over the feed of an isothermal step; null for a batch. */
export function courseOf({ balance, run }: Dosing): RateCourse | null {
  if (run === null) return null;
  return {
    times: run.times,
    rates: run.times.map((time, i) => balance.limiting * balance.rate(time, run.extents[i])),
    rateAt: (time) => balance.limiting * balance.rate(time, run.extentAt(time)),
  };
}

/** The few figures of an isothermal step that its limits need. */
export function figuresOf({ rise, fastest, endRate }: Dosing): DosingFigures {
  return { rise: rise.value, fastest, endRate };
}

/** A function of the time and of the extent that the run has then. */
type AlongRun = (time: number, extent: number) => number;

/**
 * Largest value of a smooth function on [0, end]: at an end, or where its slope turns from rising to falling.
 * Each step of the run is looked at in two halves.
 */
function largest(run: FeedRun, end: number, value: AlongRun, slope: AlongRun): Extreme {
  const { times, extents, extentAt } = run;
  let best: Extreme = { value: value(times[0], extents[0]), at: times[0] };
  const consider = (at: number, extent: number): void => {
    const found = value(at, extent);
    if (found > best.value) best = { value: found, at };
  };
  let last = 0;
  let slopeBefore = slope(times[0], extents[0]);
  for (let i = 1; i < times.length && times[i] <= end; i += 1) {
    const here = slope(times[i], extents[i]);
    if (slopeBefore > 0 && here <= 0) {
      const at = turningPoint((time) => slope(time, extentAt(time)), times[i - 1], times[i]);
      consider(at, extentAt(at));
    }
    slopeBefore = here;
    last = i;
  }
  consider(times[last], extents[last]);
  return best;
}

/** Zero of a slope that falls from positive to negative; rounding may have taken one of the signs away. */
function turningPoint(slope: (time: number) => number, low: number, high: number): number {
  if (!(slope(low) > 0)) return low;
  if (!(slope(high) < 0)) return high;
  return findRoot(slope, low, high, { tolerance: 1e-9 * high });
}
