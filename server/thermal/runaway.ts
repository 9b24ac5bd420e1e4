import type { ModifiedArrhenius } from "../kinetics/rateConstant.js";
import { apparentActivationEnergy, lnRateConstant } from "../kinetics/rateConstant.js";
import type { RateLaw } from "../kinetics/rateLaw.js";
import { lawValue } from "../kinetics/rateLaw.js";
import { gasConstant } from "../numeric/constants.js";
import { gaussLegendre } from "../numeric/quadrature.js";
import { alphaAtLargestRate } from "./largestRate.js";

/** A decomposition on its own: kinetics, and the adiabatic rise of its full progress in K. */
export interface Runaway {
  readonly law: RateLaw;
  readonly rate: ModifiedArrhenius;
  readonly rise: number;
}

/** Time to the maximum rate and where that maximum lies. */
export interface TimeToMaximum {
  /** s; may be infinite where it exceeds the range of floating-point numbers */
  readonly time: number;
  readonly alphaAtMaximum: number;
  /** false: the rate falls from the start, and `time` is the closed form */
  readonly accelerates: boolean;
}

/**
 * Points per panel, the s from which exp(-s) adds nothing to the integral, and how well its end is located: to the
 * last digits, and to 1e-6 for the many evaluations of the draws.
 */
const rules = {
  full: { points: 14, negligible: 45, end: 1e-13 },
  draws: { points: 5, negligible: 20, end: 1e-8 },
} as const;
export type Accuracy = keyof typeof rules;
type Rule = (typeof rules)[Accuracy];

/**
 * Adiabatic time to maximum rate, TMRad = integral from alpha0 to alpha* of d alpha/(k f).
 * A quadrature, not an initial value problem. Where the rate falls from the start there is no runaway
 * maximum, and the closed form of a zero-order reaction is returned in its place.
 *
 * @param runaway kinetics and rise (K, > 0)
 * @param start T0, K
 * @param alpha0 progress at the start, 0 for fresh material
 * @param accuracy "full" is good to 1e-11, "draws" to 1e-6
 * @returns time in s with the progress at the maximum; NaN where T0 is no temperature
 * @see Townsend & Tou 1980, Thermochim. Acta 37:1; Keller et al. 1997, J. Loss Prev. Process Ind. 10:31
 */
export function timeToMaximumRate(
  runaway: Runaway,
  start: number,
  alpha0 = 0,
  accuracy: Accuracy = "full",
): TimeToMaximum {
  if (!(start > 0)) return { time: Number.NaN, alphaAtMaximum: alpha0, accelerates: false };
  const alphaAtMaximum = alphaAtLargestRate(runaway, start, alpha0, rules[accuracy].end);
  if (!(alphaAtMaximum > alpha0)) {
    return { time: zeroOrderTime(runaway, start, alpha0), alphaAtMaximum: alpha0, accelerates: false };
  }
  const { law, rate } = runaway;
  const scaled =
    !law.autocatalytic && rate.activationEnergy > gasConstant * start
      ? orderIntegral(runaway, start, alpha0, alphaAtMaximum, rules[accuracy])
      : progressIntegral(runaway, start, alpha0, alphaAtMaximum, rules[accuracy]);
  return { time: scaled * Math.exp(-lnRateConstant(rate, start)), alphaAtMaximum, accelerates: true };
}

/**
 * k(T0) TMRad of an order law, in s = E/R (1/T0 - 1/T): the integrand is then exp(-s) times a slowly
 * varying factor whose nearest singularity (alpha = 1) lies about n beyond the end.
 */
function orderIntegral(
  runaway: Runaway,
  start: number,
  alpha0: number,
  alphaEnd: number,
  { points, negligible }: Rule,
): number {
  const { law, rate, rise } = runaway;
  const { nodes, weights } = gaussLegendre(points);
  const perKelvin = gasConstant / rate.activationEnergy;
  const endTemperature = start + rise * (alphaEnd - alpha0);
  const end = (1 / start - 1 / endTemperature) / perKelvin;
  const beyond = Math.min(law.order > 0 ? law.order : 1e9, 1 / (perKelvin * endTemperature));
  const stop = Math.min(end, negligible);
  const inverseStart = 1 / start;
  let sum = 0;
  for (let low = 0; low < stop; ) {
    let length = Math.min(1.2 + 0.8 * low, 0.7 * (end - low + beyond));
    if (low + 1.2 * length >= stop) length = stop - low;
    const half = 0.5 * length;
    const middle = low + half;
    for (let i = 0; i < points; i += 1) {
      const s = middle + half * nodes[i];
      const temperature = 1 / (inverseStart - perKelvin * s);
      const alpha = alpha0 + (temperature - start) / rise;
      const power = coolness(start / temperature, rate.temperaturePower);
      sum += (weights[i] * half * power * temperature * temperature * Math.exp(-s)) / lawValue(law, alpha);
    }
    low += length;
  }
  return (sum * perKelvin) / rise;
}

