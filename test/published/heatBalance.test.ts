import { describe, expect, test } from "vitest";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import { gasConstant } from "../../server/numeric/constants.js";
import { heatCrossings } from "../../server/thermal/frozenHeat.js";
import { stepWith } from "./steps.js";

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
