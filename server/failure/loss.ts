import type { Contents } from "./contents.js";
import type { Followed } from "./follow.js";

/** At the end of the watch the contents count as lost where they still rise faster than this, K/s (0.1 K/h). */
const risingRate = 0.1 / 3600;

/** When a run was lost, and by what. */
export interface Loss {
  /** s after the failure */
  readonly at: number;
  /** failed: the integration gave up there, which counts as lost */
  readonly by: "mtt" | "decomposition" | "rising" | "failed";
}

/**
 * Whether a run was lost: T reached MTT, or the decomposition what is allowed of it, or at the end of the watch
 * T is above the process temperature and still rising by more than 0.1 K/h. Crossing T_D24 alone is no loss.
 *
 * @param contents as the run has left them
 * @param followed the run, to the end of its watch
 */
export function lossOf(contents: Contents, followed: Followed): Loss | null {
  const { mtt, allowed } = followed.marks;
  if (mtt !== null && !(allowed !== null && allowed < mtt)) return { at: mtt, by: "mtt" };
  if (allowed !== null) return { at: allowed, by: "decomposition" };
  const { time, state } = followed.end;
  if (followed.status === "failed") return { at: time, by: "failed" };
  const { system, reference, step } = contents;
  if (!(reference + state[0] > step.reaction.temperature)) return null;
  const slope = new Float64Array(system.size);
  system.derivative(time, state, slope);
  return slope[0] > risingRate ? { at: time, by: "rising" } : null;
}
