import { type Judgement, judgeAt } from "./judgement.js";
import type { Timeline } from "./timeline.js";
import type { Vessel } from "./vessel.js";

/** A moment of the feed and what a failure at that moment would mean. */
export interface VulnerableMoment extends Judgement {
  /** s from the start of the feed */
  readonly startedAt: number;
}

/** Moments over the feed, both ends included. */
const moments = 21;

/**
 * When the step is most vulnerable: verdict and time to act of a failure against the moment at which it starts.
 *
 * @returns null for a batch
 */
export function vulnerableMoments(vessel: Vessel, timeline: Timeline): VulnerableMoment[] | null {
  const { feed } = vessel.contents.step.reaction;
  if (feed === null) return null;
  const found: VulnerableMoment[] = [];
  for (let i = 0; i < moments; i += 1) {
    const startedAt = (feed.duration * i) / (moments - 1);
    const judgement = judgeAt(vessel, timeline, startedAt);
    if (judgement !== null) found.push({ startedAt, ...judgement });
  }
  return found;
}
