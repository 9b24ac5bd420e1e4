import { feedStaysStopped, type Timeline } from "./timeline.js";
import type { Vessel } from "./vessel.js";
import { type Harm, harmAt, isWorse } from "./worstStart.js";

/** The worst start of a failure at the estimates, and the time of MTSR there: s from the start of the feed. */
export interface KnownStart {
  readonly startedAt: number;
  readonly mtsrAt: number;
}

/** Parts of the feed tried besides what is known: which of two maxima of harm is higher changes between draws. */
const coarseSteps = 4;

/** Of every step: only which start is worse has to come out right. */
const relativeTolerance = 1e-3;

/** Times that the distance to the neighbours of the worst start is halved. */
const halvings = 3;

/**
 * When a failure starts in a draw, from what is known at the estimates. A stated start is kept. Where the feed stops
 * with the failure and stays stopped, it is the draw's own time of MTSR, exactly. Else the worst of these, refined to
 * a thirty-second of the feed: the start that is worst at the estimates, that start moved by as much as the time of
 * MTSR moves, the draw's own time of MTSR, and a coarse grid over the feed. A time to act found there is within 5 % of
 * the one that the full search for the draw's own worst start leads to, usually within 1 %, and never shorter but for
 * the accuracy of both.
 *
 * @param vessel of the draw
 * @param known at the estimates
 * @returns s from the start of the feed (batch: of the reaction)
 */
export function reusedStart(vessel: Vessel, timeline: Timeline, known: KnownStart): number {
  if (timeline.at !== "worst") return timeline.at;
  const { contents, hold } = vessel;
  const { feed } = contents.step.reaction;
  if (feed === null) return 0;
  if (feedStaysStopped(timeline)) return hold.mtsrAt;
  const { duration } = feed;
  const tried = new Set<number>();
  let worst = 0;
  let harm: Harm = { lostAt: Number.POSITIVE_INFINITY, peak: Number.NEGATIVE_INFINITY };
  const attempt = (start: number): void => {
    const within = Math.min(Math.max(start, 0), duration);
    if (tried.has(within)) return;
    tried.add(within);
    const found = harmAt(vessel, timeline, within, relativeTolerance, harm.lostAt);
    if (isWorse(found, harm)) [worst, harm] = [within, found];
  };
  const { startedAt, mtsrAt } = known;
  attempt(startedAt);
  attempt(startedAt + hold.mtsrAt - mtsrAt);
  attempt(hold.mtsrAt);
  for (let i = 0; i <= coarseSteps; i += 1) attempt((duration * i) / coarseSteps);
  let distance = duration / coarseSteps;
  for (let i = 0; i < halvings; i += 1) {
    distance *= 0.5;
    const centre = worst;
    attempt(centre - distance);
    attempt(centre + distance);
  }
  return worst;
}
