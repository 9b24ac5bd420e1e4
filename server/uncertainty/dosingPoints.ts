import { fromArrhenius } from "../kinetics/rateConstant.js";
import { timeToConversion } from "../thermal/completion.js";
import { type Dosing, doseAt, largestRise } from "../thermal/dosing.js";
import type { Step } from "../thermal/step.js";

/** Places of a point's quantities; times are parts of the feed's duration, rates parts of the largest one. */
export const quantities = { lnFastest: 0, fastestAt: 1, endRate: 2, lnCompletion: 3 } as const;

/** Distance in the logarithm of the ratio of heat capacities. */
export const ratioSpacing = 0.1;

/** Half the narrowest distance of a table's points in ln k: the middles of its cells are points too. */
const unit = 0.02;

/** Integrations of one recipe at evenly spaced ln k, each made once, when it is asked for. */
export interface DosingPoints {
  /** ln k between two indices */
  readonly unit: number;
  /** duration of the feed, s */
  readonly feedEnd: number;
  /** whether all of them could be integrated */
  exist(indices: readonly number[]): boolean;
  value(index: number, quantity: number): number;
  /**
   * Largest rise at the heats and heat capacities of the estimates, but for the ratio of the fed heat capacity to the
   * charged one, which is exp(ratioIndex ratioSpacing) times that of the estimates.
   *
   * @returns K
   */
  rise(index: number, ratioIndex: number): number;
  dosing(index: number): Dosing;
}

interface Point {
  readonly dosing: Dosing;
  readonly values: readonly number[];
  readonly rises: Map<number, number>;
}

/**
 * Starts the points of a recipe.
 *
 * @param nominal the step at its estimates, a semibatch
 */
export function createDosingPoints(nominal: Step): DosingPoints {
  const points = new Map<number, Point | null>();
  const { reaction, limits } = nominal;
  const { feed } = reaction;
  if (feed === null) throw new Error("A batch is not dosed");

  function at(index: number): Point | null {
    const before = points.get(index);
    if (before !== undefined) return before;
    const point = integratedAt(index);
    points.set(index, point);
    return point;
  }

  function integratedAt(index: number): Point | null {
    const dosing = doseAt(nominal, fromArrhenius(unit * index, 0), reaction.temperature);
    if (dosing === null || !(dosing.fastest.value > 0)) return null;
    const { fastest, balance, endRate } = dosing;
    const values = [
      Math.log(fastest.value),
      fastest.at / balance.feedEnd,
      endRate / fastest.value,
      Math.log(timeToConversion(dosing, limits.targetConversion)),
    ];
    return { dosing, values, rises: new Map() };
  }

  function known(index: number): Point {
    const point = at(index);
    if (point === null) throw new Error(`The point ${index} could not be integrated`);
    return point;
  }

  return {
    unit,
    feedEnd: feed.duration,
    exist: (indices) => indices.every((index) => at(index) !== null),
    value: (index, quantity) => known(index).values[quantity],
    rise(index, ratioIndex) {
      const { dosing, rises } = known(index);
      const before = rises.get(ratioIndex);
      if (before !== undefined || dosing.run === null) return before ?? Number.NaN;
      const heatCapacity = feed.heatCapacity * Math.exp(ratioSpacing * ratioIndex);
      const other: Step = { ...nominal, reaction: { ...reaction, feed: { ...feed, heatCapacity } } };
      const rise = largestRise(other, dosing.balance, dosing.run).value;
      rises.set(ratioIndex, rise);
      return rise;
    },
    dosing: (index) => known(index).dosing,
  };
}

/**
 * Heat capacity of the whole feed over that of the contents before it.
 *
 * @param step SI numbers of a semibatch
 */
export function heatRatio({ mixture, reaction }: Step): number {
  const { feed } = reaction;
  return feed === null ? 0 : (feed.mass * feed.heatCapacity) / (mixture.mass * mixture.heatCapacity);
}
