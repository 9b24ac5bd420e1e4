import { runawayOf } from "../thermal/cooling.js";
import { type Dosing, doseAt } from "../thermal/dosing.js";
import { progressAfterHold } from "../thermal/history.js";
import type { Accuracy, Runaway } from "../thermal/runaway.js";
import type { Step } from "../thermal/step.js";

/** A step looked at over process temperatures; what several criteria need is computed once per temperature. */
export interface Study {
  readonly step: Step;
  readonly runaway: Runaway | null;
  readonly accuracy: Accuracy;
  /** the isothermal step at a temperature; null where it could not be integrated or no rate constant is known */
  dosingAt(temperature: number): Dosing | null;
  /** maximum temperature of the synthesis reaction, K; null as above */
  mtsrAt(temperature: number): number | null;
  /** progress of the decomposition that the available time at a temperature leaves behind; 0 without one */
  heldAt(temperature: number): number;
}

/** Of an isothermal run: a window's ends then move by less than 0.0001 K. */
const windowTolerance = 1e-6;

/** Temperatures are held apart by more than this; it only bounds the memory of a study. */
const remembered = 400;

/**
 * Opens a step for study.
 *
 * @param step SI numbers
 * @param accuracy of the quadratures
 */
export function studyOf(step: Step, accuracy: Accuracy = "full"): Study {
  const runaway = runawayOf(step);
  const { rate } = step.reaction;
  const known = new Map<number, Dosing | null>();
  const dosingAt = (temperature: number): Dosing | null => {
    if (rate === null) return null;
    const before = known.get(temperature);
    if (before !== undefined) return before;
    if (known.size >= remembered) known.clear();
    const dosing = doseAt(step, rate, temperature, windowTolerance);
    known.set(temperature, dosing);
    return dosing;
  };
  return {
    step,
    runaway,
    accuracy,
    dosingAt,
    mtsrAt(temperature) {
      const dosing = dosingAt(temperature);
      return dosing === null ? null : temperature + dosing.rise.value;
    },
    heldAt: (temperature) =>
      runaway === null ? 0 : progressAfterHold(runaway, temperature, step.limits.availableTime),
  };
}
