import { fromArrhenius, lnRateConstant } from "../kinetics/rateConstant.js";
import { adiabaticRise } from "../thermal/balance.js";
import { timeToConversion } from "../thermal/completion.js";
import { doseAt } from "../thermal/dosing.js";
import type { Step } from "../thermal/step.js";
import { type Isothermal, integrated } from "../window/study.js";

/** A batch at constant temperature with k = 1: every rate is proportional to k, every time inversely. */
export interface BatchAtUnitRate {
  /** initial rate, mol/s */
  readonly fastest: number;
  /** time to the target conversion, s */
  readonly completion: number;
}

/**
 * Looks at a batch with k = 1 of its unit.
 *
 * @param step SI numbers of a batch
 */
export function batchAtUnitRate(step: Step): BatchAtUnitRate {
  const dosing = doseAt(step, fromArrhenius(0, 0), step.reaction.temperature);
  if (dosing === null) throw new Error("A batch needs no integration that could fail");
  return {
    fastest: dosing.fastest.value,
    completion: timeToConversion(dosing, step.limits.targetConversion),
  };
}

/**
 * The isothermal step of a batch at any temperature from its figures at k = 1; its rise is the adiabatic one.
 *
 * @param step SI numbers of a batch
 * @param unit its figures at k = 1
 */
export function batchFigures(step: Step, unit: BatchAtUnitRate): Isothermal {
  const { rate } = step.reaction;
  if (rate === null) return integrated(step);
  const rise = adiabaticRise(step);
  const k = (temperature: number): number => Math.exp(lnRateConstant(rate, temperature));
  return {
    figuresAt(temperature) {
      const value = unit.fastest * k(temperature);
      return { rise, fastest: { value, at: 0 }, endRate: value };
    },
    courseAt: () => null,
    completionAt: (temperature) => unit.completion / k(temperature),
  };
}
