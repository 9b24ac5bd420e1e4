import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { integratePanels } from "../../server/numeric/quadrature.js";
import {
  coverage95,
  studentTDistribution,
  studentTQuantile,
  twoSidedP,
} from "../../server/numeric/studentT.js";

/** Density of Student's t, its factor by steps of two in nu. */
function density(nu: number): (t: number) => number {
  let factor = nu % 2 === 1 ? 1 / Math.PI : 1 / 2;
  for (let k = nu % 2 === 1 ? 3 : 4; k <= nu; k += 2) factor *= (k - 1) / (k - 2);
  return (t) => (factor / Math.sqrt(nu)) * (1 + (t * t) / nu) ** (-0.5 * (nu + 1));
}

describe("the distribution function of Student's t", () => {
  // Closed forms: Abramowitz & Stegun 26.7.3 and 26.7.4 for one to four degrees of freedom.
  const closed: readonly [number, (t: number) => number][] = [
    [1, (t) => 0.5 + Math.atan(t) / Math.PI],
    [2, (t) => 0.5 + t / (2 * Math.sqrt(2 + t * t))],
    [3, (t) => 0.5 + (Math.atan(t / Math.sqrt(3)) + t / Math.sqrt(3) / (1 + (t * t) / 3)) / Math.PI],
    [4, (t) => 0.5 + (t / Math.sqrt(4 + t * t)) * (0.5 + 1 / (4 + t * t))],
  ];
  test.each(closed)("with %i degrees of freedom equals its closed form to 1e-14", (nu, form) => {
    for (const t of [-40, -3, -1, -0.2, 0, 1e-6, 0.7, 1.5, 4, 12]) {
      expect(Math.abs(studentTDistribution(t, nu) - form(t))).toBeLessThan(1e-14);
    }
  });

  test.each([5, 7, 12, 34, 200, 998])(
    "with %i degrees of freedom equals the integral of its density",
    (nu) => {
      for (const t of [0.1, 1, 2.3, 5]) {
        const edges = Array.from({ length: 21 }, (_, i) => (i * t) / 20);
        const integral = 0.5 + integratePanels(density(nu), edges);
        expect(Math.abs(studentTDistribution(t, nu) - integral)).toBeLessThan(1e-13);
      }
    },
  );

  test("keeps its digits far out in the tail", () => {
    // Two degrees of freedom: 1 - t/sqrt(2 + t^2) = 2/(r (r + t)), r = sqrt(2 + t^2).
    for (const t of [1e3, 1e6, 1e12]) {
      const r = Math.sqrt(2 + t * t);
      expect(twoSidedP(t, 2) / (2 / (r * (r + t)))).toBeCloseTo(1, 13);
    }
    expect(twoSidedP(Infinity, 5)).toBe(0);
  });
});

describe("the quantile of Student's t", () => {
  // Abramowitz & Stegun, table 26.10, and any statistics textbook: from memory.
  test.each([
    [0.975, 1, 12.706],
    [0.975, 2, 4.303],
    [0.975, 3, 3.182],
    [0.975, 5, 2.571],
    [0.975, 10, 2.228],
    [0.95, 5, 2.015],
    [0.995, 20, 2.845],
    [0.975, 30, 2.042],
    [0.975, 120, 1.98],
  ])("at %d with %i degrees of freedom is the tabulated one", (p, nu, table) => {
    expect(studentTQuantile(p, nu)).toBeCloseTo(table, 3);
  });

  test("with one and two degrees of freedom equals its closed form", () => {
    for (const p of [1e-9, 0.01, 0.3, 0.5, 0.8, 0.975, 0.9999]) {
      const cauchy = -1 / Math.tan(Math.PI * p);
      expect(Math.abs(studentTQuantile(p, 1) - cauchy)).toBeLessThanOrEqual(1e-12 * Math.abs(cauchy) + 1e-15);
      const two = (2 * p - 1) / Math.sqrt(2 * p * (1 - p));
      expect(Math.abs(studentTQuantile(p, 2) - two)).toBeLessThanOrEqual(1e-12 * Math.abs(two));
    }
  });

  test("is the inverse of the distribution function to 1e-12", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-12, max: 0.5, noNaN: true }),
        fc.integer({ min: 1, max: 1000 }),
        (p, nu) => {
          const t = studentTQuantile(p, nu);
          expect(Math.abs(studentTDistribution(t, nu) / p - 1)).toBeLessThan(1e-12);
          expect(t).toBeLessThanOrEqual(0);
        },
      ),
      { seed: 1, numRuns: 300 },
    );
  });

  test("gives the half-width of a 95 % interval, the normal one where nothing is known of the scatter", () => {
    expect(coverage95(3)).toBe(studentTQuantile(0.975, 3));
    expect(coverage95(3)).toBe(studentTQuantile(0.975, 3));
    expect(coverage95(null)).toBeCloseTo(1.96, 4);
    expect(coverage95(100_000)).toBeCloseTo(coverage95(null), 4);
  });
});

test("Student's t refuses what it is not defined for", () => {
  expect(() => twoSidedP(1, 0)).toThrow(RangeError);
  expect(() => twoSidedP(1, 2.5)).toThrow(RangeError);
  expect(() => twoSidedP(NaN, 2)).toThrow(RangeError);
  expect(() => studentTQuantile(0, 2)).toThrow(RangeError);
  expect(() => studentTQuantile(1, 2)).toThrow(RangeError);
});
