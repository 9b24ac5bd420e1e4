import { fedMass, heatCapacityOf, limitingAmount } from "./balance.js";
import type { Extreme } from "./dosing.js";
import type { Step } from "./step.js";

/** A calorimetric run of the dosing: part of the reaction's heat released against time. */
export interface MeasuredRun {
  /** K */
  readonly temperature: number;
  /** in ascending order of time (s from the start of the feed) */
  readonly rows: readonly { readonly time: number; readonly releasedFraction: number }[];
}

/** Accumulation as it was measured. */
export interface MeasuredDosing {
  /** largest accumulated part of the limiting amount */
  readonly accumulation: Extreme;
  /** largest rise that the accumulation could still bring, K */
  readonly rise: Extreme;
  readonly curve: readonly {
    readonly time: number;
    readonly fed: number;
    readonly released: number;
    readonly accumulated: number;
    readonly rise: number;
  }[];
}

/**
 * Accumulation from a calorimetric run, min(fed/stoichiometric, 1) - released, and the rise it holds. Between
 * rows, and from the start to the first one, the released part is taken as straight; after the last one nothing
 * more is released, which errs towards accumulation. Valid at the run's own temperature and feed only.
 *
 * @param step SI numbers of a semibatch case
 * @param run rows of the calorimeter
 * @see Gygax 1988, Chem. Eng. Sci. 43:1759
 */
export function measuredDosing(step: Step, run: MeasuredRun): MeasuredDosing {
  const { feed, b, amountA } = step.reaction;
  const limiting = limitingAmount(step);
  const end = feed?.duration ?? 0;
  const whole = feed?.reactant === "B" && b !== null ? b.amount / b.perA / limiting : amountA / limiting;
  const fedAt = (time: number): number => (feed === null ? 1 : Math.min((whole * time) / end, 1));
  const released = (time: number): number => releasedAt(run, time);
  // Between two of these moments fed and released are straight and C is linear: a quotient of straight lines
  // is largest at one of its ends.
  const moments = [0, end, end / whole, ...run.rows.map((row) => row.time)]
    .filter((time) => time >= 0 && time <= end)
    .sort((a, b) => a - b);
  const curve = [...new Set(moments)].map((time) => {
    const fed = fedAt(time);
    const accumulated = Math.max(0, fed - released(time));
    const heat = accumulated * limiting * -step.reaction.heat;
    return {
      time,
      fed,
      released: released(time),
      accumulated,
      rise: heat / heatCapacityOf(step, fedMass(step, time)),
    };
  });
  const largest = (value: (point: (typeof curve)[number]) => number): Extreme =>
    curve.reduce<Extreme>(
      (best, point) => (value(point) > best.value ? { value: value(point), at: point.time } : best),
      { value: 0, at: 0 },
    );
  return {
    accumulation: largest((point) => point.accumulated),
    rise: largest((point) => point.rise),
    curve,
  };
}

function releasedAt({ rows }: MeasuredRun, time: number): number {
  let before = { time: 0, releasedFraction: 0 };
  for (const row of rows) {
    if (row.time >= time) {
      const width = row.time - before.time;
      const part = width > 0 ? (time - before.time) / width : 1;
      return before.releasedFraction + part * (row.releasedFraction - before.releasedFraction);
    }
    before = row;
  }
  return before.releasedFraction;
}
