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
export function feedMassRate(step: Step): number {
  const { feed } = step.reaction;
  return feed === null ? 0 : feed.mass / feed.duration;
}

/**
 * How long the feed can still run before all of it is in.
 *
 * @returns s; 0 where nothing is left
 */
export function feedTimeLeft(step: Step, charge: Charge): number {
  const { feed } = step.reaction;
  if (feed === null) return 0;
  const left = 1 - charge.fed / feed.mass;
  // A rest within rounding is no rest.
  return left > 1e-12 ? left * feed.duration : 0;
}

/** The charge after the feed has run for a time, s, which must not exceed `feedTimeLeft`. */
export function afterFeeding(step: Step, charge: Charge, time: number): Charge {
  const { feed } = step.reaction;
  if (feed === null || time === 0) return charge;
  return { ...charge, fed: Math.min(feed.mass, charge.fed + feedMassRate(step) * time) };
}
