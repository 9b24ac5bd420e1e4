import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fitTable, meanLnRateConstant, type TableFit } from "../../server/kinetics/fit.js";
import { lnVariance, pairErrors } from "../../server/kinetics/interval.js";
import type { EyringParameters } from "../../server/kinetics/parameters.js";
import { dithionate } from "../../server/screening/checks/rateTables.js";

/** The fit as a person would type it: parameters and errors, perhaps rounded, perhaps without the correlation. */
function typed(fit: TableFit, changes: Partial<EyringParameters> = {}): EyringParameters {
  const { eyring } = fit;
  return {
    form: "eyring",
    order: fit.order,
    activationEnthalpy: { value: eyring.activationEnthalpy, standardError: eyring.activationEnthalpyError },
    activationEntropy: { value: eyring.activationEntropy, standardError: eyring.activationEntropyError },
    standardConcentration: 1000,
    transmissionCoefficient: 1,
    correlation: eyring.correlation,
    fittedRange: fit.fittedRange,
    points: fit.points,
    viscosity: null,
    ...changes,
  };
}

function varianceOf(parameters: EyringParameters, temperature: number): number {
  const { covariance } = pairErrors(parameters);
  return covariance === null ? NaN : lnVariance(covariance, temperature);
}

const temperatures = [273.15, 298.15, 323.15, 343.15, 363.15, 400];

describe("the variance of ln k of evenly spaced temperatures", () => {
  test("rebuilt without a correlation equals the exact regression variance to 1e-10", () => {
    const tables = fc.record({
      low: fc.double({ min: 250, max: 400, noNaN: true }),
      step: fc.double({ min: 2, max: 20, noNaN: true }),
      scatter: fc.array(fc.double({ min: -0.1, max: 0.1, noNaN: true }), { minLength: 3, maxLength: 12 }),
    });
    fc.assert(
      fc.property(tables, ({ low, step, scatter }) => {
        const rows = scatter.map((each, i) => ({
          temperature: low + i * step,
          lnRateConstant: 30 - 12_000 / (low + i * step) + each,
          relativeError: null,
          leftOut: null,
        }));
        const fit = fitTable({ form: "table", order: 1, fitAs: "eyring", viscosity: null, rows });
        fc.pre(fit.eyring.residualStandardDeviation > 1e-4);
        for (const T of temperatures) {
          const exact = meanLnRateConstant(fit, T).standardError ** 2;
          const rebuilt = varianceOf(typed(fit, { correlation: null }), T);
          expect(Math.abs(rebuilt / exact - 1)).toBeLessThan(1e-10);
        }
      }),
      { seed: 3, numRuns: 200 },
    );
  });

  test("with the full correlation equals it too", () => {
    const fit = fitTable(dithionate);
    for (const T of temperatures) {
      const exact = meanLnRateConstant(fit, T).standardError ** 2;
      expect(varianceOf(typed(fit), T) / exact).toBeCloseTo(1, 8);
    }
  });
});

describe("the variance of ln k from the published errors of the dithionate fit, 0.15 kJ/mol and 0.45 J/(mol K)", () => {
  const fit = fitTable(dithionate);
  const rounded = typed(fit, {
    activationEnthalpy: { value: 120_270, standardError: 150 },
    activationEntropy: { value: 11.33, standardError: 0.45 },
  });
  const [low, high] = fit.fittedRange;
  // What one can make of the rounded pair: least variance in the middle of the fit, so T0 = sH/(rho sS) = 343 K.
  const fromPair = 150 / (0.45 * 0.5 * (low + high));

  test.each(temperatures)("is at %d K closer to the exact one by the rebuilt correlation", (T) => {
    const exact = meanLnRateConstant(fit, T).standardError ** 2;
    const miss = (parameters: EyringParameters) => Math.abs(Math.log(varianceOf(parameters, T) / exact));
    const rebuilt = miss({ ...rounded, correlation: null });
    expect(rebuilt).toBeLessThan(miss({ ...rounded, correlation: fromPair }));
    expect(rebuilt).toBeLessThan(miss({ ...rounded, correlation: fit.eyring.correlation }));
    // 0.15 for 0.153 is 4 % in the variance.
    expect(rebuilt).toBeLessThan(0.05);
  });

  test("is not to be had without a correlation, a range or the number of points", () => {
    expect(pairErrors({ ...rounded, correlation: null, points: null }).covariance).toBeNull();
    expect(pairErrors({ ...rounded, correlation: null, fittedRange: null }).covariance).toBeNull();
  });

  test("has its least value kelvins away from where the fit has it: the rounded numbers no longer belong together", () => {
    const fitted = pairErrors(typed(fit)).leastAt ?? NaN;
    expect(fitted).toBeCloseTo(1 / fit.eyring.line.centre.x, 6);
    // T0 = sH/(rho sS) = 150/(0.998 x 0.45).
    const { leastAt } = pairErrors({ ...rounded, correlation: fit.eyring.correlation });
    expect(leastAt).toBeCloseTo(334, 0);
    expect(Math.abs((leastAt ?? NaN) - fitted)).toBeGreaterThan(5);
  });
});
