import { confidenceFactor, lnVariance, referenceVariance } from "../kinetics/interval.js";
import type { DecompositionRate } from "../kinetics/parameters.js";
import { extrapolation } from "../kinetics/plausibility.js";
import {
  apparentActivationEnergy,
  arrheniusAt,
  eyringAt,
  lnRateConstant,
  type ModifiedArrhenius,
} from "../kinetics/rateConstant.js";
import { gasConstant } from "../numeric/constants.js";
import { numberText, superscript } from "../words/numbers.js";
import type { FitFindings, RateFindings } from "./findings.js";
import type { KnownRate } from "./known.js";

/** Standard concentration in which an equivalent activation entropy is given: 1 mol/L, mol/m^3. */
const usualStandard = 1000;

/** Temperatures in a table of k(T). */
const tableRows = 41;

/**
 * The findings of one rate constant: k with its interval at the process temperature and over a range, and the
 * parameters in both forms.
 *
 * @param parameters as typed
 * @param known its fit or covariance
 * @param rate at the estimates
 * @param order overall order of its rate law
 * @param process planned temperature, K
 * @param span of the table, K; widened to hold the fitted range and the process temperature
 */
export function rateFindings(
  parameters: DecompositionRate,
  known: KnownRate,
  rate: ModifiedArrhenius,
  order: number,
  process: number,
  span: readonly [number, number],
): RateFindings {
  const range = known.fittedRange;
  const low = Math.min(span[0], process, range?.[0] ?? process);
  const high = Math.max(span[1], process, range?.[1] ?? process);
  const grid = Array.from({ length: tableRows }, (_, i) => low + ((high - low) * i) / (tableRows - 1));
  const marked = range === null ? grid : [...grid, ...range];
  const temperatures = [...new Set([...marked, process])].sort((a, b) => a - b);
  const at = (temperature: number): { k: number | null; low95: number | null; high95: number | null } =>
    withInterval(parameters, known, rate, temperature);
  return {
    atProcess: {
      temperature_K: process,
      ...at(process),
      unit: rateUnit(order),
      extrapolation_K: range === null ? null : extrapolation(process, range),
      apparentActivationEnergy_J_mol: apparentActivationEnergy(rate, process),
    },
    table: temperatures.flatMap((temperature) => {
      const { k, low95, high95 } = at(temperature);
      if (k === null || k === 0) return [];
      const extrapolated = range === null ? null : extrapolation(temperature, range) !== 0;
      return [{ temperature_K: temperature, k, low95, high95, extrapolated }];
    }),
    ...bothForms(parameters, known, rate, order, range === null ? process : (range[0] + range[1]) / 2),
    fittedRange_K: range,
    fit: fitFindings(known),
  };
}

/** Variance of ln k with the factor of its 95 % interval; null without usable errors. */
function spread(
  parameters: DecompositionRate,
  known: KnownRate,
  temperature: number,
): { readonly deviation: number; readonly factor: number } | null {
  const variance =
    known.covariance !== null
      ? lnVariance(known.covariance, temperature)
      : parameters.form === "reference"
        ? referenceVariance(parameters, temperature)
        : null;
  if (variance === null) return null;
  const points = known.degreesOfFreedom === null ? null : known.degreesOfFreedom + 2;
  return { deviation: Math.sqrt(variance), factor: confidenceFactor(points) };
}

function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

function withInterval(
  parameters: DecompositionRate,
  known: KnownRate,
  rate: ModifiedArrhenius,
  temperature: number,
): { k: number | null; low95: number | null; high95: number | null } {
  const lnK = lnRateConstant(rate, temperature);
  const about = spread(parameters, known, temperature);
  if (about === null) return { k: finite(Math.exp(lnK)), low95: null, high95: null };
  const half = about.factor * about.deviation;
  return {
    k: finite(Math.exp(lnK)),
    low95: finite(Math.exp(lnK - half)),
    high95: finite(Math.exp(lnK + half)),
  };
}

/**
 * Unit of a rate constant of overall order n, (m^3/mol)^(n-1)/s.
 *
 * @param order n
 */
function rateUnit(order: number): string {
  if (order === 1) return "s⁻¹";
  if (order === 2) return "m³ mol⁻¹ s⁻¹";
  if (Number.isInteger(order)) return `m${superscript(3 * (order - 1))} mol${superscript(1 - order)} s⁻¹`;
  return `(m³/mol)^${numberText(order - 1)} s⁻¹`;
}

