import { coolingCapacity } from "../thermal/cooling.js";
import { type Criticality, criticalityClass } from "../thermal/criticality.js";
import { measuredDosing } from "../thermal/measuredAccumulation.js";
import { type Runaway, timeToMaximumRate } from "../thermal/runaway.js";
import { day, td24, td24Range } from "../thermal/td24.js";
import type { Study } from "../window/study.js";
import type { MeasuredAccumulation } from "./model.js";

/** Figures of one draw at its planned temperature. A figure that cannot be had counts as the worst there is. */
export interface DrawnOutcome {
  /** K; null without a decomposition. Infinite beyond the range in which it is looked for */
  readonly td24: number | null;
  /** K; null where it is not known at the estimates either */
  readonly mtsr: number | null;
  /** s */
  readonly timeAtProcess: number | null;
  /** s */
  readonly timeAtMtsr: number | null;
  /** cooling duty over capacity; infinite where the capacity is not positive */
  readonly coolingUse: number | null;
  readonly criticality: Criticality | null;
}

/**
 * The figures of one draw.
 *
 * @param study of the draw
 * @param measured accumulation of the case, which stands in where no rate constant is known
 * @param guess of T_D24, K
 */
export function outcomeOf(study: Study, measured: MeasuredAccumulation | null, guess: number): DrawnOutcome {
  const { step, runaway } = study;
  const process = step.reaction.temperature;
  const limit = runaway === null ? null : limitTemperature(runaway, guess);
  const mtsr = mtsrOf(study, measured);
  const mtt = step.limits.maximumTechnicalTemperature;
  return {
    td24: limit,
    mtsr,
    timeAtProcess: runaway === null ? null : time(runaway, process),
    timeAtMtsr: runaway === null || mtsr === null ? null : time(runaway, mtsr),
    coolingUse: coolingUse(study),
    criticality: limit === null || mtsr === null ? null : criticalityClass(process, mtsr, mtt, limit),
  };
}

/**
 * T_D24 of a draw. Beyond the range in which it is looked for it counts as infinitely high only where TMRad is
 * longer than a day at both ends of that range; else as infinitely low, which makes the class "none".
 */
export function limitTemperature(runaway: Runaway, guess: number): number {
  const found = td24(runaway, guess, "draws");
  if (found !== null) return found;
  const slow = td24Range.every((at) => timeToMaximumRate(runaway, at, 0, "draws").time > day);
  return slow ? Number.POSITIVE_INFINITY : Number.NEGATIVE_INFINITY;
}

/** MTSR of a draw, K; null where neither kinetics nor a measurement tell it. One that cannot be had counts as infinite. */
export function mtsrOf(study: Study, measured: MeasuredAccumulation | null): number | null {
  const { temperature, rate } = study.step.reaction;
  if (rate !== null) return study.mtsrAt(temperature) ?? Number.POSITIVE_INFINITY;
  return measured === null ? null : temperature + measuredDosing(study.step, measured).rise.value;
}

function time(runaway: Runaway, start: number): number {
  if (start === Number.POSITIVE_INFINITY) return 0;
  const found = timeToMaximumRate(runaway, start, 0, "draws").time;
  return Number.isNaN(found) ? 0 : found;
}

function coolingUse(study: Study): number | null {
  const { temperature, rate } = study.step.reaction;
  if (rate === null) return null;
  const capacity = coolingCapacity(study.step, temperature);
  if (!(capacity > 0)) return Number.POSITIVE_INFINITY;
  const duty = study.dutyAt(temperature);
  return Number.isNaN(duty) ? Number.POSITIVE_INFINITY : duty / capacity;
}

/** Whether two decompositions are the same to the last digit. */
export function sameRunaway(a: Runaway, b: Runaway): boolean {
  return (
    a.rise === b.rise &&
    a.rate.lnPreExponential === b.rate.lnPreExponential &&
    a.rate.temperaturePower === b.rate.temperaturePower &&
    a.rate.activationEnergy === b.rate.activationEnergy &&
    a.law.autocatalytic === b.law.autocatalytic &&
    a.law.order === b.law.order &&
    a.law.productOrder === b.law.productOrder &&
    a.law.initiation === b.law.initiation
  );
}
