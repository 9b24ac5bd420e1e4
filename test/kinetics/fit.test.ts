import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fitTable, meanLnRateConstant } from "../../server/kinetics/fit.js";
import type { TableParameters, TableRow } from "../../server/kinetics/parameters.js";
import { fromArrhenius, fromEyring, lnRateConstant } from "../../server/kinetics/rateConstant.js";

// Invented rate constants of a first-order reaction, 1/s.
const invented: readonly (readonly [number, number])[] = [
  [323.15, 2.05e-6],
  [330.15, 4.9e-6],
  [337.15, 1.09e-5],
  [344.15, 2.42e-5],
  [351.15, 5.2e-5],
];

function table(changes: Partial<TableParameters> = {}, row: Partial<TableRow> = {}): TableParameters {
  const rows = invented.map(([temperature, k]) => ({
    temperature,
    lnRateConstant: Math.log(k),
    relativeError: null,
    leftOut: null,
    ...row,
  }));
  return { form: "table", order: 1, fitAs: "eyring", viscosity: null, rows, ...changes };
}

describe("the interval of the mean response", () => {
  // Textbook: s^2 [1/n + (x - mean x)^2/sum (x - mean x)^2] about ybar + b (x - mean x), here in sums of its own.
  test.each(["eyring", "arrhenius"] as const)(
    "of the %s form equals the textbook formula to 1e-10",
    (fitAs) => {
      const fit = fitTable(table({ fitAs }));
      const x = invented.map(([T]) => 1 / T);
      const y = invented.map(([T, k]) => Math.log(fitAs === "eyring" ? k / T : k));
      const mean = (values: readonly number[]) => values.reduce((sum, each) => sum + each) / values.length;
      const sxx = mean(x.map((each) => (each - mean(x)) ** 2)) * x.length;
      const sxy = mean(x.map((each, i) => (each - mean(x)) * (y[i] - mean(y)))) * x.length;
      const left =
        mean(y.map((each, i) => (each - mean(y) - (sxy / sxx) * (x[i] - mean(x))) ** 2)) * x.length;
      for (const T of [280, 323.15, 336, 358.15, 420]) {
        const away = 1 / T - mean(x);
        const textbook = Math.sqrt((left / (x.length - 2)) * (1 / x.length + away ** 2 / sxx));
        const ours = meanLnRateConstant(fit, T);
        expect(Math.abs(ours.standardError / textbook - 1)).toBeLessThan(1e-10);
        const value = mean(y) + (sxy / sxx) * away + (fitAs === "eyring" ? Math.log(T) : 0);
        expect(Math.abs(ours.lnRateConstant - value)).toBeLessThan(1e-10);
      }
    },
  );

  test("is the one that the parameters give with their errors and correlation", () => {
    const { eyring } = fitTable(table());
    const R = 8.31446261815324;
    for (const T of [300, 337, 400]) {
      const [s, h] = [eyring.activationEntropyError / R, eyring.activationEnthalpyError / (R * T)];
      const variance = s ** 2 + h ** 2 - 2 * eyring.correlation * s * h;
      expect(meanLnRateConstant(fitTable(table()), T).standardError).toBeCloseTo(Math.sqrt(variance), 9);
    }
  });

  test("is narrowest inside the fitted range and wider on both sides of it", () => {
    const fit = fitTable(table());
    const error = (T: number) => meanLnRateConstant(fit, T).standardError;
    expect(error(337)).toBeLessThan(error(323.15));
    expect(error(323.15)).toBeLessThan(error(300));
    expect(error(351.15)).toBeLessThan(error(380));
  });
});

describe("a table made from one rate law without scatter", () => {
  const energies = fc.double({ min: 20_000, max: 250_000, noNaN: true });

  test("gives back Eyring's parameters in any order of reaction, with no error", () => {
    fc.assert(
      fc.property(
        energies,
        fc.double({ min: -250, max: 100, noNaN: true }),
        fc.constantFrom(1, 1.5, 2),
        (H, S, n) => {
          const rate = fromEyring(H, S, 1000, 1, n);
          const rows = table().rows.map((row) => ({
            ...row,
            lnRateConstant: lnRateConstant(rate, row.temperature),
          }));
          const { eyring } = fitTable(table({ order: n, rows }));
          expect(eyring.activationEnthalpy / H).toBeCloseTo(1, 9);
          expect(eyring.activationEntropy).toBeCloseTo(S, 6);
          expect(eyring.residualStandardDeviation).toBeLessThan(1e-11);
          expect(eyring.curvatureP).toBe(1);
          expect(lnRateConstant(eyring.rate, 400)).toBeCloseTo(lnRateConstant(rate, 400), 8);
        },
      ),
      { seed: 5, numRuns: 100 },
    );
  });

  test("gives back Arrhenius parameters, also where A overflows a double", () => {
    for (const [lnA, E] of [
      [25, 100_000],
      [1000, 3_000_000],
    ]) {
      const rate = fromArrhenius(lnA, E);
      const rows = table().rows.map((row) => ({
        ...row,
        lnRateConstant: lnRateConstant(rate, row.temperature),
      }));
      const { arrhenius } = fitTable(table({ fitAs: "arrhenius", rows }));
      expect(arrhenius.lnPreExponential / lnA).toBeCloseTo(1, 9);
      expect(arrhenius.activationEnergy / E).toBeCloseTo(1, 9);
    }
  });
});

