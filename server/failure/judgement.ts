import type { MixingAssumption } from "./conditions.js";
import { type Run, runUntilLost } from "./run.js";
import { startAt } from "./start.js";
import { agitatorStops, type Timeline } from "./timeline.js";
import { type Search, timeToAct } from "./timeToAct.js";
import type { Vessel } from "./vessel.js";

/** holds: not lost by itself. act: saved by acting in time. lost: no delay is short enough. */
type Verdict = "holds" | "act" | "lost";

/** What is to be known of a failure at one moment. */
export interface Judgement {
  readonly verdict: Verdict;
  /** s; 0 for lost, null for holds */
  readonly timeToAct: number | null;
}

/** For a figure: within a hundredth of the time itself. */
const quickSearch: Search = { scan: 6, width: 1, part: 0.002, relativeTolerance: 1e-5 };

/** For a draw: within 1 s and 0.5 % of the time itself, mostly on the short side. */
export const drawnSearch: Search = { scan: 6, width: 1, part: 0.004, relativeTolerance: 1e-4 };

/** For what is reported: within half a second. */
export const fullSearch: Search = { scan: 32, width: 0.5, part: 0, relativeTolerance: 1e-7 };

/**
 * Assumptions on mixing that a failure has to be run with.
 */
export function assumptionsFor(timeline: Timeline): readonly MixingAssumption[] {
  return agitatorStops(timeline) ? ["mixed", "unmixed"] : ["mixed"];
}

/**
 * Verdict and time to act from the runs of a failure left to itself.
 *
 * @param runs one for each assumption on mixing
 */
export function judge(vessel: Vessel, runs: readonly Run[], search: Search): Judgement {
  if (runs.every((run) => run.loss === null)) return { verdict: "holds", timeToAct: null };
  const time = timeToAct(vessel, runs, "restore", search);
  return time === null || time === 0
    ? { verdict: "lost", timeToAct: 0 }
    : { verdict: "act", timeToAct: time };
}

/**
 * Verdict and time to act of a failure at a given moment, without all that is shown of it.
 *
 * @param startedAt s from the start of the feed (batch: of the reaction)
 * @returns null where the hold could not be followed so far
 */
export function judgeAt(
  vessel: Vessel,
  timeline: Timeline,
  startedAt: number,
  search: Search = quickSearch,
): Judgement | null {
  const start = startAt(vessel.contents, vessel.hold, startedAt);
  if (start === null) return null;
  const runs = assumptionsFor(timeline).map((mixing) =>
    runUntilLost(vessel, start, timeline, mixing, search.relativeTolerance),
  );
  return judge(vessel, runs, search);
}
