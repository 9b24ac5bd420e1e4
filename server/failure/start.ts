import { coolingCapacity } from "../thermal/cooling.js";
import type { Charge } from "./charge.js";
import { type Conditions, normalConditions } from "./conditions.js";
import type { Contents } from "./contents.js";
import type { Hold } from "./hold.js";

/** A moment of a run: all that is needed to go on from it. */
export interface Moment {
  /** s after the failure */
  readonly time: number;
  readonly state: Float64Array;
  readonly charge: Charge;
  readonly conditions: Conditions;
}

/** The moment of the failure, before anything has changed. */
export interface FailureStart extends Moment {
  /** s from the start of the feed (batch: of the reaction) */
  readonly startedAt: number;
  /** W that had to be taken out to hold the temperature, and the most that the cooling can take out there */
  readonly duty: number;
  readonly capacity: number;
}

/**
 * State at the moment of the failure, as the hold has left it. The jacket is as cold as the heat to be removed
 * asks for, Tj0 = T - q/UA; a hot jacket stays hot. Where the cooling cannot take out that much, the jacket is
 * as cold as the fully opened valve can make it, which is the warmer of the two and so the cautious one.
 *
 * @param contents of the same step, counted from the temperature of the hold
 * @param hold until the failure
 * @param startedAt s from the start of the feed
 * @returns null where the hold could not be followed so far
 */
export function startAt(contents: Contents, hold: Hold, startedAt: number): FailureStart | null {
  const { step, places, system } = contents;
  const { feed } = step.reaction;
  const extent = hold.extentAt(startedAt);
  if (extent === null) return null;
  const state = new Float64Array(system.size);
  state[places.extent] = extent;
  if (places.progress !== null) state[places.progress] = hold.progressAt(startedAt);
  const fed = feed === null ? 0 : feed.mass * Math.min(startedAt / feed.duration, 1);
  const charge: Charge = { fed, quenchCapacity: 0, quenchVolume: 0 };
  const normal = normalConditions(step);
  const conditions = { ...normal, feeding: feed !== null && startedAt <= feed.duration };
  contents.enter(0, charge, conditions, 1);
  const duty = contents.heatToRemove(0, state);
  const capacity = coolingCapacity(step, hold.temperature);
  if (places.jacket !== null) {
    state[places.jacket] = -Math.min(duty, Math.max(capacity, 0)) / step.vessel.ua;
  }
  return { time: 0, state, charge, conditions, startedAt, duty, capacity };
}
