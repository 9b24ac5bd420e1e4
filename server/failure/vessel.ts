import type { ModifiedArrhenius } from "../kinetics/rateConstant.js";
import { createIntegrator, type Integrator } from "../numeric/stiff.js";
import { runawayOf } from "../thermal/cooling.js";
import type { Step } from "../thermal/step.js";
import { td24 } from "../thermal/td24.js";
import { type Contents, createContents } from "./contents.js";
import { type Hold, holdAt } from "./hold.js";

/**
 * A step at one temperature of the hold with all that its failures are run in. It keeps a workspace: one run at a
 * time.
 */
export interface Vessel {
  readonly contents: Contents;
  readonly integrator: Integrator;
  readonly hold: Hold;
  /** K; null without a decomposition or where it has none */
  readonly td24: number | null;
}

/**
 * Makes a vessel ready for failures.
 *
 * @param step SI numbers
 * @param rate of the desired reaction
 * @param temperature at which the contents are held until a failure, K
 * @returns null where the hold could not be followed
 */
export function createVessel(step: Step, rate: ModifiedArrhenius, temperature: number): Vessel | null {
  const hold = holdAt(step, rate, temperature);
  if (hold === null) return null;
  const runaway = runawayOf(step);
  const contents = createContents(step, rate, temperature);
  return {
    contents,
    integrator: createIntegrator(contents.system.size),
    hold,
    td24: runaway === null ? null : td24(runaway),
  };
}
