import type { Step } from "../thermal/step.js";
import type { Change } from "./timeline.js";

/** What acts on the contents between two changes. Factors are parts of the full value, 0..1. */
export interface Conditions {
  readonly coolantFlow: number;
  readonly heatTransfer: number;
  /** K */
  readonly coolantTemperature: number;
  readonly feeding: boolean;
  readonly agitating: boolean;
  readonly mixing: number;
}

/** How the contents react while the agitator is off: as if mixed, or not at all. */
export type MixingAssumption = "mixed" | "unmixed";

/**
 * Conditions before the failure: everything works, the feed runs.
 *
 * @param step SI numbers
 */
export function normalConditions(step: Step): Conditions {
  return {
    coolantFlow: 1,
    heatTransfer: 1,
    coolantTemperature: step.vessel.coolantTemperature,
    feeding: step.reaction.feed !== null,
    agitating: true,
    mixing: 1,
  };
}

/**
 * Conditions once full cooling is restored: coolant at its set temperature with the valve open, heat transfer,
 * mixing and agitator as they should be, and the feed stopped.
 *
 * @param step SI numbers
 */
export function restoredConditions(step: Step): Conditions {
  return { ...normalConditions(step), feeding: false };
}

/** Conditions after a change: what it does not name stays as it was. */
export function changed(before: Conditions, change: Change): Conditions {
  return {
    coolantFlow: change.coolantFlow ?? before.coolantFlow,
    heatTransfer: change.heatTransfer ?? before.heatTransfer,
    coolantTemperature: change.coolantTemperature ?? before.coolantTemperature,
    feeding: change.feed === undefined ? before.feeding : change.feed === "continue",
    agitating: change.agitator === undefined ? before.agitating : change.agitator === "on",
    mixing: change.mixing ?? before.mixing,
  };
}

/**
 * Part of the contents that reacts: 0 where the agitator is off and that is taken to stop the mixing.
 */
export function effectiveMixing(conditions: Conditions, assumption: MixingAssumption): number {
  return assumption === "unmixed" && !conditions.agitating ? 0 : conditions.mixing;
}
