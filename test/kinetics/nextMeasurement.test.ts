import { describe, expect, test } from "vitest";
import { fitTable, type TableFit } from "../../server/kinetics/fit.js";
import { lnVariance, type PairCovariance } from "../../server/kinetics/interval.js";
import { bestMeasurement, varianceAfter } from "../../server/kinetics/nextMeasurement.js";
import { lnRateConstant } from "../../server/kinetics/rateConstant.js";
import { gasConstant } from "../../server/numeric/constants.js";
import { normalQuantile } from "../../server/numeric/normal.js";
import { latinColumn } from "../../server/numeric/sampling.js";

/** Invented: barrier 4 kJ/mol, and a correlation close to one. */
function pairOf(correlation: number, interceptError = 1.13, barrierError = 4000): PairCovariance {
  return {
    intercept: interceptError ** 2,
    barrier: barrierError ** 2,
    both: correlation * interceptError * barrierError,
  };
}

/** S - S x x' S/(s^2 + x' S x) by matrices, the form of the text books. */
function updated(covariance: PairCovariance, measured: number, relativeError: number): PairCovariance {
  const { intercept, barrier, both } = covariance;
  const x = -1 / (gasConstant * measured);
  const first = intercept + both * x;
  const second = both + barrier * x;
  const scale = relativeError ** 2 + first + second * x;
  return {
    intercept: intercept - first ** 2 / scale,
    barrier: barrier - second ** 2 / scale,
    both: both - (first * second) / scale,
  };
}

describe("the variance of ln k after one more rate constant", () => {
  test.each([0.5, 0.99, 0.9999])("is that of the updated covariance, at a correlation of %d", (rho) => {
    const covariance = pairOf(rho);
    for (const measured of [330, 413, 463])
      for (const error of [0.01, 0.05, 0.5]) {
        const expected = lnVariance(updated(covariance, measured, error), 361);
        expect(varianceAfter(covariance, 361, measured, error) / expected).toBeCloseTo(1, 6);
      }
  });

  test("never exceeds the variance before, and of a useless measurement is that variance", () => {
    const covariance = pairOf(0.9999, 30, 100_000);
    const before = lnVariance(covariance, 361);
    for (let at = 250; at < 600; at += 10)
      expect(varianceAfter(covariance, 361, at, 0.05)).toBeLessThanOrEqual(before * (1 + 1e-12));
    expect(varianceAfter(covariance, 361, 400, 1e9) / before).toBeCloseTo(1, 9);
  });

  test("measured where it matters leaves the two variances in parallel", () => {
    const covariance = pairOf(0.998);
    const before = lnVariance(covariance, 361);
    const both = 1 / (1 / before + 1 / 0.05 ** 2);
    expect(varianceAfter(covariance, 361, 361, 0.05) / both).toBeCloseTo(1, 12);
  });
});

describe("the best temperature", () => {
  test.each([
    [0.5, 361],
    [0.998, 361],
    [0.9999, 361],
    [0.9999, 440],
    [-0.9, 400],
  ])("is that of a search, at a correlation of %d and where %d K matters", (rho, matters) => {
    const covariance = rho === 0.9999 ? pairOf(rho, 28, 100_000) : pairOf(rho);
    for (const range of [[413, 463] as const, [300, 700] as const]) {
      const best = bestMeasurement(covariance, matters, range, 0.05);
      const least = varianceAfter(covariance, matters, best, 0.05);
      expect(best).toBeGreaterThanOrEqual(range[0]);
      expect(best).toBeLessThanOrEqual(range[1]);
      for (let i = 0; i <= 2000; i += 1) {
        const at = range[0] + ((range[1] - range[0]) * i) / 2000;
        expect(least).toBeLessThanOrEqual(varianceAfter(covariance, matters, at, 0.05) * (1 + 1e-12));
      }
    }
  });
});

describe("against refitting 2,000 generated tables with the added row", () => {
  const repeats = 2000;
  const scatter = 0.05;
  const [energy, intercept, matters] = [98_000, 22, 325];
  const temperatures = [343, 350, 357, 364, 371, 378];
  const measured = 343;
  const truth = (temperature: number): number => intercept - energy / (gasConstant * temperature);
  const noise = [...temperatures, measured].map((_, row) =>
    latinColumn(`row ${row}`, repeats, 20_260).map(normalQuantile),
  );

  function fitted(rows: readonly number[], repeat: number): TableFit {
    return fitTable({
      form: "table",
      order: 1,
      fitAs: "arrhenius",
      viscosity: null,
      rows: rows.map((temperature, row) => ({
        temperature,
        lnRateConstant: truth(temperature) + scatter * (noise[row]?.[repeat] ?? Number.NaN),
        relativeError: null,
        leftOut: null,
      })),
    });
  }

  function covarianceOf({ arrhenius }: TableFit): PairCovariance {
    const { lnPreExponentialError, activationEnergyError, correlation } = arrhenius;
    return {
      intercept: lnPreExponentialError ** 2,
      barrier: activationEnergyError ** 2,
      both: correlation * lnPreExponentialError * activationEnergyError,
    };
  }

  const all = Array.from({ length: repeats }, (_, repeat) => {
    const before = fitted(temperatures, repeat);
    const after = fitted([...temperatures, measured], repeat);
    return {
      promised: varianceAfter(
        covarianceOf(before),
        matters,
        measured,
        before.arrhenius.residualStandardDeviation,
      ),
      kept: lnVariance(covarianceOf(after), matters),
      error: lnRateConstant(after.arrhenius.rate, matters) - truth(matters),
    };
  });
  const mean = (of: (each: (typeof all)[number]) => number): number =>
    all.reduce((sum, each) => sum + of(each), 0) / repeats;

  test("the promised variance is the refit's within 3 %", () => {
    const promised = mean((each) => each.promised);
    expect(Math.abs(promised / mean((each) => each.kept) - 1)).toBeLessThan(0.03);
  });

  test("and that with which ln k scatters about the truth within 3 %", () => {
    const promised = mean((each) => each.promised);
    expect(Math.abs(promised / mean((each) => each.error ** 2) - 1)).toBeLessThan(0.03);
  });
});
