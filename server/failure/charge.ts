import type { Step } from "../thermal/step.js";
import type { Quench } from "./timeline.js";

/** What is in the vessel at a moment beyond the first charge. */
export interface Charge {
  /** kg fed so far */
  readonly fed: number;
  /** heat capacity of all quenches, J/K */
  readonly quenchCapacity: number;
  /** m^3 */
  readonly quenchVolume: number;
}

/** The charge with a quench dropped in. */
export function quenched(charge: Charge, quench: Quench): Charge {
  return {
    fed: charge.fed,
    quenchCapacity: charge.quenchCapacity + quench.mass * quench.heatCapacity,
    quenchVolume: charge.quenchVolume + quench.mass / quench.density,
  };
}

/**
 * Rate of the feed by the recipe.
 *
 * @returns kg/s; 0 for a batch
 */
function feedMassRate(step: Step): number {
  const { feed } = step.reaction;
  return feed === null ? 0 : feed.mass / feed.duration;
}

/**
 * How long the feed can run before it reaches the amount that the charged reactant needs, or before all of it is in:
 * whichever comes next. The balance bends at both.
 *
 * @returns s; 0 where nothing is left
 */
export function feedStretch(step: Step, charge: Charge): number {
  const { feed, amountA, b } = step.reaction;
  if (feed === null) return 0;
  const needed = b === null ? 1 : b.amount / b.perA / amountA;
  const stoichiometric = feed.reactant === "A" ? needed : 1 / needed;
  for (const part of [Math.min(stoichiometric, 1), 1]) {
    const left = part - charge.fed / feed.mass;
    // A rest within rounding is no rest.
    if (left > 1e-12) return left * feed.duration;
  }
  return 0;
}

/** The charge after the feed has run for a time, s, which must not exceed `feedStretch`. */
export function afterFeeding(step: Step, charge: Charge, time: number): Charge {
  const { feed } = step.reaction;
  if (feed === null || time === 0) return charge;
  return { ...charge, fed: Math.min(feed.mass, charge.fed + feedMassRate(step) * time) };
}

/** What is in the vessel, and by how much it grows in a second. */
export interface Inventory {
  /** kg of first charge and feed; a quench does not decompose */
  readonly mass: number;
  readonly massRate: number;
  /** J/K, walls and quenches included */
  readonly heatCapacity: number;
  readonly heatCapacityRate: number;
  /** m^3 */
  readonly volume: number;
  readonly volumeRate: number;
  /** mol charged and fed, before anything reacted */
  readonly amountA: number;
  readonly rateA: number;
  readonly amountB: number;
  readonly rateB: number;
}

/**
 * Inventory of the vessel: C' = C(t) + (phi - 1) m0 cp0 + quenches, V(t), m(t) and both amounts.
 *
 * @param step SI numbers
 * @param charge at a moment
 * @param feeding whether the feed runs then
 */
export function inventoryOf(step: Step, charge: Charge, feeding: boolean): Inventory {
  const { mixture, reaction } = step;
  const { feed } = reaction;
  const amountB = reaction.b?.amount ?? 0;
  const own = mixture.thermalInertia * mixture.mass * mixture.heatCapacity + charge.quenchCapacity;
  const volume = mixture.mass / mixture.density + charge.quenchVolume;
  if (feed === null) {
    return {
      mass: mixture.mass,
      massRate: 0,
      heatCapacity: own,
      heatCapacityRate: 0,
      volume,
      volumeRate: 0,
      amountA: reaction.amountA,
      rateA: 0,
      amountB,
      rateB: 0,
    };
  }
  const massRate = feeding ? feedMassRate(step) : 0;
  const part = charge.fed / feed.mass;
  const partRate = massRate / feed.mass;
  const feedsA = feed.reactant === "A";
  return {
    mass: mixture.mass + charge.fed,
    massRate,
    heatCapacity: own + charge.fed * feed.heatCapacity,
    heatCapacityRate: massRate * feed.heatCapacity,
    volume: volume + charge.fed / feed.density,
    volumeRate: massRate / feed.density,
    amountA: reaction.amountA * (feedsA ? part : 1),
    rateA: feedsA ? reaction.amountA * partRate : 0,
    amountB: amountB * (feedsA ? 1 : part),
    rateB: feedsA ? 0 : amountB * partRate,
  };
}
