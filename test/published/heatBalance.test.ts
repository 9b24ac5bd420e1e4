import { describe, expect, test } from "vitest";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import { gasConstant } from "../../server/numeric/constants.js";
import { coolingCapacity } from "../../server/thermal/cooling.js";
import { heatCrossings } from "../../server/thermal/frozenHeat.js";
import { rateOverK } from "../../server/thermal/reactionRate.js";
import { stepWith } from "./steps.js";

describe("the heat balance of A + B -> 2 C in a jacketed vessel (Tosun, Modelling in Transport Phenomena, Example 6.6)", () => {
  // 0.256 m^3/min from 25 degC into 14 m^3 at 65 degC, jacket at 15 degC, U = 1050 W/(m^2 K); at the outlet
  // 400 and 800 mol/m^3, k = 9.15e-5 m^3/(mol min), heat of reaction at 65 degC -48.4 kJ/mol.
  const reaction = stepWith({ amountA: 1, b: { amount: 1, order: 1, perA: 1 } }).reaction;
  const perMinute = 9.15e-5 * rateOverK(reaction, 400 * 14, 800 * 14, 14);
  const toRemove = perMinute * 48_400 - 0.256 * 662_000 * 40;

  test("has to lose the published 13e6 J/min", () => {
    expect(toRemove / 1e6).toBeCloseTo(13, 0);
    // More digits: independent implementation.
    expect(toRemove).toBeCloseTo(13_061_248, 0);
  });

  test("loses as much through the published 4.1 m^2", () => {
    const through = (area: number) =>
      60 * coolingCapacity(stepWith({}, { ua: 1050 * area, coolantTemperature: 288.15 }), 338.15);
    expect(through(toRemove / through(1))).toBeCloseTo(toRemove, 4);
    expect(toRemove / through(1)).toBeCloseTo(4.1, 1);
    expect(toRemove / through(1)).toBeCloseTo(4.1464, 4);
  });
});

describe("the last steady state of a zero-order reaction (Semenov 1928, Z. Phys. 48:571)", () => {
  // T_NR - T0 = R T_NR^2/E; computed by an independent implementation.
  test.each([
    { energy: 100_000, coolant: 373.15, noReturn: 385.5065645, roughly: 11.5771345 },
    { energy: 130_000, coolant: 323.15, noReturn: 330.1200289, roughly: 6.678811 },
  ])(
    "with $energy J/mol above a coolant of $coolant K is at $noReturn K",
    ({ energy, coolant, noReturn, roughly }) => {
      const rate = fromArrhenius(energy / (gasConstant * 350), energy);
      const release = (T: number) => 500 * Math.exp(rate.lnPreExponential - energy / (gasConstant * T));
      const slope = (T: number) => (release(T) * energy) / (gasConstant * T * T);
      const ua = slope(noReturn);
      const step = stepWith({}, { ua, coolantTemperature: coolant });
      const crossings = heatCrossings(step, { value: release, slope }, coolant);
      expect(crossings.tangency).toBeCloseTo(noReturn, 6);
      expect(crossings.criticalCoolant).toBeCloseTo(coolant, 6);
      // The usual short form R T0^2/E of the distance.
      expect((gasConstant * coolant ** 2) / energy).toBeCloseTo(roughly, 6);
    },
  );
});
