import type { Run } from "./run.js";
import type { Response } from "./timeline.js";
import type { Vessel } from "./vessel.js";

/** How much of the time to act is left once people and plant have responded. */
export interface Margin {
  /** s; negative: the response comes too late */
  readonly margin: number;
  /** highest alarm temperature that still leaves the response, K; null where none does */
  readonly alarm: number | null;
}

/**
 * How long people and plant take together.
 *
 * @returns s
 */
export function responseTime({ detection, decision, action }: Response): number {
  return detection + decision + action;
}

/** Readings of a run in each of its steps. */
const readings = 8;

/**
 * Margin of a response: time to act less detection, decision and action. The alarm must sound while the response can
 * still be over in time, so the highest useful alarm temperature is the highest temperature reached by then, in
 * every run; an alarm at or below the temperature of the hold would tell nothing.
 *
 * @param timeToAct s
 * @param runs of the failure left to itself, one for each assumption on mixing
 */
export function marginOf(
  vessel: Vessel,
  timeToAct: number,
  response: Response,
  runs: readonly Run[],
): Margin {
  const margin = timeToAct - responseTime(response);
  if (margin < 0) return { margin, alarm: null };
  const alarm = Math.min(...runs.map((run) => highestUntil(run, margin)));
  return { margin, alarm: alarm > 0 ? vessel.contents.reference + alarm : null };
}

/** Highest temperature of a run up to a time, K above the reference. */
function highestUntil(run: Run, time: number): number {
  const { trajectory } = run;
  let highest = run.start.state[0];
  const read = (at: number): void => {
    highest = Math.max(highest, trajectory.component(at, 0, true));
  };
  const times = trajectory.times();
  for (let i = 1; i < times.length && times[i - 1] < time; i += 1) {
    const end = Math.min(times[i], time);
    for (let part = 1; part <= readings; part += 1) {
      read(times[i - 1] + ((end - times[i - 1]) * part) / readings);
    }
  }
  return highest;
}
