import { expect, test } from "vitest";
import { fromEyring } from "../../server/kinetics/rateConstant.js";
import { normalQuantile } from "../../server/numeric/normal.js";
import { percentile } from "../../server/numeric/percentile.js";
import { td24 } from "../../server/thermal/td24.js";
import { logNormalValue } from "../../server/uncertainty/distribution.js";
import { createDraws } from "../../server/uncertainty/draws.js";
import type { Sample } from "../../server/uncertainty/sample.js";

// The invented ring closure: 3.4 kmol in 1900 kg at 85 degC, an autocatalytic decomposition of the mixture whose
// activation pair rests on five rate constants.
const heatCapacity = { value: 2050, standardError: 60 };
const reactionHeat = { value: -84_000, standardError: 3000 };
const decompositionHeat = { value: 610_000, standardError: 40_000 };
const [entropyError, enthalpyError, correlation] = [9.4 / 8.31446261815324, 4000, 0.998];
const covariance = {
  intercept: entropyError ** 2,
  barrier: enthalpyError ** 2,
  both: correlation * entropyError * enthalpyError,
};
const law = { autocatalytic: true, order: 1, productOrder: 1, initiation: 0.02 };
const typed = fromEyring(121_000, -8, 1000, 1, 1);

function limitTemperature(sample: Sample): number {
  const [intercept, barrier] = sample.pair("/decomposition/rateConstant", covariance, 3);
  const rate = {
    ...typed,
    lnPreExponential: typed.lnPreExponential + intercept,
    activationEnergy: typed.activationEnergy + barrier,
  };
  const heat = sample.logNormal("/decomposition/heat", decompositionHeat);
  const rise = heat / sample.logNormal("/mixture/heatCapacity", heatCapacity);
  return td24({ law, rate, rise }, 361, "draws") ?? NaN;
}

function synthesisTemperature(sample: Sample): number {
  const heat = sample.normal("/reaction/heat", reactionHeat);
  return 358.15 - (3400 * heat) / (1900 * sample.logNormal("/mixture/heatCapacity", heatCapacity));
}

function percentiles(output: (sample: Sample) => number, count?: number, only?: string): readonly number[] {
  const draws = createDraws(count);
  const values = Float64Array.from({ length: draws.count }, (_, i) => output(draws.sample(i, only))).sort();
  return [0.05, 0.5, 0.95].map((p) => percentile(values, p));
}

function expectWithin(ours: readonly number[], theirs: readonly number[], tolerance: number): void {
  ours.forEach((each, i) => {
    expect(Math.abs(each - theirs[i])).toBeLessThan(tolerance);
  });
}

// 60,000 plain random draws of an independent implementation.
test("T_D24 of the ring closure has the percentiles of 60,000 independent random draws", () => {
  expectWithin(percentiles(limitTemperature), [356.8, 361.29, 365.3], 0.4);
});

test("MTSR of the ring closure has the percentiles of 60,000 independent random draws", () => {
  expectWithin(percentiles(synthesisTemperature), [426.06, 431.43, 437.16], 0.4);
});

test("50,000 draws of T_D24 and MTSR agree with 2,000 within 0.4 K", () => {
  expectWithin(percentiles(limitTemperature, 50_000), percentiles(limitTemperature), 0.4);
  expectWithin(percentiles(limitTemperature, 50_000), [356.8, 361.29, 365.3], 0.1);
  expectWithin(percentiles(synthesisTemperature, 50_000), percentiles(synthesisTemperature), 0.4);
});

test("with the error of the decomposition heat alone T_D24 has its exact one-dimensional percentiles", () => {
  const exact = [0.05, 0.5, 0.95].map((p) => {
    // The more heat, the lower T_D24.
    const heat = logNormalValue(decompositionHeat, normalQuantile(1 - p));
    return td24({ law, rate: typed, rise: heat / heatCapacity.value }) ?? NaN;
  });
  const ours = percentiles(limitTemperature, 2000, "/decomposition/heat");
  expectWithin(ours, exact, 0.01 * (exact[2] - exact[0]));
});
