import { describe, expect, test } from "vitest";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import { doseAt } from "../../server/thermal/dosing.js";
import { stepWith } from "./steps.js";

/**
 * Second order, equimolar, B fed at a constant rate over `duration` into 1 m^3 with 100 mol of A.
 * Da = k nA duration/V0.
 */
function accumulationAtEnd(damkohler: number, fedVolume: number): number {
  const duration = 7200;
  const rate = fromArrhenius(Math.log(damkohler / (100 * duration)), 0);
  const step = stepWith({
    amountA: 100,
    b: { amount: 100, order: 1, perA: 1 },
    feed: { reactant: "B", mass: 1, density: 1 / fedVolume, heatCapacity: 1, temperature: 300, duration },
    rate,
  });
  const dosing = doseAt(step, rate, 300);
  return dosing === null ? NaN : 1 - dosing.endExtent;
}

// No publication gives these to so many digits: an implicit Runge-Kutta method, independent implementation.
describe("the accumulation of an equimolar second-order semibatch step at its stoichiometric point", () => {
  test.each([
    [1, 0.7759689],
    [5, 0.4578527],
    [10, 0.3352146],
    [50, 0.155313],
    [100, 0.1107088],
  ])("at Da = %d, the volume doubling, is %d", (damkohler, accumulation) => {
    expect(accumulationAtEnd(damkohler, 1)).toBeCloseTo(accumulation, 6);
  });

  test.each([
    [1, 0.6839221],
    [5, 0.3554235],
    [10, 0.2522793],
    [50, 0.1128379],
    [100, 0.0797885],
  ])("at Da = %d, the volume constant, is %d", (damkohler, accumulation) => {
    expect(accumulationAtEnd(damkohler, 1e-12)).toBeCloseTo(accumulation, 6);
  });
});
