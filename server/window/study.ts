import { timeToConversion } from "../thermal/completion.js";
import { runawayOf } from "../thermal/cooling.js";
import { type Dosing, type DosingFigures, doseAt, figuresOf } from "../thermal/dosing.js";
import { progressAfterHold } from "../thermal/history.js";
import type { Accuracy, Runaway } from "../thermal/runaway.js";
import type { Step } from "../thermal/step.js";

/** The isothermal step over temperature, however its figures are come by. */
export interface Isothermal {
  /** null where it could not be integrated or no rate constant is known */
  figuresAt(temperature: number): DosingFigures | null;
  /** the whole step, integrated; null as above */
  dosingAt(temperature: number): Dosing | null;
  /** time to the target conversion, s; infinite where it is never reached, NaN where it is not known */
  completionAt(temperature: number): number;
}

/** A step looked at over process temperatures. */
export interface Study {
  readonly step: Step;
  readonly runaway: Runaway | null;
  readonly accuracy: Accuracy;
  readonly isothermal: Isothermal;
  /** maximum temperature of the synthesis reaction, K; null where the isothermal step is not known */
  mtsrAt(temperature: number): number | null;
  /** progress of the decomposition that the available time at a temperature leaves behind; 0 without one */
  heldAt(temperature: number): number;
}

/** Of an isothermal run: a window's ends then move by less than 0.0001 K. */
const windowTolerance = 1e-6;

/** Temperatures are held apart by more than this; it only bounds the memory of a study. */
const remembered = 400;

/**
 * The isothermal step, integrated once at each temperature that is asked for.
 *
 * @param step SI numbers
 */
export function integrated(step: Step): Isothermal {
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
    figuresAt(temperature) {
      const dosing = dosingAt(temperature);
      return dosing === null ? null : figuresOf(dosing);
    },
    dosingAt,
    completionAt(temperature) {
      const dosing = dosingAt(temperature);
      return dosing === null ? Number.NaN : timeToConversion(dosing, step.limits.targetConversion);
    },
  };
}

/**
 * Opens a step for study.
 *
 * @param step SI numbers
 * @param accuracy of the quadratures
 * @param isothermal the step at constant temperature; integrated unless it is known otherwise
 */
export function studyOf(
  step: Step,
  accuracy: Accuracy = "full",
  isothermal: Isothermal = integrated(step),
): Study {
  const runaway = runawayOf(step);
  return {
    step,
    runaway,
    accuracy,
    isothermal,
    mtsrAt(temperature) {
      const figures = isothermal.figuresAt(temperature);
      return figures === null ? null : temperature + figures.rise;
    },
    heldAt: (temperature) =>
      runaway === null ? 0 : progressAfterHold(runaway, temperature, step.limits.availableTime),
  };
}
