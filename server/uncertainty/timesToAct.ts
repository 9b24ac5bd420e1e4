import type { Judgement } from "../failure/judgement.js";
import { type DrawnPercentiles, percentilesOf } from "./percentiles.js";

/** What the draws say about one failure. */
export interface TimesToAct {
  /** s; null where the failure holds there */
  readonly percentiles: DrawnPercentiles;
  /** that the time to act exceeds the response; null where none is stated */
  readonly probabilityMarginPositive: number | null;
  /** parts of the draws; they add up to 1 */
  readonly probability: Readonly<Record<Judgement["verdict"], number>>;
}

/**
 * Time to act as a number that can be ordered: 0 for a failure that is lost, infinite for one that holds.
 *
 * @returns s
 */
export function orderedTime({ verdict, timeToAct }: Judgement): number {
  if (verdict === "lost") return 0;
  return timeToAct ?? Number.POSITIVE_INFINITY;
}

/**
 * Percentiles of a time to act and how often each verdict comes out. A draw that holds counts as an infinite time, one
 * that is lost as none: so a percentile is null just where so many draws hold that it falls among them, and 0 where it
 * falls among the lost ones.
 *
 * @param judgements one a draw, at least one
 * @param response s; null where none is stated
 */
export function timesToAct(judgements: readonly Judgement[], response: number | null): TimesToAct {
  const times = Float64Array.from(judgements, orderedTime);
  const part = (is: (judgement: Judgement, time: number) => boolean): number =>
    judgements.filter((judgement, i) => is(judgement, times[i])).length / judgements.length;
  // Before the percentiles, which sort the times.
  const probability = {
    holds: part(({ verdict }) => verdict === "holds"),
    act: part(({ verdict }) => verdict === "act"),
    lost: part(({ verdict }) => verdict === "lost"),
  };
  const inTime = response === null ? null : part((_, time) => time > response);
  return { percentiles: percentilesOf(times), probabilityMarginPositive: inTime, probability };
}

/** A time this close to another tells the same, as a part of the longer and in s. */
const near = { part: 0.1, seconds: 60 } as const;

/**
 * Whether the estimates tell what the middle of the draws tells: both hold, or their times to act are within a tenth
 * or a minute of each other.
 *
 * @param estimate of the same failure
 * @param median s; null where the failure holds there
 */
export function agreesWithMedian(estimate: Judgement, median: number | null): boolean {
  const time = orderedTime(estimate);
  if (median === null || !Number.isFinite(time)) return median === null && !Number.isFinite(time);
  return Math.abs(time - median) <= Math.max(near.seconds, near.part * Math.max(time, median));
}