test("both forms stand side by side and nearly agree inside the range: Ea exceeds dH by R times its middle", () => {
  const { eyring, arrhenius, rows } = fitTable(table());
  const middle = 1 / (invented.reduce((sum, [T]) => sum + 1 / T, 0) / invented.length);
  const difference = arrhenius.activationEnergy - eyring.activationEnthalpy;
  expect(difference / (8.314 * middle)).toBeCloseTo(1, 2);
  for (const { temperature } of rows) {
    expect(lnRateConstant(eyring.rate, temperature)).toBeCloseTo(
      lnRateConstant(arrhenius.rate, temperature),
      2,
    );
  }
});

test("a row left out is reported with its reason and changes nothing", () => {
  const outlier = { temperature: 330, lnRateConstant: 0, relativeError: null, leftOut: "thermostat failed" };
  const rows = table().rows;
  const fit = fitTable(table({ rows: [rows[0], outlier, ...rows.slice(1)] }));
  const clean = fitTable(table());
  expect(fit.eyring).toEqual(clean.eyring);
  expect(fit.points).toBe(5);
  expect(fit.rows).toHaveLength(6);
  expect(fit.rows[1]).toMatchObject({ leverage: null, leftOut: "thermostat failed" });
  expect(fit.rows[1].residual).toBe(-fit.rows[1].lnFitted);
  expect(fit.rows.filter((row) => row.leverage !== null).map((row) => row.leverage)).toEqual(
    clean.eyring.line.leverages,
  );
});

test("the fitted range and the points are those of the rows that take part", () => {
  const rows = table().rows.map((row, i) => (i === 4 ? { ...row, leftOut: "decomposed" } : row));
  expect(fitTable(table({ rows })).fittedRange).toEqual([323.15, 344.15]);
  expect(fitTable(table({ rows })).degreesOfFreedom).toBe(2);
});

test("the order of the rows does not matter", () => {
  const forward = fitTable(table());
  const backward = fitTable(table({ rows: table().rows.toReversed() }));
  expect(backward.eyring.activationEnthalpy).toBeCloseTo(forward.eyring.activationEnthalpy, 6);
  expect(backward.rows[0].leverage).toBeCloseTo(forward.rows[4].leverage ?? NaN, 12);
});

describe("relative errors of the rows", () => {
  test("weigh the rows: one that is known ten times worse hardly counts", () => {
    const rows = table({}, { relativeError: 0.02 }).rows.map((row, i) =>
      i === 2 ? { ...row, relativeError: 20, lnRateConstant: row.lnRateConstant + 1 } : row,
    );
    const fit = fitTable(table({ rows }));
    const without = fitTable(table({ rows: rows.filter((_, i) => i !== 2) }));
    expect(fit.weighted).toBe(true);
    expect(fit.eyring.activationEnthalpy / without.eyring.activationEnthalpy).toBeCloseTo(1, 4);
    expect(fit.rows[2].leverage).toBeLessThan(1e-4);
  });

  test("never make the result narrower than they are", () => {
    const honest = fitTable(table({}, { relativeError: 0.5 }));
    const scatter = fitTable(table());
    expect(honest.eyring.activationEnthalpyError).toBeGreaterThan(
      10 * scatter.eyring.activationEnthalpyError,
    );
    const bold = fitTable(table({}, { relativeError: 1e-6 }));
    expect(bold.eyring.activationEnthalpyError).toBeCloseTo(scatter.eyring.activationEnthalpyError, 6);
  });

  test("count only where every row has one", () => {
    const rows = table({}, { relativeError: 0.5 }).rows.map((row, i) =>
      i === 0 ? { ...row, relativeError: null } : row,
    );
    const fit = fitTable(table({ rows }));
    expect(fit.weighted).toBe(false);
    expect(fit.errorsUnused).toBe(true);
    expect(fit.eyring.activationEnthalpyError).toBe(fitTable(table()).eyring.activationEnthalpyError);
    expect(fitTable(table()).errorsUnused).toBe(false);
  });
});

test("a change of rate law within the rows shows as a curve", () => {
  const rows = table().rows.map((row, i) => ({
    ...row,
    lnRateConstant: row.lnRateConstant - 0.1 * (i - 2) ** 2,
  }));
  expect(fitTable(table({ rows })).eyring.curvatureP).toBeLessThan(0.01);
  expect(fitTable(table()).eyring.curvatureP).toBeGreaterThan(0.05);
  expect(fitTable(table({ rows: rows.slice(0, 3) })).eyring.curvatureP).toBeNull();
});

test("a table with fewer than three different temperatures is refused", () => {
  const rows = table().rows;
  expect(() => fitTable(table({ rows: [rows[0], rows[1], rows[1], rows[0]] }))).toThrow(RangeError);
  expect(() => fitTable(table({}, { leftOut: "all" }))).toThrow(RangeError);
});
