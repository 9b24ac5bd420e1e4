import { bisectPredicate } from "../numeric/roots.js";
import { type Conditions, restoredConditions } from "./conditions.js";
import { follow } from "./follow.js";
import { lossOf } from "./loss.js";
import { momentOf, type Run, type Side } from "./run.js";
import { watch } from "./timeline.js";
import type { Vessel } from "./vessel.js";

/** What is done after the delay: full cooling restored, or nothing but the feed stopped. */
export type Action = "restore" | "stopFeed";

/** How closely a time to act is looked for. */
export interface Search {
  /** delays tried up to the loss, besides the times of changes */
  readonly scan: number;
  /** width of the last bracket, s, and as a part of the time itself: the larger of the two */
  readonly width: number;
  readonly part: number;
  /** of every step of a run */
  readonly relativeTolerance: number;
}

/**
 * Whether acting after a delay keeps the contents, watched for 24 h after the action. What the timeline does before
 * the delay still happens, the rest of it does not.
 *
 * @param run of the failure left to itself, which must not be lost before the delay
 * @param delay s after the failure
 * @param side where a change of the timeline falls on the delay
 */
export function savedBy(
  vessel: Vessel,
  run: Run,
  action: Action,
  delay: number,
  side: Side,
  relativeTolerance: number,
): boolean {
  const { contents, integrator } = vessel;
  const moment = momentOf(vessel, run, delay, side);
  const conditions: Conditions =
    action === "restore" ? restoredConditions(contents.step) : { ...moment.conditions, feeding: false };
  const followed = follow(contents, integrator, { ...moment, conditions }, [], delay + watch, {
    relativeTolerance,
    mixing: run.mixing,
    td24: null,
    untilLost: true,
  });
  return lossOf(contents, followed) === null;
}

/**
 * Time to act: the largest d such that acting after every delay in [0, d] saves the contents. The good delays need
 * not be one interval: a scan, both sides of every change included, then bisection of the first loss. Where a
 * failure is run with two assumptions on mixing, the action must save both, since nobody knows which holds.
 *
 * @param runs of one failure left to itself, at least one of them lost
 * @returns s; null where no delay is short enough
 */
export function timeToAct(
  vessel: Vessel,
  runs: readonly Run[],
  action: Action,
  search: Search,
): number | null {
  const lost = firstLoss(runs);
  const saved = (delay: number, side: Side): boolean =>
    runs.every((run) => savedBy(vessel, run, action, delay, side, search.relativeTolerance));
  // Stopping the feed alone does not undo the failure; restoring everything does.
  if (!saved(0, action === "restore" ? "before" : "after")) return null;
  let good = 0;
  const bisect = (bad: number): number => {
    const width = Math.max(search.width, search.part * good);
    return bisectPredicate((delay) => saved(delay, "before"), good, bad, width).inside;
  };
  for (const { time, isChange } of scanTimes(runs, lost.at, search.scan)) {
    if (time > 0 && !saved(time, "before")) return bisect(time);
    good = time;
    if (isChange && !saved(time, "after")) return time;
  }
  if (lost.by === "rising" && saved(lost.at, "before")) return lost.at;
  return bisect(lost.at);
}

function firstLoss(runs: readonly Run[]): NonNullable<Run["loss"]> {
  let first: Run["loss"] = null;
  for (const { loss } of runs) if (loss !== null && (first === null || loss.at < first.at)) first = loss;
  if (first === null) throw new RangeError("A failure that holds by itself has no time to act");
  return first;
}

/** Times before the loss, s, in ascending order. */
function scanTimes(
  runs: readonly Run[],
  end: number,
  count: number,
): readonly { readonly time: number; readonly isChange: boolean }[] {
  const changes = new Set(
    runs.flatMap((run) => run.legs.map((leg) => leg.time)).filter((time) => time < end),
  );
  const grid = Array.from({ length: count - 1 }, (_, i) => (end * (i + 1)) / count);
  return [...new Set([...changes, ...grid])]
    .sort((a, b) => a - b)
    .map((time) => ({ time, isChange: changes.has(time) }));
}
