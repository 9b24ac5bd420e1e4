import { createTrajectory, type Trajectory } from "../numeric/trajectory.js";
import { afterFeeding } from "./charge.js";
import type { MixingAssumption } from "./conditions.js";
import { fastest, hottest, type Peak } from "./extremes.js";
import { type Followed, follow, type Leg, type Marks, type Observer } from "./follow.js";
import { type Loss, lossOf } from "./loss.js";
import type { FailureStart, Moment } from "./start.js";
import { lastChange, type Timeline, watch } from "./timeline.js";
import type { Vessel } from "./vessel.js";

/** A failure left to itself, from its start to the end of what is shown of it. */
export interface FailureRun {
  readonly start: FailureStart;
  readonly mixing: MixingAssumption;
  readonly trajectory: Trajectory;
  readonly legs: readonly Leg[];
  readonly marks: Marks;
  /** by the rule, within 24 h after the last change, whatever is shown */
  readonly loss: Loss | null;
  /** s after the failure: 24 h after the last change */
  readonly watchedUntil: number;
  /** K */
  readonly peak: Peak;
  /** K/s */
  readonly fastest: Peak;
  readonly end: Moment;
}

/**
 * Runs a failure to its horizon, through a runaway to the end of both reactions where it comes to that.
 *
 * @param vessel to run it in
 * @param start moment of the failure
 * @param mixing how the contents react while the agitator is off
 * @param relativeTolerance of every step
 */
export function runFailure(
  vessel: Vessel,
  start: FailureStart,
  timeline: Timeline,
  mixing: MixingAssumption,
  relativeTolerance: number,
): FailureRun {
  const { contents, integrator, td24 } = vessel;
  const trajectory = createTrajectory(contents.system.size, 256);
  const top = hottest(contents);
  const rise = fastest(contents);
  const observer: Observer = {
    enter(time, state) {
      top.enter(time, state);
      rise.enter(time, state);
    },
    step(step) {
      top.step(step);
      rise.step(step);
    },
  };
  const options = { relativeTolerance, mixing, td24, untilLost: false, observer, trajectory };
  const watchedUntil = lastChange(timeline) + watch;
  const watched = follow(contents, integrator, start, timeline.changes, watchedUntil, options);
  const loss = lossOf(contents, watched);
  const run = (legs: readonly Leg[], marks: Marks, end: Moment): FailureRun => ({
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
  return run([...watched.legs, ...rest.legs], firstOf(watched, rest), rest.end);
}

function firstOf(one: Followed, other: Followed): Marks {
  return {
    mtt: one.marks.mtt ?? other.marks.mtt,
    td24: one.marks.td24 ?? other.marks.td24,
    allowed: one.marks.allowed ?? other.marks.allowed,
  };
}

/**
 * The moment of a run just before whatever happens at a time: what the timeline does before it has happened.
 *
 * @param time s after the failure, within the run
 * @param side "before": without the change at that very time; "after": with it
 */
export function momentOf(vessel: Vessel, run: FailureRun, time: number, side: "before" | "after"): Moment {
  const leg = run.legs.findLast((each) => (side === "before" ? each.time < time : each.time <= time));
  // Before the failure itself there is no leg.
  if (leg === undefined) return run.start;
  const state = new Float64Array(vessel.contents.system.size);
  const atStart = run.trajectory.steps === 0;
  if (atStart) state.set(run.end.state);
  else run.trajectory.evaluate(time, state, side === "before");
  const { conditions } = leg;
  const charge = conditions.feeding
    ? afterFeeding(vessel.contents.step, leg.charge, time - leg.time)
    : leg.charge;
  return { time, state, charge, conditions };
}
