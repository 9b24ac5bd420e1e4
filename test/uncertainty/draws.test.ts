import { describe, expect, test } from "vitest";
import type { PairCovariance } from "../../server/kinetics/interval.js";
import { normalQuantile } from "../../server/numeric/normal.js";
import { percentile } from "../../server/numeric/percentile.js";
import { studentTDistribution } from "../../server/numeric/studentT.js";
import { logNormalValue, normalValue } from "../../server/uncertainty/distribution.js";
import { createDraws, type Draws } from "../../server/uncertainty/draws.js";
import { type Sample, uncertainInputs } from "../../server/uncertainty/sample.js";

const count = 2000;

/** Values of all draws of one output, ascending. */
function outcomes(draws: Draws, output: (sample: Sample) => number, only?: string): Float64Array {
  return Float64Array.from({ length: draws.count }, (_, i) => output(draws.sample(i, only))).sort();
}

/** Invented: 4 kJ/mol on the barrier, correlation 0.998. */
const covariance: PairCovariance = { intercept: 1.13 ** 2, barrier: 4000 ** 2, both: 0.998 * 1.13 * 4000 };

describe("single quantities", () => {
  const mass = { value: 1900, standardError: 40 };
  const draws = createDraws();

  test("have one draw in each stratum, so that their percentiles are the exact ones", () => {
    const values = outcomes(draws, (sample) => sample.logNormal("/mixture/mass", mass));
    for (const p of [0.05, 0.5, 0.95]) {
      const exact = logNormalValue(mass, normalQuantile(p));
      expect(Math.abs(percentile(values, p) - exact)).toBeLessThan(0.01 * 40);
    }
  });

  test("without an error keep their estimate", () => {
    const exact = { value: 1900, standardError: null };
    expect(outcomes(draws, (sample) => sample.logNormal("/mixture/mass", exact))).toEqual(
      new Float64Array(count).fill(1900),
    );
  });

  test("agree with error propagation by hand where the output is linear", () => {
    // MTSR = T + rise (-dH)/E: standard deviation sqrt(s1^2 + s2^2), normal.
    const temperature = { value: 358.15, standardError: 1.5 };
    const heat = { value: -84_000, standardError: 3000 };
    const values = outcomes(
      draws,
      (sample) =>
        sample.normal("/reaction/temperature", temperature) - sample.normal("/reaction/heat", heat) / 1000,
    );
    const width = Math.sqrt(1.5 ** 2 + 3 ** 2);
    for (const p of [0.05, 0.5, 0.95]) {
      const byHand = 442.15 + width * normalQuantile(p);
      expect(Math.abs(percentile(values, p) - byHand)).toBeLessThan(0.02 * 2 * 1.645 * width);
    }
    const mean = values.reduce((sum, each) => sum + each) / count;
    const deviation = Math.sqrt(values.reduce((sum, each) => sum + (each - mean) ** 2, 0) / (count - 1));
    expect(Math.abs(deviation / width - 1)).toBeLessThan(0.02);
  });
});

