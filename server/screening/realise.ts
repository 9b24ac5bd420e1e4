import type { DecompositionRate, RateConstant } from "../kinetics/parameters.js";
import {
  fromArrhenius,
  fromEyring,
  fromReference,
  type ModifiedArrhenius,
} from "../kinetics/rateConstant.js";
import { largestLawValue, type RateLaw } from "../kinetics/rateLaw.js";
import type { Estimate } from "../numeric/estimate.js";
import { decompositionRise } from "../thermal/balance.js";
import { timeToMaximumRate } from "../thermal/runaway.js";
import type { Decomposition, Step } from "../thermal/step.js";
import { day } from "../thermal/td24.js";
import type { Sample } from "../uncertainty/sample.js";
import type { KnownRate, KnownRates } from "./known.js";
import type { CaseModel, DecompositionModel } from "./model.js";

const none = [0, 0] as const;

/** The estimates themselves. */
export const estimates: Sample = {
  normal: (_, estimate) => estimate.value,
  logNormal: (_, estimate) => estimate.value,
  pair: () => none,
};

/** An order drawn at or below zero would turn the rate law over. */
const lowestOrder = 0.01;

/** So is a temperature drawn at or below 0 K none. */
const coldest = 1;

/**
 * Puts a parsed case into plain numbers. Temperatures, energies, entropies, the heat of reaction and orders are
 * normal; amounts, masses, heat capacities, densities, UA, Q, flows, rate constants and the initiation are
 * log-normal.
 *
 * @param model parsed case
 * @param known fits and covariances of its rate constants
 * @param sample source of the numbers
 */
export function realise(model: CaseModel, known: KnownRates, sample: Sample): Step {
  const { mixture, reaction, vessel, limits } = model;
  const { feed, b } = reaction;
  const { flowing } = vessel.coolant;
  const step: Step = {
    mixture: {
      mass: sample.logNormal("/mixture/mass", mixture.mass),
      density: sample.logNormal("/mixture/density", mixture.density),
      heatCapacity: sample.logNormal("/mixture/heatCapacity", mixture.heatCapacity),
      thermalInertia: Math.max(1, sample.logNormal("/mixture/thermalInertia", mixture.thermalInertia)),
    },
    reaction: {
      temperature: temperatureIn(sample, "/reaction/temperature", reaction.temperature),
      amountA: sample.logNormal("/reaction/reactants/A/amount", reaction.a.amount),
      orderA: Math.max(lowestOrder, sample.normal("/reaction/reactants/A/order", reaction.a.order)),
      b:
        b === null
          ? null
          : {
              amount: sample.logNormal("/reaction/reactants/B/amount", b.amount),
              order: Math.max(lowestOrder, sample.normal("/reaction/reactants/B/order", b.order)),
              perA: sample.logNormal("/reaction/reactants/B/perA", b.perA),
            },
      feed:
        feed === null
          ? null
          : {
              reactant: feed.reactant,
              mass: sample.logNormal("/reaction/feed/mass", feed.mass),
              density: sample.logNormal("/reaction/feed/density", feed.density),
              heatCapacity: sample.logNormal("/reaction/feed/heatCapacity", feed.heatCapacity),
              temperature: temperatureIn(sample, "/reaction/feed/temperature", feed.temperature),
              duration: sample.logNormal("/reaction/feed/duration", feed.duration),
            },
      // A heat drawn on the endothermic side would be another reaction.
      heat: Math.min(sample.normal("/reaction/heat", reaction.heat), -1e-9),
      rate:
        reaction.rateConstant === null
          ? null
          : rateOf("/reaction/rateConstant", reaction.rateConstant, known.reaction, sample),
      measuredExcess: known.measuredExcess,
    },
    decomposition: null,
    vessel: {
      ua:
        sample.logNormal("/vessel/heatTransferCoefficient", vessel.heatTransferCoefficient) *
        sample.logNormal("/vessel/heatTransferArea", vessel.heatTransferArea),
      agitatorPower: sample.logNormal("/vessel/agitatorPower", vessel.agitatorPower),
      gain:
        vessel.heatGain === null
          ? null
          : {
              coefficient: sample.logNormal("/vessel/heatGain/coefficient", vessel.heatGain.coefficient),
              ambient: temperatureIn(sample, "/vessel/heatGain/ambient", vessel.heatGain.ambient),
            },
      coolantTemperature: temperatureIn(sample, "/vessel/coolant/temperature", vessel.coolant.temperature),
      flowing:
        flowing === null
          ? null
          : {
              flow: sample.logNormal("/vessel/coolant/flow", flowing.flow),
              heatCapacity: sample.logNormal("/vessel/coolant/heatCapacity", flowing.heatCapacity),
              holdup: sample.logNormal("/vessel/coolant/holdup", flowing.holdup),
            },
    },
    limits: {
      ...limits,
      maximumTechnicalTemperature: temperatureIn(
        sample,
        "/limits/maximumTechnicalTemperature",
        limits.maximumTechnicalTemperature,
      ),
    },
  };
  if (model.decomposition === null) return step;
  return { ...step, decomposition: decompositionOf(model.decomposition, known.decomposition, step, sample) };
}

