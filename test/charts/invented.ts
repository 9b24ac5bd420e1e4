import type { Findings, RateFindings, TmradFindings } from "../../server/screening/findings.js";

/*
 * Findings made up for the tests of the figures: smooth curves of plausible size, not screened from any case.
 */

const gas = 8.314462618;
/** 0 degC, K */
export const zero = 273.15;

/** Evenly spaced numbers, both ends among them. */
export function range(from: number, to: number, count: number): number[] {
  return Array.from({ length: count }, (_, at) => from + ((to - from) * at) / (count - 1));
}

/** A rate constant by Arrhenius with an interval that widens away from its fitted range. */
export function inventedRate(
  lnA: number,
  energy: number,
  process: number,
  temperatures: readonly number[],
  fitted: readonly [number, number] | null,
): RateFindings {
  const k = (kelvin: number) => Math.exp(lnA - energy / (gas * kelvin));
  const middle = fitted === null ? process : (fitted[0] + fitted[1]) / 2;
  const spread = (kelvin: number) => Math.exp(0.04 + 3e3 * Math.abs(1 / kelvin - 1 / middle));
  return {
    atProcess: {
      temperature_K: process,
      k: k(process),
      unit: "1/s",
      low95: fitted === null ? null : k(process) / spread(process),
      high95: fitted === null ? null : k(process) * spread(process),
      extrapolation_K:
        fitted === null ? null : Math.min(0, process - fitted[0]) || Math.max(0, process - fitted[1]),
      apparentActivationEnergy_J_mol: energy,
    },
    table: temperatures.map((kelvin) => ({
      temperature_K: kelvin,
      k: k(kelvin),
      low95: fitted === null ? null : k(kelvin) / spread(kelvin),
      high95: fitted === null ? null : k(kelvin) * spread(kelvin),
      extrapolated: fitted === null ? null : kelvin < fitted[0] || kelvin > fitted[1],
    })),
    eyring: {
      activationEnthalpy_J_mol: energy - 2.6e3,
      activationEntropy_J_molK: -20,
      activationEnthalpyError_J_mol: null,
      activationEntropyError_J_molK: null,
      correlation: null,
      standardConcentration_mol_m3: 1000,
      transmissionCoefficient: 1,
      equivalentAt_K: process,
    },
    arrhenius: {
      lnPreExponential: lnA,
      activationEnergy_J_mol: energy,
      lnPreExponentialError: null,
      activationEnergyError_J_mol: null,
      correlation: null,
      equivalentAt_K: null,
    },
    fittedRange_K: fitted,
    fit: null,
  };
}

/** TMRad falls by about half with each six kelvin; the closed form crosses it at `crossing`. */
export function inventedTimes(process: number, mtsr: number, td24: number, crossing: number): TmradFindings {
  const time = (kelvin: number) => 86400 * Math.exp(14e3 * (1 / kelvin - 1 / td24));
  const closed = (kelvin: number) => time(kelvin) * Math.exp((kelvin - crossing) / 60);
  return {
    atProcess_s: time(process),
    atMtsr_s: time(mtsr),
    zeroOrderAtProcess_s: closed(process),
    zeroOrderCautious: false,
    likelihood: "high",
    curve: range(process - 30, Math.max(mtsr, td24) + 20, 61).map((kelvin) => ({
      temperature_K: kelvin,
      time_s: time(kelvin),
      zeroOrder_s: closed(kelvin),
    })),
  };
}

const batchRate = inventedRate(27, 107e3, 85 + zero, range(40 + zero, 120 + zero, 41), [
  50 + zero,
  78 + zero,
]);

/** A batch case with everything that a batch case can have. */
export const inventedBatch: Findings = {
  format: "thermal-window/findings-1",
  notice: "Invented for a test.",
  program: { name: "thermal-window", version: "0" },
  digest: "0".repeat(64),
  rate: {
    ...batchRate,
    fit: {
      residualStandardDeviation: 0.021,
      degreesOfFreedom: 3,
      curvatureP: 0.41,
      rows: [50, 57, 64, 71, 78, 85].map((celsius, at) => {
        const kelvin = celsius + zero;
        const fitted = Math.exp(27 - 107e3 / (gas * kelvin));
        const residual = [0.014, -0.022, 0.006, 0.019, -0.017, 0.06][at] ?? 0;
        return {
          temperature_K: kelvin,
          k: fitted * Math.exp(residual),
          fitted,
          residual,
          leverage: 0.3,
          leftOut: at === 5 ? "sample warmed" : null,
        };
      }),
    },
  },
  decompositionRate: inventedRate(31, 124e3, 85 + zero, range(60 + zero, 200 + zero, 36), [
    140 + zero,
    190 + zero,
  ]),
  heat: {
    adiabaticRise_K: 73.3,
    severity: "medium",
    decompositionRise_K: 297.6,
    decompositionSeverity: "high",
  },
  accumulation: null,
  temperatures: {
    process_K: 85 + zero,
    mtsr_K: 158.32 + zero,
    mtt_K: 165 + zero,
    td24_K: 88.16 + zero,
    allAtOnce_K: null,
  },
  timeToMaximumRate: inventedTimes(85 + zero, 158.32 + zero, 88.16 + zero, 75 + zero),
  criticality: { class: 5, probability: null },
  cooling: null,
  window: null,
  failures: null,
  uncertainty: {
    draws: 2000,
    seed: 1,
    td24_K: { p05: 78.1 + zero, p50: 88.1 + zero, p95: 97.6 + zero },
    mtsr_K: { p05: 153.0 + zero, p50: 158.3 + zero, p95: 163.9 + zero },
    upper_K: null,
    timeToMaximumRateAtProcess_s: null,
    timeToMaximumRateAtMtsr_s: null,
    coolingUse: null,
    timeToAct_s: null,
    drivers: null,
    nextMeasurement: null,
  },
  workings: [],
  cautions: [],
};

/** What is left where hardly anything was given: every part that may be null is null. */
export const inventedBare: Findings = {
  ...inventedBatch,
  rate: null,
  decompositionRate: null,
  heat: {
    ...inventedBatch.heat,
    decompositionRise_K: null,
    decompositionSeverity: null,
  },
  temperatures: {
    process_K: 35 + zero,
    mtsr_K: null,
    mtt_K: 78 + zero,
    td24_K: null,
    allAtOnce_K: null,
  },
  timeToMaximumRate: null,
  criticality: { class: null, probability: null },
  uncertainty: null,
};