function bothForms(
  parameters: DecompositionRate,
  known: KnownRate,
  rate: ModifiedArrhenius,
  order: number,
  tangentAt: number,
): Pick<RateFindings, "eyring" | "arrhenius"> {
  const { fit, covariance } = known;
  if (fit !== null) {
    return {
      eyring: {
        activationEnthalpy_J_mol: fit.eyring.activationEnthalpy,
        activationEntropy_J_molK: fit.eyring.activationEntropy,
        activationEnthalpyError_J_mol: fit.eyring.activationEnthalpyError,
        activationEntropyError_J_molK: fit.eyring.activationEntropyError,
        correlation: fit.eyring.correlation,
        standardConcentration_mol_m3: fit.eyring.standardConcentration,
        transmissionCoefficient: fit.eyring.transmissionCoefficient,
        equivalentAt_K: null,
      },
      arrhenius: {
        lnPreExponential: fit.arrhenius.lnPreExponential,
        activationEnergy_J_mol: fit.arrhenius.activationEnergy,
        lnPreExponentialError: fit.arrhenius.lnPreExponentialError,
        activationEnergyError_J_mol: fit.arrhenius.activationEnergyError,
        correlation: fit.arrhenius.correlation,
        equivalentAt_K: null,
      },
    };
  }
  const typedEyring = parameters.form === "eyring" ? parameters : null;
  const standard = typedEyring?.standardConcentration ?? usualStandard;
  const transmission = typedEyring?.transmissionCoefficient ?? 1;
  const pair = typedEyring
    ? {
        activationEnthalpy: typedEyring.activationEnthalpy.value,
        activationEntropy: typedEyring.activationEntropy.value,
      }
    : eyringAt(rate, tangentAt, standard, transmission, order);
  const arrhenius = arrheniusAt(rate, tangentAt);
  const errors = errorsOf(parameters, covariance);
  return {
    eyring: {
      activationEnthalpy_J_mol: pair.activationEnthalpy,
      activationEntropy_J_molK: pair.activationEntropy,
      activationEnthalpyError_J_mol: errors.barrier,
      activationEntropyError_J_molK: errors.intercept === null ? null : errors.intercept * gasConstant,
      correlation: errors.correlation,
      standardConcentration_mol_m3: standard,
      transmissionCoefficient: transmission,
      equivalentAt_K: typedEyring ? null : tangentAt,
    },
    arrhenius: {
      lnPreExponential: arrhenius.lnPreExponential,
      activationEnergy_J_mol: arrhenius.activationEnergy,
      lnPreExponentialError: errors.intercept,
      activationEnergyError_J_mol: errors.barrier,
      correlation: errors.correlation,
      equivalentAt_K: typedEyring ? tangentAt : null,
    },
  };
}

function errorsOf(
  parameters: DecompositionRate,
  covariance: KnownRate["covariance"],
): { barrier: number | null; intercept: number | null; correlation: number | null } {
  if (covariance !== null) {
    const intercept = Math.sqrt(covariance.intercept);
    const barrier = Math.sqrt(covariance.barrier);
    const correlation = intercept > 0 && barrier > 0 ? covariance.both / (intercept * barrier) : null;
    return { barrier, intercept, correlation };
  }
  switch (parameters.form) {
    case "eyring":
      return {
        barrier: parameters.activationEnthalpy.standardError,
        intercept:
          parameters.activationEntropy.standardError === null
            ? null
            : parameters.activationEntropy.standardError / gasConstant,
        correlation: null,
      };
    case "arrhenius":
      return {
        barrier: parameters.activationEnergy.standardError,
        intercept: parameters.lnPreExponential.standardError,
        correlation: null,
      };
    case "table":
      return { barrier: null, intercept: null, correlation: null };
    default:
      return { barrier: parameters.activationEnergy.standardError, intercept: null, correlation: null };
  }
}

function fitFindings(known: KnownRate): FitFindings | null {
  const { fit } = known;
  if (fit === null) return null;
  const form = fit[fit.fitAs];
  return {
    residualStandardDeviation: form.residualStandardDeviation,
    degreesOfFreedom: fit.degreesOfFreedom,
    curvatureP: form.curvatureP,
    rows: fit.rows.map((row) => ({
      temperature_K: row.temperature,
      k: Math.exp(row.lnRateConstant),
      fitted: finite(Math.exp(row.lnFitted)),
      residual: row.residual,
      leverage: row.leverage,
      leftOut: row.leftOut,
    })),
  };
}
