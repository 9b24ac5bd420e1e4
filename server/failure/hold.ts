import type { ModifiedArrhenius } from "../kinetics/rateConstant.js";
import { createIntegrator, type Integrator } from "../numeric/stiff.js";
import { runawayOf } from "../thermal/cooling.js";
import { doseAt } from "../thermal/dosing.js";
import { progressAfterHold } from "../thermal/history.js";
import type { Step } from "../thermal/step.js";

/** The contents while they are held at one temperature, before anything fails. */
export interface Hold {
  /** K */
  readonly temperature: number;
  /** s, when a stop of the feed leaves the largest rise: the time of MTSR */
  readonly mtsrAt: number;
  /**
   * Extent of the desired reaction, part of the limiting amount.
   *
   * @returns null where the balance could not be integrated so far
   */
  extentAt(time: number): number | null;
  /** Progress of the decomposition; 0 without one. */
  progressAt(time: number): number;
}

let integrator: Integrator | undefined;

/**
 * Follows the step at constant temperature, as its controller holds it until the failure.
 *
 * @param step SI numbers
 * @param rate of the desired reaction
 * @param temperature K
 * @returns null where the balance could not be integrated
 */
export function holdAt(step: Step, rate: ModifiedArrhenius, temperature: number): Hold | null {
  const dosing = doseAt(step, rate, temperature);
  if (dosing === null) return null;
  const { balance, run, endExtent } = dosing;
  const runaway = runawayOf(step);
  return {
    temperature,
    mtsrAt: dosing.rise.at,
    extentAt(time) {
      if (run !== null && time <= balance.feedEnd) return run.extentAt(time);
      // Nothing happens in a nanosecond, and no step could be that short.
      if (time - balance.feedEnd < 1e-9) return endExtent;
      integrator ??= createIntegrator(1);
      const options = { relativeTolerance: 1e-9, absoluteTolerance: 1e-11 };
      const after = integrator.run(
        balance.system,
        balance.feedEnd,
        Float64Array.of(endExtent),
        time,
        options,
      );
      return after.status === "done" ? after.y[0] : null;
    },
    progressAt: (time) => (runaway === null ? 0 : progressAfterHold(runaway, temperature, time)),
  };
}
