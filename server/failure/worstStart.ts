import { hottest } from "./extremes.js";
import { follow } from "./follow.js";
import { assumptionsFor } from "./judgement.js";
import { lossOf } from "./loss.js";
import { startAt } from "./start.js";
import { feedStaysStopped, lastChange, type Timeline, watch } from "./timeline.js";
import type { Vessel } from "./vessel.js";

/** How bad a failure left to itself is. */
export interface Harm {
  /** s after the failure; infinite where it is not lost */
  readonly lostAt: number;
  /** K */
  readonly peak: number;
}

/**
 * Whether one failure is worse than another: lost sooner, or else peaks higher.
 */
export function isWorse(one: Harm, other: Harm): boolean {
  return one.lostAt === other.lostAt ? one.peak > other.peak : one.lostAt < other.lostAt;
}

/** Starts tried over the feed, besides the time of MTSR. */
const gridSteps = 50;

/** s to which the worst start is refined. */
const resolution = 1;

const tolerances = { grid: 1e-5, refined: 1e-7 } as const;

/**
 * The worst moment for a failure to start. Where its feed stops and stays stopped: the time of MTSR; a batch: the
 * start of the reaction; else the start within the feed that is worst, from a grid with the time of MTSR in it,
 * refined by golden section.
 *
 * @returns s from the start of the feed
 */
export function worstStart(vessel: Vessel, timeline: Timeline): number {
  const { contents, hold } = vessel;
  const { feed } = contents.step.reaction;
  if (feed === null) return 0;
  if (feedStaysStopped(timeline)) return hold.mtsrAt;
  const grid = Array.from({ length: gridSteps + 1 }, (_, i) => (feed.duration * i) / gridSteps);
  const starts = [...new Set([...grid, hold.mtsrAt])].sort((a, b) => a - b);
  const harms = starts.map((start) => harmAt(vessel, timeline, start, tolerances.grid));
  let worst = 0;
  for (let i = 1; i < starts.length; i += 1) if (isWorse(harms[i], harms[worst])) worst = i;

  const harm = (start: number): Harm => harmAt(vessel, timeline, start, tolerances.refined);
  const refined = goldenSection(
    harm,
    starts[Math.max(worst - 1, 0)],
    starts[Math.min(worst + 1, starts.length - 1)],
  );
  return isWorse(harm(refined), harm(starts[worst])) ? refined : starts[worst];
}

const golden = 0.5 * (Math.sqrt(5) - 1);

/** Start between two others that is worst, where harm has a single maximum between them. */
function goldenSection(harm: (start: number) => Harm, from: number, to: number): number {
  let [low, high] = [from, to];
  let left = high - golden * (high - low);
  let right = low + golden * (high - low);
  let harmLeft = harm(left);
  let harmRight = harm(right);
  while (high - low > resolution) {
    if (isWorse(harmRight, harmLeft)) {
      low = left;
      [left, harmLeft] = [right, harmRight];
      right = low + golden * (high - low);
      harmRight = harm(right);
    } else {
      high = right;
      [right, harmRight] = [left, harmLeft];
      left = high - golden * (high - low);
      harmLeft = harm(left);
    }
  }
  return 0.5 * (low + high);
}

/**
 * Harm of a failure that starts at a moment, by the worse assumption on mixing.
 *
 * @param startedAt s from the start of the feed
 * @param relativeTolerance of every step
 * @param within s after the failure; nobody asks what is lost later, which counts as not lost
 */
export function harmAt(
  vessel: Vessel,
  timeline: Timeline,
  startedAt: number,
  relativeTolerance: number,
  within = Number.POSITIVE_INFINITY,
): Harm {
  const { contents, integrator, hold } = vessel;
  const watched = lastChange(timeline) + watch;
  let worst: Harm = { lostAt: Number.POSITIVE_INFINITY, peak: 0 };
  const start = startAt(contents, hold, startedAt);
  if (start === null) return worst;
  for (const mixing of assumptionsFor(timeline)) {
    const observer = hottest(contents);
    const options = { relativeTolerance, mixing, td24: null, untilLost: true, observer };
    const until = Math.min(watched, within, worst.lostAt);
    const followed = follow(contents, integrator, start, timeline.changes, until, options);
    const found = lossOf(contents, followed);
    // Whether it still rises is only asked at the end of the watch.
    const loss = until < watched && found?.by === "rising" ? null : found;
    const harm = { lostAt: loss?.at ?? Number.POSITIVE_INFINITY, peak: observer.peak.value };
    if (isWorse(harm, worst)) worst = harm;
  }
  return worst;
}
