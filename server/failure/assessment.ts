import { assumptionsFor, fullSearch, type Judgement, judge } from "./judgement.js";
import { type Margin, marginOf } from "./response.js";
import { type FullRun, runToHorizon } from "./run.js";
import { type FailureStart, startAt } from "./start.js";
import type { Timeline } from "./timeline.js";
import { type Search, timeToAct } from "./timeToAct.js";
import type { Vessel } from "./vessel.js";
import { isWorse, worstStart } from "./worstStart.js";

/** What stopping the feed, and nothing else, would do. */
interface StopFeedOnly {
  readonly suffices: boolean;
  /** s; null where it does not suffice */
  readonly timeToAct: number | null;
}

/** A failure, run and judged. */
export interface Assessment extends Judgement {
  readonly start: FailureStart;
  /** the worse of the runs */
  readonly run: FullRun;
  /** one for each assumption on mixing */
  readonly runs: readonly FullRun[];
  /** null where the failure holds, or no feed runs on */
  readonly stopFeedOnly: StopFeedOnly | null;
  /** null where the failure holds, or no response is stated */
  readonly margin: Margin | null;
}

/** How closely a failure is run and its time to act looked for. */
export interface Accuracy {
  readonly relativeTolerance: number;
  readonly search: Search;
}

/** For what is reported: temperatures to 1e-3 K, times to 1e-5 of themselves, the time to act to half a second. */
export const reported: Accuracy = { relativeTolerance: 1e-8, search: fullSearch };

/**
 * Runs and judges a failure.
 *
 * @param vessel made for the temperature at which the failure starts
 * @returns null where the hold could not be followed up to the failure
 */
export function assess(vessel: Vessel, timeline: Timeline, accuracy: Accuracy = reported): Assessment | null {
  const startedAt = timeline.at === "worst" ? worstStart(vessel, timeline) : timeline.at;
  const start = startAt(vessel.contents, vessel.hold, startedAt);
  if (start === null) return null;
  const runs = assumptionsFor(timeline).map((mixing) =>
    runToHorizon(vessel, start, timeline, mixing, accuracy.relativeTolerance),
  );
  const [first, ...others] = runs;
  const run = others.reduce((worse, other) => (isWorse(harmOf(other), harmOf(worse)) ? other : worse), first);
  const judgement = judge(vessel, runs, accuracy.search);
  const { timeToAct: time } = judgement;
  const margin =
    time === null || timeline.response === null ? null : marginOf(vessel, time, timeline.response, runs);
  return {
    ...judgement,
    start,
    run,
    runs,
    stopFeedOnly: stopFeedOnly(vessel, runs, judgement, accuracy.search),
    margin,
  };
}

function harmOf(run: FullRun): { readonly lostAt: number; readonly peak: number } {
  return { lostAt: run.loss?.at ?? Number.POSITIVE_INFINITY, peak: run.peak.value };
}

/** Only where a feed runs after the failure and something has to be done at all. */
function stopFeedOnly(
  vessel: Vessel,
  runs: readonly FullRun[],
  judgement: Judgement,
  search: Search,
): StopFeedOnly | null {
  if (judgement.verdict === "holds") return null;
  if (!runs.some((run) => run.legs.some((leg) => leg.conditions.feeding))) return null;
  const time = timeToAct(vessel, runs, "stopFeed", search);
  return { suffices: time !== null, timeToAct: time };
}
