import { describe, expect, test } from "vitest";
import { zeroCelsius } from "../../server/numeric/constants.js";
import { steamTable } from "../../server/screening/checks/vessel.js";
import { antoineBoilingPoint, clausiusClapeyron, pressureUnits } from "../../server/thermal/boilingPoint.js";

describe("Clausius-Clapeyron, water with Tb = 99.97 degC and dHv = 40.65 kJ/mol (handbook values, from memory)", () => {
  const boiling = (bar: number) => clausiusClapeyron(99.97 + zeroCelsius, 40_650, bar * 1e5) - zeroCelsius;

  test.each(steamTable)(
    "at %d bar is between 2 K below and 0.2 K above the steam table's %s degC",
    (bar, degC) => {
      expect(boiling(bar)).toBeLessThan(Number(degC) + 0.2);
      expect(boiling(bar)).toBeGreaterThan(Number(degC) - 2);
    },
  );

  test("at 1 atm is the normal boiling point itself", () => {
    expect(boiling(1.01325)).toBeCloseTo(99.97, 10);
  });

  test("by hand at 2 bar: 1/T = 1/373.12 - 8.31446 ln(1.97385)/40650, T = 393.2 K", () => {
    expect(boiling(2) + zeroCelsius).toBeCloseTo(1 / (1 / 373.12 - (8.314463 * 0.679984) / 40_650), 3);
  });

  test("has no boiling point where the pressure is beyond the equation", () => {
    expect(clausiusClapeyron(373.12, 10_000, 1e9)).toBe(Number.POSITIVE_INFINITY);
  });
});

describe("Antoine's equation, water in mmHg and degC", () => {
  // Constants as in Gmehling & Onken, Vapor-Liquid Equilibrium Data Collection; from memory.
  const water = (a: number, b: number, c: number) => ({
    a,
    b,
    c,
    pressureUnit: pressureUnits.mmHg,
    temperatureZero: zeroCelsius,
  });
  const low = water(8.07131, 1730.63, 233.426);

  test("gives 760 mmHg at 100 degC", () => {
    expect(antoineBoilingPoint(low, 101_325) - zeroCelsius).toBeCloseTo(100, 1);
  });

  test("is the same in bar and K: log10(p/bar) = log10(p/mmHg) - log10(750.06)", () => {
    const inBar = {
      a: low.a - Math.log10(1e5 / pressureUnits.mmHg),
      b: low.b,
      c: low.c - zeroCelsius,
      pressureUnit: pressureUnits.bar,
      temperatureZero: 0,
    };
    for (const pressure of [1e4, 1e5, 3e5]) {
      expect(antoineBoilingPoint(inBar, pressure)).toBeCloseTo(antoineBoilingPoint(low, pressure), 9);
    }
  });

  test("has no boiling point above the pressure that its constant a allows", () => {
    expect(antoineBoilingPoint(low, 1e9 * pressureUnits.mmHg)).toBe(Number.POSITIVE_INFINITY);
  });
});

test("the units of pressure agree with each other", () => {
  // The conventional mmHg and the torr, 101325/760 Pa, differ in the seventh digit.
  expect((760 * pressureUnits.mmHg) / pressureUnits.atm).toBeCloseTo(1, 6);
  expect(pressureUnits.bar).toBe(100 * pressureUnits.kPa);
});
