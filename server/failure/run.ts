import { createTrajectory, type Trajectory } from "../numeric/trajectory.js";
import { afterFeeding } from "./charge.js";
import type { MixingAssumption } from "./conditions.js";
import { fastest, hottest, type Peak } from "./extremes.js";
import { follow, type Leg, type Marks } from "./follow.js";
import type { Observer } from "./leg.js";
import { type Loss, lossOf } from "./loss.js";
import type { FailureStart, Moment } from "./start.js";
import { lastChange, type Timeline, watch } from "./timeline.js";
import type { Vessel } from "./vessel.js";

/** A failure left to itself, kept so that another run can branch off anywhere. */
export interface Run {
  readonly start: FailureStart;
  readonly mixing: MixingAssumption;
  readonly trajectory: Trajectory;
  readonly legs: readonly Leg[];
  /** by the rule, within 24 h after the last change, whatever is shown */
  readonly loss: Loss | null;
  /** s after the failure: 24 h after the last change */
  readonly watchedUntil: number;
}

/** A failure from its start to the end of what is shown of it. */
export interface FullRun extends Run {
  readonly marks: Marks;
  /** K */
  readonly peak: Peak;
  /** K/s */
  readonly fastest: Peak;
  readonly end: Moment;
}

/**
 * Runs a failure until it is lost, or to the end of its watch.
 *
 * @param vessel to run it in
 * @param start moment of the failure
 * @param mixing how the contents react while the agitator is off
 * @param relativeTolerance of every step
 */
export function runUntilLost(
  vessel: Vessel,
  start: FailureStart,
  timeline: Timeline,
  mixing: MixingAssumption,
  relativeTolerance: number,
): Run {
  const { contents, integrator } = vessel;
  const trajectory = createTrajectory(contents.system.size, 64);
  const watchedUntil = lastChange(timeline) + watch;
  const options = { relativeTolerance, mixing, td24: null, untilLost: true, trajectory };
  const followed = follow(contents, integrator, start, timeline.changes, watchedUntil, options);
  const loss = lossOf(contents, followed);
  return { start, mixing, trajectory, legs: followed.legs, loss, watchedUntil };
}

/**
 * Runs a failure to its horizon, through a runaway to the end of both reactions where it comes to that.
 *
 * @param vessel to run it in
 * @param start moment of the failure
 * @param mixing how the contents react while the agitator is off
 * @param relativeTolerance of every step
 */
export function runToHorizon(
  vessel: Vessel,
  start: FailureStart,
  timeline: Timeline,
  mixing: MixingAssumption,
  relativeTolerance: number,
): FullRun {
  const { contents, integrator, td24 } = vessel;
  const trajectory = createTrajectory(contents.system.size, 256);
  const top = hottest(contents);
  const rise = fastest(contents);
  const observer: Observer = {
    enter(time, state) {
      top.enter(time, state);
      rise.enter(time, state);
    },
    step(step, clock) {
      top.step(step, clock);
      rise.step(step, clock);
    },
  };
  const options = { relativeTolerance, mixing, td24, untilLost: false, observer, trajectory };
  const watchedUntil = lastChange(timeline) + watch;
  const watched = follow(contents, integrator, start, timeline.changes, watchedUntil, options);
  const loss = lossOf(contents, watched);
  const run = (legs: readonly Leg[], marks: Marks, end: Moment): FullRun => ({
    start,
    mixing,
    trajectory,
    legs,
    marks,
    loss,
    watchedUntil,
    peak: top.peak,
    fastest: rise.peak,
    end,
  });
  const { horizon } = timeline;
  if (horizon === null || horizon <= watchedUntil || watched.status === "failed") {
    return run(watched.legs, watched.marks, watched.end);
  }
  const rest = follow(contents, integrator, watched.end, [], horizon, options);
  return run([...watched.legs, ...rest.legs], earlier(watched.marks, rest.marks), rest.end);
}

function earlier(one: Marks, other: Marks): Marks {
  return {
    mtt: one.mtt ?? other.mtt,
    td24: one.td24 ?? other.td24,
    allowed: one.allowed ?? other.allowed,
  };
}

/** Before or after the change that happens at the very time. */
export type Side = "before" | "after";

/**
 * A moment of a run.
 *
 * @param time s after the failure, within the run
 * @param side where a change falls on the time
 */
export function momentOf(vessel: Vessel, run: Run, time: number, side: Side): Moment {
  const leg = run.legs.findLast((each) => (side === "before" ? each.time < time : each.time <= time));
  // Before the failure itself there is no leg.
  if (leg === undefined) return run.start;
  const { step, system } = vessel.contents;
  const state = new Float64Array(system.size);
  run.trajectory.evaluate(time, state, side === "before");
  const charge = leg.conditions.feeding ? afterFeeding(step, leg.charge, time - leg.time) : leg.charge;
  return { time, state, charge, conditions: leg.conditions };
}