function temperatureIn(sample: Sample, pointer: string, estimate: Estimate): number {
  return Math.max(coldest, sample.normal(pointer, estimate));
}

function rateOf(
  pointer: string,
  parameters: RateConstant,
  known: KnownRate | null,
  sample: Sample,
): ModifiedArrhenius {
  if (parameters.form === "reference") {
    const k = sample.logNormal(`${pointer}/rateConstant`, parameters.rateConstant);
    const at = temperatureIn(sample, `${pointer}/at`, parameters.at);
    const energy = sample.normal(`${pointer}/activationEnergy`, parameters.activationEnergy);
    return fromReference(Math.log(k), at, energy);
  }
  const [intercept, barrier] = sample.pair(
    pointer,
    known?.covariance ?? null,
    known?.degreesOfFreedom ?? null,
  );
  const rate = fittedRate(parameters, known);
  return intercept === 0 && barrier === 0
    ? rate
    : {
        lnPreExponential: rate.lnPreExponential + intercept,
        temperaturePower: rate.temperaturePower,
        activationEnergy: rate.activationEnergy + barrier,
      };
}

function fittedRate(
  parameters: Exclude<RateConstant, { form: "reference" }>,
  known: KnownRate | null,
): ModifiedArrhenius {
  switch (parameters.form) {
    case "eyring":
      return fromEyring(
        parameters.activationEnthalpy.value,
        parameters.activationEntropy.value,
        parameters.standardConcentration,
        parameters.transmissionCoefficient,
        parameters.order,
      );
    case "arrhenius":
      return fromArrhenius(parameters.lnPreExponential.value, parameters.activationEnergy.value);
    case "table": {
      if (known === null || known.fit === null) throw new Error("A table is fitted before it is used");
      return known.fit[parameters.fitAs].rate;
    }
  }
}

function decompositionOf(
  model: DecompositionModel,
  known: KnownRate | null,
  step: Step,
  sample: Sample,
): Decomposition {
  const heat = sample.logNormal("/decomposition/heat", model.heat);
  const { rateLaw } = model;
  const autocatalytic = rateLaw.model === "autocatalytic";
  const law: RateLaw = {
    autocatalytic,
    order: Math.max(0, sample.normal("/decomposition/rateLaw/order", rateLaw.order)),
    productOrder: autocatalytic
      ? Math.max(lowestOrder, sample.normal("/decomposition/rateLaw/productOrder", rateLaw.productOrder))
      : 1,
    initiation: autocatalytic ? sample.logNormal("/decomposition/rateLaw/initiation", rateLaw.initiation) : 0,
  };
  return { heat, law, rate: decompositionRate(model.rateConstant, known, heat, law, step, sample) };
}

/** heatRate: kref = q'ref/(Q fref). td24: kref such that TMRad from the temperature is 24 h. */
function decompositionRate(
  parameters: DecompositionRate,
  known: KnownRate | null,
  heat: number,
  law: RateLaw,
  step: Step,
  sample: Sample,
): ModifiedArrhenius {
  const pointer = "/decomposition/rateConstant";
  switch (parameters.form) {
    case "heatRate": {
      const released = sample.logNormal(`${pointer}/heatReleaseRate`, parameters.heatReleaseRate);
      const at = temperatureIn(sample, `${pointer}/at`, parameters.at);
      const energy = sample.normal(`${pointer}/activationEnergy`, parameters.activationEnergy);
      const largest = law.autocatalytic ? largestLawValue(law) : 1;
      return fromReference(Math.log(released / (heat * largest)), at, energy);
    }
    case "td24": {
      const at = temperatureIn(sample, `${pointer}/temperature`, parameters.temperature);
      const energy = sample.normal(`${pointer}/activationEnergy`, parameters.activationEnergy);
      const unit = fromReference(0, at, energy);
      const rise = decompositionRise(step, { heat, law, rate: unit });
      const timeAtUnitRate = timeToMaximumRate({ law, rate: unit, rise }, at).time;
      return fromReference(Math.log(timeAtUnitRate / day), at, energy);
    }
    default:
      return rateOf(pointer, parameters, known, sample);
  }
}
