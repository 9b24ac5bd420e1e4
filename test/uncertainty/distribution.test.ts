import { describe, expect, test } from "vitest";
import { integratePanels } from "../../server/numeric/quadrature.js";
import { logDeviation, logNormalValue, normalValue } from "../../server/uncertainty/distribution.js";

/** Expectation over a standard normal score. */
function expectation(f: (z: number) => number): number {
  const edges = Array.from({ length: 65 }, (_, i) => -16 + i / 2);
  return integratePanels((z) => (f(z) * Math.exp(-0.5 * z * z)) / Math.sqrt(2 * Math.PI), edges);
}

describe("a log-normal quantity", () => {
  test.each([
    [2050, 60],
    [610e3, 40e3],
    [0.02, 0.001],
    [1, 1.5],
  ])("of %d has itself as median and exactly %d as standard deviation", (value, standardError) => {
    const estimate = { value, standardError };
    expect(logNormalValue(estimate, 0)).toBe(value);
    const mean = expectation((z) => logNormalValue(estimate, z));
    const variance = expectation((z) => (logNormalValue(estimate, z) - mean) ** 2);
    expect(Math.sqrt(variance) / standardError).toBeCloseTo(1, 10);
  });

  test("is never negative, however large its error", () => {
    for (const z of [-5, -3, 0, 3]) {
      expect(logNormalValue({ value: 1, standardError: 30 }, z)).toBeGreaterThan(0);
    }
  });

  test("keeps its digits where the error is small: sigma is then the relative error", () => {
    expect(logDeviation(1e-9) / 1e-9).toBeCloseTo(1, 12);
    // sigma^2 = r^2 - 3/2 r^4 + ...
    expect(logDeviation(1e-3) / Math.sqrt(1e-6 - 1.5e-12)).toBeCloseTo(1, 10);
  });

  test("of zero is drawn as a normal one, not below zero", () => {
    expect(logNormalValue({ value: 0, standardError: 2 }, 1.5)).toBe(3);
    expect(logNormalValue({ value: 0, standardError: 2 }, -1.5)).toBe(0);
  });
});

test("a normal quantity moves by its standard error for each unit of the score", () => {
  expect(normalValue({ value: -84_000, standardError: 3000 }, 1.5)).toBe(-79_500);
});

test("a quantity without an error, or with one of zero, is exact", () => {
  for (const standardError of [null, 0]) {
    expect(normalValue({ value: 358.15, standardError }, 3)).toBe(358.15);
    expect(logNormalValue({ value: 358.15, standardError }, 3)).toBe(358.15);
  }
});
