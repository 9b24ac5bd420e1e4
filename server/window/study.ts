import { timeToConversion } from "../thermal/completion.js";
import { coolingDutyFrom, runawayOf } from "../thermal/cooling.js";
import {
  courseOf,
  type Dosing,
  type DosingFigures,
  doseAt,
  figuresOf,
  type RateCourse,
} from "../thermal/dosing.js";
import { progressAfterHold } from "../thermal/history.js";
import type { Accuracy, Runaway } from "../thermal/runaway.js";
import type { Step } from "../thermal/step.js";

/** The isothermal step over temperature, however its figures are come by. */
export interface Isothermal {
  /** null where it could not be integrated or no rate constant is known */
  figuresAt(temperature: number): DosingFigures | null;
  /** the rate of reaction over the feed; null as above and for a batch */
  courseAt(temperature: number): RateCourse | null;
  /** time to the target conversion, s; infinite where it is never reached, NaN where it is not known */
  completionAt(temperature: number): number;
}

/** A step looked at over process temperatures. */
export interface Study {
  readonly step: Step;
  readonly runaway: Runaway | null;
  readonly accuracy: Accuracy;
  readonly isothermal: Isothermal;
  /** largest heat to be removed at a temperature, W; NaN where the isothermal step is not known */
  dutyAt(temperature: number): number;
  /** maximum temperature of the synthesis reaction, K; null where the isothermal step is not known */
  mtsrAt(temperature: number): number | null;
  /** progress of the decomposition that the available time at a temperature leaves behind; 0 without one */
  heldAt(temperature: number): number;
}

/** Of an isothermal run: a window's ends then move by less than 0.0001 K. */
const windowTolerance = 1e-6;

/** Part of the largest heat below which a decomposition is not looked at over the feed: under 0.001 K. */
const negligibleHeat = 1e-5;

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
    courseAt(temperature) {
      const dosing = dosingAt(temperature);
      return dosing === null ? null : courseOf(dosing);
    },
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
    dutyAt(temperature) {
      const figures = isothermal.figuresAt(temperature);
      if (figures === null) return Number.NaN;
      const course = () => isothermal.courseAt(temperature);
      return coolingDutyFrom(step, temperature, figures, course, negligibleHeat);
    },
    mtsrAt(temperature) {
      const figures = isothermal.figuresAt(temperature);
      return figures === null ? null : temperature + figures.rise;
    },
    heldAt: (temperature) =>
      runaway === null ? 0 : progressAfterHold(runaway, temperature, step.limits.availableTime),
  };
}
