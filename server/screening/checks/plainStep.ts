import type { Limits, Reaction, Step, Vessel } from "../../thermal/step.js";

/** A plain step whose every number is one or nothing, but for those that a check sets. */
export function plainStep(
  reaction: Partial<Reaction>,
  vessel: Partial<Vessel> = {},
  mixture: Partial<Step["mixture"]> = {},
  limits: Partial<Limits> = {},
): Step {
  return {
    mixture: { mass: 1, density: 1, heatCapacity: 1, thermalInertia: 1, ...mixture },
    reaction: {
      temperature: 300,
      amountA: 1,
      orderA: 1,
      b: null,
      feed: null,
      heat: -1,
      rate: null,
      measuredExcess: 0,
      ...reaction,
    },
    decomposition: null,
    vessel: { ua: 1, agitatorPower: 0, gain: null, coolantTemperature: 290, flowing: null, ...vessel },
    limits: {
      maximumTechnicalTemperature: 500,
      lowestTemperature: 280,
      highestTemperature: 400,
      availableTime: 3600,
      targetConversion: 0.98,
      coolingUse: 0.8,
      minimumTimeToMaximumRate: 86_400,
      decompositionAllowed: 0.05,
      controlBand: 0,
      ...limits,
    },
  };
}
