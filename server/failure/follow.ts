import type { Integrator } from "../numeric/stiff.js";
import type { EventFunction } from "../numeric/stiffEvents.js";
import type { Trajectory } from "../numeric/trajectory.js";
import { afterFeeding, type Charge, feedStretch, quenched } from "./charge.js";
import { type Conditions, changed, effectiveMixing, type MixingAssumption } from "./conditions.js";
import type { Contents } from "./contents.js";
import { integrateLeg, type Observer } from "./leg.js";
import type { Moment } from "./start.js";
import type { Change, Quench } from "./timeline.js";

/** Marks on the way of a run that are reported. */
export interface Marks {
  /** s after the failure; null: not reached */
  readonly mtt: number | null;
  readonly td24: number | null;
  /** when the decomposition reached what is allowed of it */
  readonly allowed: number | null;
}

export interface FollowOptions {
  /** of every step; temperatures besides to ten kelvin times this, extents to a hundredth of it */
  readonly relativeTolerance: number;
  readonly mixing: MixingAssumption;
  /** K; null: no decomposition, or none at hand */
  readonly td24: number | null;
  /** ends the run where MTT or the allowed decomposition is reached */
  readonly untilLost: boolean;
  readonly observer?: Observer;
  readonly trajectory?: Trajectory;
}

/** A stretch with constant conditions. */
export interface Leg {
  readonly time: number;
  readonly charge: Charge;
  readonly conditions: Conditions;
}

/** Where a run came to. */
export interface Followed {
  readonly marks: Marks;
  readonly legs: readonly Leg[];
  readonly end: Moment;
  /** done: as far as asked. lost: stopped by `untilLost`. failed: the integrator gave up there. */
  readonly status: "done" | "lost" | "failed";
}

/**
 * Integrates the contents from a moment on, through every change at its exact time.
 *
 * @param integrator for as many unknowns as the contents have
 * @param from moment to start at; nothing of its own time has happened yet
 * @param changes in the order of time, none before the start
 * @param until s after the failure
 */
export function follow(
  contents: Contents,
  integrator: Integrator,
  from: Moment,
  changes: readonly Change[],
  until: number,
  options: FollowOptions,
): Followed {
  const { step, reference, places, system } = contents;
  const { observer, trajectory } = options;
  const mtt = step.limits.maximumTechnicalTemperature - reference;
  const allowed = step.limits.decompositionAllowed;
  const td24 = options.td24 === null ? Number.POSITIVE_INFINITY : options.td24 - reference;
  const progress = places.progress;
  const reached: { -readonly [mark in keyof Marks]: Marks[mark] } = { mtt: null, td24: null, allowed: null };

  /** Values of the marks, zero or above once reached, in the order of `names`. */
  const names: (keyof Marks)[] = ["mtt"];
  const values: ((y: Float64Array) => number)[] = [(y) => y[0] - mtt];
  if (progress !== null) {
    names.push("allowed");
    values.push((y) => y[progress] - allowed);
    if (options.td24 !== null) {
      names.push("td24");
      values.push((y) => y[0] - td24);
    }
  }
  const mark = (index: number, time: number): void => {
    reached[names[index]] ??= time;
  };
  const lost = (): boolean => reached.mtt !== null || reached.allowed !== null;
  const events = values.map(
    (value, index): EventFunction => ({
      value: (_, y) => value(y),
      direction: 1,
      terminal: options.untilLost && names[index] !== "td24",
    }),
  );

  const { relativeTolerance } = options;
  const blur = 10 * relativeTolerance;
  const absoluteTolerance = new Float64Array(system.size).fill(1e-2 * relativeTolerance);
  absoluteTolerance[0] = 10 * relativeTolerance;
  if (places.jacket !== null) absoluteTolerance[places.jacket] = 10 * relativeTolerance;

  const legs: Leg[] = [];
  let { time, state, charge, conditions } = from;
  let next = 0;
  let status: Followed["status"] = "done";
  for (;;) {
    while (next < changes.length && changes[next].after <= time) {
      const change = changes[next];
      conditions = changed(conditions, change);
      if (change.quench !== undefined) {
        contents.enter(time, charge, conditions, 1);
        state = mixedIn(state, contents.heatCapacity(time), change.quench, reference);
        charge = quenched(charge, change.quench);
      }
      next += 1;
    }
    const stretch = conditions.feeding ? feedStretch(step, charge) : 0;
    if (conditions.feeding && stretch === 0) conditions = { ...conditions, feeding: false };
    legs.push({ time, charge, conditions });
    contents.enter(time, charge, conditions, effectiveMixing(conditions, options.mixing), blur);
    values.forEach((value, index) => {
      if (value(state) >= 0) mark(index, time);
    });
    observer?.enter(time, state);
    if (options.untilLost && lost()) {
      status = "lost";
      break;
    }
    if (time >= until) break;
    let stop = Math.min(until, next < changes.length ? changes[next].after : until);
    if (conditions.feeding) stop = Math.min(stop, time + stretch);
    const end = integrateLeg(system, integrator, time, state, stop, {
      relativeTolerance,
      absoluteTolerance,
      events,
      observer,
      trajectory,
    });
    for (const event of end.events) mark(event.index, event.time);
    if (conditions.feeding) charge = afterFeeding(step, charge, end.time - time);
    time = end.time;
    state = end.state;
    if (end.status !== "done") {
      status = end.status === "event" ? "lost" : "failed";
      break;
    }
    if (time >= until && !(next < changes.length && changes[next].after <= time)) break;
  }
  return { marks: reached, legs, end: { time, state, charge, conditions }, status };
}

/** The state after a quench: the temperature of the mixture of contents (walls with them) and quench. */
function mixedIn(state: Float64Array, capacity: number, quench: Quench, reference: number): Float64Array {
  const added = quench.mass * quench.heatCapacity;
  const mixed = Float64Array.from(state);
  mixed[0] = (capacity * state[0] + added * (quench.temperature - reference)) / (capacity + added);
  return mixed;
}