describe("an activation pair", () => {
  const draws = createDraws(20_000);
  /** Deviation of ln k at a temperature, in its own standard errors. */
  function scaled(temperature: number, degreesOfFreedom: number | null): Float64Array {
    const inverse = 1 / (8.31446261815324 * temperature);
    const variance = covariance.intercept + covariance.barrier * inverse ** 2 - 2 * covariance.both * inverse;
    return outcomes(draws, (sample) => {
      const [intercept, barrier] = sample.pair("/decomposition/rateConstant", covariance, degreesOfFreedom);
      return (intercept - barrier * inverse) / Math.sqrt(variance);
    });
  }

  test.each([1, 3, 8])(
    "with %i degrees of freedom makes ln k follow Student's t at any temperature",
    (nu) => {
      for (const temperature of [300, 430, 600]) {
        const values = scaled(temperature, nu);
        const distance = Math.max(
          ...Array.from(values, (each, i) =>
            Math.abs(studentTDistribution(each, nu) - (i + 0.5) / values.length),
          ),
        );
        expect(distance).toBeLessThan(1.63 / Math.sqrt(values.length));
      }
    },
  );

  test("of an unknown number of points makes ln k normal", () => {
    const values = scaled(350, null);
    expect(percentile(values, 0.025)).toBeCloseTo(-1.96, 1);
    expect(percentile(values, 0.95)).toBeCloseTo(1.645, 1);
  });

  test("has the covariance it was given", () => {
    const pairs = Array.from({ length: draws.count }, (_, i) => draws.sample(i).pair("/x", covariance, null));
    const mean = (f: (pair: readonly [number, number]) => number) =>
      pairs.reduce((sum, pair) => sum + f(pair), 0) / pairs.length;
    expect(mean(([a]) => a * a) / covariance.intercept).toBeCloseTo(1, 1);
    expect(mean(([, e]) => e * e) / covariance.barrier).toBeCloseTo(1, 2);
    expect(mean(([a, e]) => a * e) / covariance.both).toBeCloseTo(1, 1);
  });

  test("without a known covariance counts as exact", () => {
    expect(draws.sample(0).pair("/x", null, 3)).toEqual([0, 0]);
  });

  test("whose errors are fully correlated, or zero, gives finite numbers", () => {
    const full = { intercept: 1, barrier: 9e6, both: 3000 };
    const [intercept, barrier] = draws.sample(0).pair("/x", full, 3);
    expect(intercept * 3000).toBeCloseTo(barrier, 6);
    const none = draws.sample(0).pair("/x", { intercept: 0, barrier: 0, both: 0 }, 3);
    expect(none.map(Math.abs)).toEqual([0, 0]);
  });
});

describe("two cases", () => {
  const mass = { value: 1900, standardError: 40 };
  const heat = { value: -84_000, standardError: 3000 };

  test("share the draws of the inputs that they have in common, whatever else is uncertain", () => {
    const [first, second] = [createDraws(), createDraws()];
    outcomes(first, (sample) => sample.normal("/reaction/temperature", { value: 350, standardError: 1 }));
    const values = (draws: Draws) => outcomes(draws, (sample) => sample.logNormal("/mixture/mass", mass));
    expect(values(first)).toEqual(values(second));
  });

  test("that differ only in their units have the same draws", () => {
    const kilograms = createDraws().sample(17).logNormal("/mixture/mass", mass);
    const tonnes = createDraws().sample(17).logNormal("/mixture/mass", { value: 1.9, standardError: 0.04 });
    expect(tonnes * 1000).toBeCloseTo(kilograms, 9);
  });

  test("with another seed or another count have others", () => {
    const values = (draws: Draws) => outcomes(draws, (sample) => sample.normal("/reaction/heat", heat));
    expect(values(createDraws(count, 2))).not.toEqual(values(createDraws(count, 1)));
    expect(createDraws(count).seed).toBe(createDraws().seed);
  });
});

test("with one input drawn alone the others keep their estimates", () => {
  const draws = createDraws(50);
  const a = { value: 10, standardError: 1 };
  for (let i = 0; i < draws.count; i++) {
    const sample = draws.sample(i, "/a");
    expect(sample.normal("/a", a)).toBe(draws.sample(i).normal("/a", a));
    expect(sample.normal("/b", a)).toBe(normalValue(a, 0));
    expect(sample.logNormal("/c", a)).toBe(10);
    expect(sample.pair("/d", covariance, 3)).toEqual([0, 0]);
    expect(draws.sample(i, "/d").pair("/d", covariance, 3)).toEqual(
      draws.sample(i).pair("/d", covariance, 3),
    );
  }
});

test("the uncertain inputs are those with an error above zero, a pair counting as one", () => {
  const walk = (sample: Sample) => {
    sample.normal("/a", { value: 1, standardError: 0.1 });
    sample.logNormal("/b", { value: 1, standardError: null });
    sample.logNormal("/c", { value: 1, standardError: 0 });
    sample.pair("/d", covariance, null);
    sample.pair("/e", null, 3);
    sample.logNormal("/f", { value: 1, standardError: 0.2 });
  };
  expect(uncertainInputs(walk)).toEqual(["/a", "/d", "/f"]);
});
