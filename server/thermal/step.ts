import type { ModifiedArrhenius } from "../kinetics/rateConstant.js";
import type { RateLaw } from "../kinetics/rateLaw.js";

/**
 * One batch in plain SI numbers: a case at its estimates, or one draw from them.
 * What every balance below takes; nothing in it is uncertain any more.
 */
export interface Step {
  readonly mixture: {
    readonly mass: number;
    readonly density: number;
    readonly heatCapacity: number;
    readonly thermalInertia: number;
  };
  readonly reaction: Reaction;
  readonly decomposition: Decomposition | null;
  readonly vessel: Vessel;
  readonly limits: Limits;
}

/** The desired reaction A + nu B and how it is run. */
export interface Reaction {
  /** process temperature, K */
  readonly temperature: number;
  /** mol */
  readonly amountA: number;
  readonly orderA: number;
  /** null: B takes no part in the rate law or the balance */
  readonly b: { readonly amount: number; readonly order: number; readonly perA: number } | null;
  /** null: batch */
  readonly feed: Feed | null;
  /** J per mol of A, negative */
  readonly heat: number;
  /** null: unknown, only a measured accumulation is there */
  readonly rate: ModifiedArrhenius | null;
  /** K by which a measured accumulation lets MTSR exceed what the kinetics say; 0 without one */
  readonly measuredExcess: number;
}

export interface Feed {
  readonly reactant: "A" | "B";
  readonly mass: number;
  readonly density: number;
  readonly heatCapacity: number;
  readonly temperature: number;
  readonly duration: number;
}

/** A secondary reaction of the mixture as it is. */
export interface Decomposition {
  /** J/kg of mixture */
  readonly heat: number;
  readonly law: RateLaw;
  readonly rate: ModifiedArrhenius;
}

export interface Vessel {
  /** W/K */
  readonly ua: number;
  readonly agitatorPower: number;
  /** heat taken up from warmer surroundings, W/K and K */
  readonly gain: { readonly coefficient: number; readonly ambient: number } | null;
  readonly coolantTemperature: number;
  /** null: the jacket stays at the coolant's temperature */
  readonly flowing: { readonly flow: number; readonly heatCapacity: number; readonly holdup: number } | null;
}

export interface Limits {
  readonly maximumTechnicalTemperature: number;
  readonly lowestTemperature: number;
  readonly highestTemperature: number;
  readonly availableTime: number;
  readonly targetConversion: number;
  readonly coolingUse: number;
  readonly minimumTimeToMaximumRate: number;
  readonly decompositionAllowed: number;
  /** K, half-width about the planned temperature */
  readonly controlBand: number;
}