/** (T0/T)^b. Nearly every rate constant has b = 0 (Arrhenius) or 1 (Eyring), which need no power. */
function coolness(ratio: number, power: number): number {
  if (power === 0) return 1;
  return power === 1 ? ratio : ratio ** power;
}

/**
 * k(T0) TMRad of any law, in alpha on panels that grow geometrically from the start: equal panels miss the
 * slow beginning of a weakly initiated autocatalytic law by percents.
 */
function progressIntegral(
  runaway: Runaway,
  start: number,
  alpha0: number,
  alphaEnd: number,
  { points, negligible }: Rule,
): number {
  const { law, rate, rise } = runaway;
  const { nodes, weights } = gaussLegendre(points);
  const span = alphaEnd - alpha0;
  const barrier = rate.activationEnergy / gasConstant;
  const beyond = 1 - alphaEnd;
  let sum = 0;
  let length = firstPanel(law, alpha0, span);
  for (let low = 0; low < span; ) {
    length = Math.min(length, 0.7 * (span - low + beyond));
    if (low + 1.2 * length >= span) length = span - low;
    const half = 0.5 * length;
    const middle = low + half;
    for (let i = 0; i < points; i += 1) {
      const progress = middle + half * nodes[i];
      const temperature = start + rise * progress;
      const s = barrier * (1 / start - 1 / temperature);
      const power = coolness(start / temperature, rate.temperaturePower);
      sum += (weights[i] * half * power * Math.exp(-s)) / lawValue(law, alpha0 + progress);
    }
    low += length;
    length = low;
    if (barrier * (1 / start - 1 / (start + rise * low)) > negligible) break;
  }
  return sum;
}

/**
 * Length of the first panel: well inside the distance on which f or the heating changes. alpha^m with a
 * broken m is not smooth at 0, so that the panels there begin at 1e-8 of the span.
 */
function firstPanel(law: RateLaw, alpha0: number, span: number): number {
  if (!law.autocatalytic) return 0.05 * span;
  const scale = alpha0 + law.initiation ** (1 / law.productOrder);
  const smooth = Number.isInteger(law.productOrder) || alpha0 > 1e-3 * span;
  return Math.max(Math.min(0.5 * scale, smooth ? 0.05 * span : 1e-8 * span), 1e-290);
}

/**
 * Closed form of the adiabatic time to maximum rate for zero order,
 * TMRad = c R T0^2/(q' Ea) = R T0^2/(Ea dTad,d k f).
 *
 * @param runaway kinetics and rise (K)
 * @param start T0, K
 * @param alpha0 progress at the start
 * @returns s; infinite where the rate is zero or does not rise with temperature
 * @see Townsend & Tou 1980, Thermochim. Acta 37:1; Semenov 1928, Z. Phys. 48:571
 * Cautious only for order laws with B = Ea dTad,d/(R T0^2) >= n + 3; for an autocatalytic law it can be a
 * hundred times too long.
 */
export function zeroOrderTime(runaway: Runaway, start: number, alpha0 = 0): number {
  const { law, rate, rise } = runaway;
  const energy = apparentActivationEnergy(rate, start);
  const progressRate = lawValue(law, alpha0);
  if (!(energy > 0 && progressRate > 0)) return Number.POSITIVE_INFINITY;
  return (
    ((gasConstant * start * start) / (energy * rise * progressRate)) * Math.exp(-lnRateConstant(rate, start))
  );
}

/**
 * Whether the closed form errs on the careful side: only for order laws with
 * B = Ea dTad,d/(R T0^2) >= n + 3.
 *
 * @param runaway kinetics and rise (K)
 * @param start T0, K
 */
export function zeroOrderIsCautious(runaway: Runaway, start: number): boolean {
  const { law, rate, rise } = runaway;
  const b = (apparentActivationEnergy(rate, start) * rise) / (gasConstant * start * start);
  return !law.autocatalytic && b >= law.order + 3;
}
