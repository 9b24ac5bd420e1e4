import { gasConstant } from "../numeric/constants.js";
import { arrheniusAt, eyringAt, fromEyring, lnRateConstant, type ModifiedArrhenius } from "./rateConstant.js";

/**
 * Largest rate constant of two species that must meet by diffusion, 8 R T/(3 eta).
 *
 * @param temperature K
 * @param viscosity eta of the medium, Pa s
 * @returns m^3/(mol s)
 * @see Smoluchowski 1917, Z. Phys. Chem. 92:129; Atkins, Physical Chemistry (7.4e9 L/(mol s) in water at 25 degC)
 */
export function diffusionLimit(temperature: number, viscosity: number): number {
  return (8 * gasConstant * temperature) / (3 * viscosity);
}

/**
 * Viscosity of water, 2.414e-5 x 10^(247.8/(T - 140)) Pa s, good to 2.5 % from 0 to 370 degC.
 *
 * @param temperature K; taken as 273.15 K below that
 * @returns Pa s
 * @see Touloukian, Saxena & Hestermans 1975 (Vogel form; from memory), 0.890 mPa s at 25 degC
 */
export function viscosityOfWater(temperature: number): number {
  return 2.414e-5 * 10 ** (247.8 / (Math.max(temperature, 273.15) - 140));
}

/**
 * How far apart Eyring's and Arrhenius' equations are at a temperature when both are tangent at the middle
 * of the fitted range. Only one of them was fitted; the data there cannot tell them apart.
 *
 * @param rate parameters as fitted
 * @param middle of the fitted range, K
 * @param temperature K
 * @returns ln(k of the other form/k of the typed form)
 */
export function formsApart(rate: ModifiedArrhenius, middle: number, temperature: number): number {
  const other = rate.temperaturePower === 0 ? tangentEyring(rate, middle) : arrheniusAt(rate, middle);
  return lnRateConstant(other, temperature) - lnRateConstant(rate, temperature);
}

function tangentEyring(rate: ModifiedArrhenius, middle: number): ModifiedArrhenius {
  const pair = eyringAt(rate, middle, 1, 1, 1);
  return fromEyring(pair.activationEnthalpy, pair.activationEntropy, 1, 1, 1);
}

/**
 * By how many kelvin a temperature lies outside a fitted range: above it positive, below it negative.
 *
 * @param temperature K
 * @param range K
 */
export function extrapolation(temperature: number, range: readonly [number, number]): number {
  if (temperature < range[0]) return temperature - range[0];
  return temperature > range[1] ? temperature - range[1] : 0;
}
