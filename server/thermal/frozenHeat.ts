import {
  apparentActivationEnergy,
  lnRateConstant,
  type ModifiedArrhenius,
} from "../kinetics/rateConstant.js";
import { gasConstant } from "../numeric/constants.js";
import { findRoot } from "../numeric/roots.js";
import { coolingCapacity, decompositionHeat, effectiveUa } from "./cooling.js";
import type { DosingFigures } from "./dosing.js";
import type { Step } from "./step.js";

/**
 * Heat released against temperature, composition frozen at the moment of the largest reaction heat of an
 * isothermal step: qnet(T) = reaction + decomposition + agitator, feed cooling left out.
 */
export interface FrozenHeat {
  /** W */
  value(temperature: number): number;
  /** d qnet/dT, W/K */
  slope(temperature: number): number;
}

/**
 * Freezes the composition of an isothermal step at its largest reaction heat.
 *
 * @param step SI numbers
 * @param rate of the desired reaction
 * @param temperature of the isothermal step, K
 * @param dosing that step
 */
export function freezeHeat(
  step: Step,
  rate: ModifiedArrhenius,
  temperature: number,
  dosing: Pick<DosingFigures, "fastest">,
): FrozenHeat {
  const reactionHeat = dosing.fastest.value * -step.reaction.heat;
  const lnReaction = Math.log(reactionHeat) - lnRateConstant(rate, temperature);
  const { decomposition } = step;
  const other = decompositionHeat(step, temperature, dosing.fastest.at);
  const lnOther =
    decomposition === null ? 0 : Math.log(other) - lnRateConstant(decomposition.rate, temperature);
  const terms: { readonly rate: ModifiedArrhenius; readonly lnFactor: number }[] = [];
  if (reactionHeat > 0) terms.push({ rate, lnFactor: lnReaction });
  if (decomposition !== null && other > 0) terms.push({ rate: decomposition.rate, lnFactor: lnOther });
  const heat = (term: (typeof terms)[number], at: number): number =>
    Math.exp(term.lnFactor + lnRateConstant(term.rate, at));
  return {
    value: (at) => terms.reduce((sum, term) => sum + heat(term, at), step.vessel.agitatorPower),
    slope: (at) =>
      terms.reduce(
        (sum, term) =>
          sum + (heat(term, at) * apparentActivationEnergy(term.rate, at)) / (gasConstant * at * at),
        0,
      ),
  };
}

/** Where heat released and heat removed cross or touch, K; null where they do not below 1,500 K. */
export interface HeatCrossings {
  readonly noReturn: number | null;
  readonly tangency: number | null;
  readonly criticalCoolant: number | null;
}

const hottest = 1500;
const coldest = 50;

/**
 * Temperature of no return: the lowest T > Tp where qnet = UAe (T - Tc) with d qnet/dT > UAe. Tangency T*:
 * d qnet/dT = UAe; critical coolant temperature Tc* = T* - qnet(T*)/UAe.
 *
 * @param step SI numbers
 * @param heat frozen at the process temperature
 * @param temperature Tp, K
 * @see Semenov 1928, Z. Phys. 48:571; van Heerden 1953, Ind. Eng. Chem. 45:1242
 */
export function heatCrossings(step: Step, heat: FrozenHeat, temperature: number): HeatCrossings {
  const ua = effectiveUa(step);
  const steepness = (at: number): number => heat.slope(at) - ua;
  const excess = (at: number): number => heat.value(at) - coolingCapacity(step, at);
  let tangency: number | null = null;
  if (steepness(coldest) < 0 && steepness(hottest) > 0) {
    tangency = findRoot(steepness, coldest, hottest, { tolerance: 1e-10 });
  }
  let noReturn: number | null = null;
  // Past the tangency the excess only grows: one crossing at most, from below.
  const from = Math.max(temperature, tangency ?? coldest);
  if (excess(from) < 0 && excess(hottest) > 0) {
    noReturn = findRoot(excess, from, hottest, { tolerance: 1e-10 });
  }
  return {
    noReturn,
    tangency,
    criticalCoolant: tangency === null ? null : tangency - heat.value(tangency) / ua,
  };
}
