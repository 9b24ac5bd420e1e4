import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { areaWorking } from "../../server/screening/workingsArea.js";
import { boilingWorking } from "../../server/screening/workingsBoiling.js";
import { coefficientWorking } from "../../server/screening/workingsCoefficient.js";
import type { Working } from "../../server/screening/workingsOutline.js";

/** Positive numbers of every size that a double has, and of sizes that occur. */
const positive = fc.oneof(
  fc.double({ min: 5e-324, max: Number.MAX_VALUE, noNaN: true }),
  fc.double({ min: -320, max: 308, noNaN: true }).map((power) => 10 ** power),
  fc.double({ min: 0.01, max: 10, noNaN: true }),
);
const notNegative = fc.oneof(fc.constant(0), positive);
const any = fc.oneof(
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc.integer({ min: -2000, max: 2000 }),
);
const maybe = <T>(of: fc.Arbitrary<T>) => fc.option(of, { nil: null });

/** A working has a finite result and finite steps, or a fault and neither. */
function sound(working: Working): void {
  const numbers = [...working.given, ...working.steps].flatMap(({ value }) =>
    value === null ? [] : [value],
  );
  if (working.result !== null) numbers.push(working.result);
  for (const number of numbers) expect(Number.isFinite(number)).toBe(true);
  expect(JSON.stringify(working)).not.toMatch(/NaN|Infinity|undefined/);
  expect(working.faults.length > 0).toBe(working.result === null);
  expect(working.resultText === null).toBe(working.result === null);
}

describe("whatever the numbers, a working has a result or a fault", () => {
  const level = {
    innerDiameter: positive,
    fillVolume: positive,
    vesselVolume: maybe(positive),
    jacketLower: notNegative,
    jacketUpper: positive,
  };

  test.each(["flat", "ellipsoidal"] as const)("area, %s", (bottom) => {
    const inputs = fc.record({ ...level, bottom: fc.constant(bottom) });
    fc.assert(
      fc.property(inputs, maybe(positive), (given, field) => sound(areaWorking(given, field, field))),
    );
  });

  test("area, torispherical", () => {
    const inputs = fc.record({
      ...level,
      bottom: fc.constant("torispherical" as const),
      dishRadius: positive,
      knuckleRadius: positive,
    });
    fc.assert(
      fc.property(inputs, maybe(positive), (given, field) => sound(areaWorking(given, field, field))),
      { numRuns: 1000 },
    );
  });

  test.each(["kloepper", "korbbogen"] as const)("area, %s", (bottom) => {
    const inputs = fc.record({ ...level, bottom: fc.constant(bottom), wallThickness: positive });
    fc.assert(
      fc.property(inputs, maybe(positive), (given, field) => sound(areaWorking(given, field, field))),
      { numRuns: 1000 },
    );
  });

  test("coefficient", () => {
    const inputs = fc.record({
      insideFilm: positive,
      outsideFilm: positive,
      wallThickness: positive,
      wallConductivity: positive,
      lining: maybe(fc.record({ thickness: positive, conductivity: positive })),
      insideFouling: notNegative,
      outsideFouling: notNegative,
      jacketMedium: maybe(fc.constantFrom("steam" as const, "brine" as const)),
      wall: maybe(fc.constantFrom("stainless" as const, "glassLined" as const)),
      contents: maybe(fc.constantFrom("water" as const, "heavyOil" as const)),
    });
    fc.assert(
      fc.property(inputs, maybe(positive), (given, field) => sound(coefficientWorking(given, field))),
      { numRuns: 500 },
    );
  });

  test("boiling point", () => {
    const inputs = fc.oneof(
      fc.record({
        method: fc.constant("clausius-clapeyron" as const),
        normalBoilingPoint: positive,
        heatOfVaporisation: positive,
        pressure: positive,
      }),
      fc.record({
        method: fc.constant("antoine" as const),
        a: any,
        b: positive,
        c: any,
        pressureUnit: fc.constantFrom("bar" as const, "Pa" as const, "mmHg" as const),
        temperatureUnit: fc.constantFrom("degC" as const, "K" as const),
        lowest: positive,
        highest: positive,
        pressure: positive,
      }),
    );
    fc.assert(
      fc.property(inputs, maybe(positive), (given, field) => sound(boilingWorking(given, field))),
      { numRuns: 1000 },
    );
  });
});
