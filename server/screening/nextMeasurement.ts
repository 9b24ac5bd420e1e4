import { lnVariance } from "../kinetics/interval.js";
import { bestMeasurement, varianceAfter } from "../kinetics/nextMeasurement.js";
import type { NextMeasurementFindings, NextMeasurements } from "./decisionFindings.js";
import type { Findings } from "./findings.js";
import type { KnownRate, KnownRates } from "./known.js";
import type { CaseModel } from "./model.js";

/** Relative error of a rate constant where no fit tells one: an assumption, which the findings say. */
const assumedError = 0.05;

/** Places of the curve over the fitted range. */
const places = 33;

/**
 * The rate constants to measure next: where one more k most lowers the variance of ln k at the temperature that
 * matters, Tp for the reaction and T_D24 for the decomposition. Looked for within the fitted range, where the
 * method of measurement is known to work.
 *
 * @param model parsed case
 * @param known its fits and covariances
 * @param temperatures of the findings
 */
export function nextMeasurements(
  model: CaseModel,
  known: KnownRates,
  temperatures: Findings["temperatures"],
): NextMeasurements {
  return {
    reaction: nextOf(model.reaction.rateConstant?.form, known.reaction, temperatures.process_K, "Tp"),
    decomposition: nextOf(
      model.decomposition?.rateConstant.form,
      known.decomposition,
      temperatures.td24_K,
      "T_D24",
    ),
  };
}

function nextOf(
  form: string | undefined,
  known: KnownRate | null,
  matters: number | null,
  name: string,
): NextMeasurementFindings | null {
  if (known === null || !(form === "table" || form === "eyring" || form === "arrhenius")) return null;
  const { covariance, fit, fittedRange } = known;
  const scatter = fit === null ? 0 : fit[fit.fitAs].residualStandardDeviation;
  const fromFit = scatter > 0;
  const relativeError = fromFit ? scatter : assumedError;
  const common = {
    relativeError,
    relativeErrorFrom: fromFit ? "fit" : "assumed",
    range_K: fittedRange,
    matters_K: matters,
  } as const;
  const without = (why: string): NextMeasurementFindings => ({
    ...common,
    at_K: null,
    deviationNow: null,
    deviationThen: null,
    curve: [],
    why,
  });
  if (matters === null) return without(`${name} is not known, so it cannot be said where ln k matters.`);
  if (known.pair?.errorsTyped === false)
    return without("The activation pair carries no standard errors, so none can be lowered.");
  if (covariance === null)
    return without(
      "The correlation of the activation pair is neither typed nor to be rebuilt from the fitted range and the number of points, so it cannot be said how much another rate constant would tell.",
    );
  if (fittedRange === null)
    return without(
      "The fitted range is not given, so it is not known at which temperatures a rate constant can be measured.",
    );
  const now = lnVariance(covariance, matters);
  if (!(now > 0)) return without("The rate constant carries no error where it matters.");
  const [low, high] = fittedRange;
  const after = (at: number): number => Math.sqrt(varianceAfter(covariance, matters, at, relativeError));
  const at = bestMeasurement(covariance, matters, fittedRange, relativeError);
  return {
    ...common,
    at_K: at,
    deviationNow: Math.sqrt(now),
    deviationThen: after(at),
    curve: Array.from({ length: places }, (_, i) => {
      const temperature = low + ((high - low) * i) / (places - 1);
      return { temperature_K: temperature, deviation: after(temperature) };
    }),
    why: null,
  };
}
