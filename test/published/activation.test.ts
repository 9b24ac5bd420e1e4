import { describe, expect, test } from "vitest";
import { diffusionLimit } from "../../server/kinetics/plausibility.js";
import {
  apparentActivationEnergy,
  arrheniusAt,
  eyringAt,
  fromEyring,
  lnRateConstant,
} from "../../server/kinetics/rateConstant.js";
import { gasConstant } from "../../server/numeric/constants.js";

describe("Eyring's equation by hand", () => {
  // dH = 62 kJ/mol, dS = -110 J/(mol K), 308.15 K. By hand, and in 30 digits by an independent implementation:
  // kB T/h = 6.42080e12 1/s, R T = 2562.10 J/mol, k = 6.42080e12 exp(-110/8.31446) exp(-62000/2562.10) = 3.56820e-4.
  const T = 308.15;
  const k = 3.568202985254278e-4;

  test("gives the rate constant of a first-order reaction", () => {
    expect(Math.exp(lnRateConstant(fromEyring(62_000, -110, 1000, 1, 1), T)) / k).toBeCloseTo(1, 12);
  });

  test("gives for second order, dS for 1 mol/L, the same figure in L/(mol s): a thousandth of it in m^3", () => {
    expect(Math.exp(lnRateConstant(fromEyring(62_000, -110, 1000, 1, 2), T)) / (k / 1000)).toBeCloseTo(1, 12);
  });

  test("is wrong by R ln 1000 = 57.43 J/(mol K) where a dS for 1 mol/L is read for 1 mol/m^3", () => {
    const right = fromEyring(62_000, -110, 1000, 1, 2);
    const shifted = fromEyring(62_000, -110 - 57.43427304244768, 1, 1, 2);
    expect(lnRateConstant(shifted, T)).toBeCloseTo(lnRateConstant(right, T), 12);
  });

  test("turns into Arrhenius parameters: Ea = dH + R T, ln A = ln(kB T/h) + 1 + dS/R", () => {
    const arrhenius = arrheniusAt(fromEyring(62_000, -110, 1000, 1, 1), T);
    expect(arrhenius.activationEnergy).toBeCloseTo(64_562.10165578392, 8);
    expect(arrhenius.lnPreExponential).toBeCloseTo(17.2606054332126, 12);
    expect(Math.exp(arrhenius.lnPreExponential) / 31_346_257.28954).toBeCloseTo(1, 11);
    expect(Math.exp(lnRateConstant(arrhenius, T)) / k).toBeCloseTo(1, 12);
  });

  test("comes back from them unchanged", () => {
    const back = eyringAt(arrheniusAt(fromEyring(62_000, -110, 1000, 1, 2), T), T, 1000, 1, 2);
    expect(back.activationEnthalpy).toBeCloseTo(62_000, 8);
    expect(back.activationEntropy).toBeCloseTo(-110, 10);
  });

  test("has the slope R T^2 d ln k/dT = dH + R T", () => {
    const rate = fromEyring(62_000, -110, 1000, 1, 1);
    const step = 0.01;
    const slope = (lnRateConstant(rate, T + step) - lnRateConstant(rate, T - step)) / (2 * step);
    expect(apparentActivationEnergy(rate, T) / (gasConstant * T * T * slope)).toBeCloseTo(1, 7);
  });
});

test("the diffusion limit in water at 25 degC is that of an independent implementation, in 30 digits", () => {
  expect((diffusionLimit(298.15, 0.89e-3) * 1000) / 7_427_586_605.55).toBeCloseTo(1, 11);
});
