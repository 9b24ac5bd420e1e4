import { limitingAmount } from "../thermal/balance.js";
import { overallOrder } from "../thermal/reactionRate.js";
import type { Step } from "../thermal/step.js";

/**
 * What the isothermal balance of a semibatch depends on once extent is counted in parts of the limiting amount and
 * time in parts of the feed's duration: besides the orders, which reactant is fed and ln k + `lnFactor` only the
 * excess of B and the volume fed, both kept as logarithms.
 */
export interface RecipeForm {
  /** ln of what k is multiplied by: tau nlim^(n-1) nu^b V0^(1-n) */
  readonly lnFactor: number;
  /** ln of (nB/nu)/nA; 0 without B */
  readonly lnExcess: number;
  /** part of the feed's duration at which the fed reactant reaches the stoichiometric amount, at most 1 */
  readonly turn: number;
  /** ln of the volume of the feed over that of the contents before it */
  readonly lnDilution: number;
  /** nlim, mol */
  readonly limiting: number;
  /** tau, s */
  readonly duration: number;
  /** m0 cp0, J/K */
  readonly capacity: number;
  /** heat capacity of the feed over `capacity` */
  readonly heatRatio: number;
}

/**
 * The dimensionless form of a recipe. From r V = k (nA/V)^a (nB/V)^b V with nA = nlim (eA - x), nB = nu nlim (eB - x),
 * V = V0 (1 + epsilon t/tau): tau/nlim r V = k tau nlim^(n-1) nu^b V0^(1-n) (eA - x)^a (eB - x)^b (1 + epsilon t/tau)^(1-n).
 *
 * @param step SI numbers of a semibatch
 * @returns null for a batch
 */
export function recipeForm(step: Step): RecipeForm | null {
  const { mixture, reaction } = step;
  const { b, feed, amountA } = reaction;
  if (feed === null) return null;
  const order = overallOrder(reaction);
  const limiting = limitingAmount(step);
  const volume = mixture.mass / mixture.density;
  const capacity = mixture.mass * mixture.heatCapacity;
  const lnExcess = b === null ? 0 : Math.log(b.amount / b.perA / amountA);
  return {
    lnFactor:
      Math.log(feed.duration) +
      (order - 1) * Math.log(limiting / volume) +
      (b === null ? 0 : b.order * Math.log(b.perA)),
    lnExcess,
    turn: Math.min(1, Math.exp(feed.reactant === "B" ? -lnExcess : lnExcess)),
    lnDilution: Math.log(feed.mass / feed.density / volume),
    limiting,
    duration: feed.duration,
    capacity,
    heatRatio: (feed.mass * feed.heatCapacity) / capacity,
  };
}

/**
 * A recipe with another excess and dilution, by more or less of B and another density of the contents.
 *
 * @param step SI numbers of a semibatch
 * @param excess factor of the excess
 * @param dilution factor of the dilution
 */
export function recipeWith(step: Step, excess: number, dilution: number): Step {
  const { mixture, reaction } = step;
  const { b } = reaction;
  return {
    ...step,
    mixture: { ...mixture, density: mixture.density * dilution },
    reaction: { ...reaction, b: b === null ? null : { ...b, amount: b.amount * excess } },
  };
}
