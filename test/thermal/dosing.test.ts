import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import { adiabaticRise, limitingAmount, volumeOf } from "../../server/thermal/balance.js";
import { timeToConversion } from "../../server/thermal/completion.js";
import { type Dosing, doseAt } from "../../server/thermal/dosing.js";
import type { Feed, Reaction, Step } from "../../server/thermal/step.js";
import { integrateWithOdex } from "../published/odex.js";
import { documentOf, stepOf } from "../screening/realised.js";

const acylation = stepOf(documentOf("semibatch-acylation"));

/** The acylation with other parts of its reaction. */
function acylationWith(change: Partial<Reaction>): Step {
  return { ...acylation, reaction: { ...acylation.reaction, ...change } };
}

function feedOf(step: Step): Feed {
  if (step.reaction.feed === null) throw new Error("Expected a feed");
  return step.reaction.feed;
}

/** k is set by ln k at any temperature. */
function dosed(step: Step, lnK: number, tolerance = 1e-8): Dosing {
  const dosing = doseAt(step, fromArrhenius(lnK, 0), step.reaction.temperature, tolerance);
  if (dosing === null) throw new Error("The integrator gave up");
  return dosing;
}

const lnKAtProcess = Math.log(2.1674737876270965e-6);

describe("an isothermal dosed step", () => {
  test("agrees with odex on both amounts to 1e-7 of the recipe", () => {
    const step = acylation;
    const feed = feedOf(step);
    const k = Math.exp(lnKAtProcess);
    const balance = (t: number, [nA = 0, nB = 0]: number[]): number[] => {
      const rate = (k * nA * nB) / volumeOf(step, (feed.mass * t) / feed.duration);
      return [-rate, 3050 / feed.duration - rate];
    };
    const dosing = dosed(step, lnKAtProcess);
    for (const time of [600, 3600, 7200, 10_000, feed.duration]) {
      const [nA = 0, nB = 0] = integrateWithOdex(balance, 0, [2900, 0], time, 1e-11, 1e-9).y;
      const extent = 2900 * (dosing.run?.extentAt(time) ?? 0);
      expect(Math.abs(2900 - extent - nA) / 2900).toBeLessThan(1e-7);
      expect(Math.abs((3050 * time) / feed.duration - extent - nB) / 3050).toBeLessThan(1e-7);
    }
  });

  const orders = fc.constantFrom(0.5, 1, 1.5, 2, 3);
  const recipes = fc.record({
    lnK: fc.double({ min: -25, max: -5, noNaN: true }),
    orderA: orders,
    orderB: orders,
    perA: fc.constantFrom(1e-3, 0.5, 1, 2, 1e3),
    excess: fc.double({ min: 0.3, max: 3, noNaN: true }),
    feeds: fc.constantFrom("A" as const, "B" as const),
  });

  /** The acylation with another stoichiometry, and k per (mol/m^3)^(n-1) such that recipes compare. */
  function recipe(drawn: {
    lnK: number;
    orderA: number;
    orderB: number;
    perA: number;
    excess: number;
    feeds: "A" | "B";
  }) {
    const { orderA, perA, feeds } = drawn;
    const step = acylationWith({
      orderA,
      b: { amount: 2900 * perA * drawn.excess, order: drawn.orderB, perA },
      feed: { ...feedOf(acylation), reactant: feeds },
    });
    const scale = (2 - orderA - drawn.orderB) * Math.log(1500) - drawn.orderB * Math.log(perA);
    return { step, lnK: drawn.lnK + scale };
  }

  test("neither amount falls below zero or rises above what was given, by more than 1e-7 of the recipe", () => {
    fc.assert(
      fc.property(recipes, (drawn) => {
        const { step, lnK } = recipe(drawn);
        const dosing = dosed(step, lnK);
        const { run, balance } = dosing;
        if (run === null) throw new Error("Expected a run");
        for (const [i, time] of run.times.entries()) {
          const extent = run.extents[i];
          expect(extent).toBeGreaterThan(-1e-7);
          expect(Math.min(balance.fed(time), balance.charged) - extent).toBeGreaterThan(-1e-7);
        }
      }),
      { numRuns: 60 },
    );
  });

  test("accumulation falls as k rises", () => {
    fc.assert(
      fc.property(recipes, fc.double({ min: 0.1, max: 3, noNaN: true }), (drawn, more) => {
        const { step, lnK } = recipe(drawn);
        const slow = dosed(step, lnK).accumulation.value;
        const fast = dosed(step, lnK + more).accumulation.value;
        expect(fast).toBeLessThanOrEqual(slow + 1e-7);
      }),
      { numRuns: 60 },
    );
  });

  test("a feed slower than every rate leaves nothing accumulated: MTSR goes to T", () => {
    const slow = acylationWith({ feed: { ...feedOf(acylation), duration: 1e12 } });
    expect(dosed(slow, lnKAtProcess).rise.value).toBeLessThan(0.02);
  });

  test("a very short feed that brings no heat capacity is a batch", () => {
    const short = acylationWith({ feed: { ...feedOf(acylation), duration: 1e-6, heatCapacity: 1e-9 } });
    const batch = adiabaticRise(short);
    expect(dosed(short, lnKAtProcess).rise.value / batch).toBeCloseTo(1, 6);
  });

  test("k of zero to machine precision accumulates all that can react", () => {
    const dosing = dosed(acylation, -900);
    expect(dosing.accumulation.value).toBeCloseTo(1, 9);
    expect(timeToConversion(dosing, 0.9)).toBe(Number.POSITIVE_INFINITY);
  });

  test("k so large that the feed is all that limits accumulates nothing and ends with the feed", () => {
    const dosing = dosed(acylation, 40);
    expect(dosing.accumulation.value).toBeLessThan(1e-6);
    const stoichiometric = (feedOf(acylation).duration * 2900) / 3050;
    expect(timeToConversion(dosing, 0.98)).toBeCloseTo(0.98 * stoichiometric, 0);
  });

  test("a fed reactant that is never enough limits the recipe and its conversion", () => {
    const step = acylationWith({ b: { amount: 1000, order: 1, perA: 1 } });
    expect(limitingAmount(step)).toBe(1000);
    const dosing = dosed(step, lnKAtProcess);
    expect(dosing.accumulation.at).toBeLessThanOrEqual(feedOf(step).duration);
    expect(Number.isFinite(timeToConversion(dosing, 0.98))).toBe(true);
  });

  test("a balance that the integrator cannot finish gives null, not a hang", () => {
    expect(doseAt(acylation, fromArrhenius(Number.NaN, 0), 300)).toBeNull();
  });
});

describe("a batch at constant temperature", () => {
  const batch = stepOf(documentOf("batch-hydrolysis"));

  test("reaches a conversion after -ln(1 - X)/k in first order", () => {
    expect(timeToConversion(dosed(batch, Math.log(1e-3)), 0.99)).toBeCloseTo(Math.log(100) * 1000, 6);
  });

  test("of half order is done after a finite time, (1 - (1 - X)^(1/2)) 2 c0^(1/2)/k", () => {
    const half = { ...batch, reaction: { ...batch.reaction, orderA: 0.5 } };
    const c0 = 650 / 0.8;
    const whole = (2 * Math.sqrt(c0)) / 1e-3;
    expect(timeToConversion(dosed(half, Math.log(1e-3)), 1) / whole).toBeCloseTo(1, 5);
    expect(timeToConversion(dosed(half, Math.log(1e-3)), 0.75) / (whole / 2)).toBeCloseTo(1, 9);
  });

  test("of first order is never quite done", () => {
    expect(timeToConversion(dosed(batch, Math.log(1e-3)), 1)).toBe(Number.POSITIVE_INFINITY);
  });
});
