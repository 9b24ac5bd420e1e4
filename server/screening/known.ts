import { fitTable, type TableFit } from "../kinetics/fit.js";
import { type PairCovariance, type PairErrors, pairErrors } from "../kinetics/interval.js";
import type { DecompositionRate, RateConstant } from "../kinetics/parameters.js";
import type { CaseModel } from "./model.js";

/** What is worked out once about a typed rate constant, before any temperature or draw is looked at. */
export interface KnownRate {
  readonly fit: TableFit | null;
  /** covariance of ln A and E; null where the form has no fitted pair or its errors do not make one */
  readonly covariance: PairCovariance | null;
  /** errors of a typed pair; null for the other forms */
  readonly pair: PairErrors | null;
  /** points less two; null where the number of points is not known */
  readonly degreesOfFreedom: number | null;
  readonly fittedRange: readonly [number, number] | null;
}

export interface KnownRates {
  readonly reaction: KnownRate | null;
  readonly decomposition: KnownRate | null;
  /** K by which a measured accumulation exceeds the rise that the kinetics give; 0 without one */
  readonly measuredExcess: number;
}

/**
 * Fits the tables of a case and rebuilds the covariances of its activation pairs.
 *
 * @param model parsed case
 */
export function knownRates(model: CaseModel): KnownRates {
  const { rateConstant } = model.reaction;
  return {
    reaction: rateConstant === null ? null : knownRate(rateConstant),
    decomposition: model.decomposition === null ? null : knownRate(model.decomposition.rateConstant),
    measuredExcess: 0,
  };
}

function knownRate(parameters: DecompositionRate | RateConstant): KnownRate {
  switch (parameters.form) {
    case "table": {
      const fit = fitTable(parameters);
      const form = fit[fit.fitAs];
      const [barrierError, interceptError] =
        fit.fitAs === "eyring"
          ? [fit.eyring.activationEnthalpyError, fit.eyring.line.interceptError]
          : [fit.arrhenius.activationEnergyError, fit.arrhenius.lnPreExponentialError];
      return {
        fit,
        covariance: {
          intercept: interceptError ** 2,
          barrier: barrierError ** 2,
          both: form.correlation * interceptError * barrierError,
        },
        pair: null,
        degreesOfFreedom: fit.degreesOfFreedom,
        fittedRange: fit.fittedRange,
      };
    }
    case "eyring":
    case "arrhenius": {
      const pair = pairErrors(parameters);
      const { points } = parameters;
      return {
        fit: null,
        covariance: pair.covariance,
        pair,
        degreesOfFreedom: points !== null && points > 2 ? points - 2 : null,
        fittedRange: parameters.fittedRange,
      };
    }
    case "reference":
      return {
        fit: null,
        covariance: null,
        pair: null,
        degreesOfFreedom: null,
        fittedRange: parameters.fittedRange,
      };
    default:
      return { fit: null, covariance: null, pair: null, degreesOfFreedom: null, fittedRange: null };
  }
}
