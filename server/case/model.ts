import type {
  CaseModel,
  DecompositionModel,
  FailureChange,
  FailureModel,
  LimitsModel,
  ReactionModel,
  VesselModel,
} from "../screening/model.js";
import { inputNotes } from "./inputs.js";
import { decompositionRateOf, rateConstantOf } from "./rateConstantModel.js";
import type { CaseDocument, CaseFigures } from "./schema.js";
import { workingsModel } from "./workingInputs.js";

/**
 * The parsed case: SI only, every default filled in.
 *
 * @param figures of a document without a fault
 * @param document the same as typed
 */
export function modelOf(figures: CaseFigures, document: CaseDocument): CaseModel {
  return {
    title: figures.title,
    mixture: figures.mixture,
    reaction: reactionOf(figures.reaction),
    decomposition: figures.decomposition === undefined ? null : decompositionOf(figures.decomposition),
    vessel: vesselOf(figures.vessel),
    limits: limitsOf(figures.limits, document.limits.controlBand !== undefined),
    workings: workingsModel(figures),
    failures: (figures.failures ?? []).map(failureOf),
    inputs: inputNotes(document),
  };
}

function reactionOf(reaction: CaseFigures["reaction"]): ReactionModel {
  const { A, B } = reaction.reactants;
  const order = A.order.value + (B?.order.value ?? 0);
  return {
    name: reaction.name ?? null,
    operation: reaction.operation,
    temperature: reaction.temperature,
    a: { name: A.name ?? null, amount: A.amount, order: A.order },
    b:
      B === undefined
        ? null
        : {
            name: B.name ?? null,
            amount: B.amount,
            order: B.order,
            perA: B.perA,
          },
    feed: reaction.feed ?? null,
    heat: reaction.heat,
    rateConstant: reaction.rateConstant === undefined ? null : rateConstantOf(reaction.rateConstant, order),
    measuredAccumulation:
      reaction.measuredAccumulation === undefined
        ? null
        : {
            temperature: reaction.measuredAccumulation.temperature.value,
            rows: reaction.measuredAccumulation.rows.map((row) => ({
              time: row.time.value,
              releasedFraction: row.releasedFraction,
            })),
          },
  };
}

function decompositionOf(decomposition: NonNullable<CaseFigures["decomposition"]>): DecompositionModel {
  const { heat, rateLaw } = decomposition;
  const none = { value: 0, standardError: null };
  return {
    heat,
    rateLaw:
      rateLaw.model === "autocatalytic"
        ? rateLaw
        : {
            ...rateLaw,
            productOrder: { value: 1, standardError: null },
            initiation: none,
          },
    rateConstant: decompositionRateOf(decomposition.rateConstant),
  };
}

function vesselOf(vessel: CaseFigures["vessel"]): VesselModel {
  const { temperature, flow, heatCapacity, holdup } = vessel.coolant;
  const flowing = flow !== undefined && heatCapacity !== undefined && holdup !== undefined;
  return {
    heatTransferCoefficient: vessel.heatTransferCoefficient,
    heatTransferArea: vessel.heatTransferArea,
    agitatorPower: vessel.agitatorPower,
    heatGain: vessel.heatGain ?? null,
    coolant: {
      temperature,
      flowing: flowing ? { flow, heatCapacity, holdup } : null,
    },
  };
}

function limitsOf(limits: CaseFigures["limits"], controlBandGiven: boolean): LimitsModel {
  const { basis, ...maximumTechnicalTemperature } = limits.maximumTechnicalTemperature;
  return {
    maximumTechnicalTemperature,
    maximumTechnicalTemperatureBasis: basis,
    lowestTemperature: limits.lowestTemperature.value,
    highestTemperature: limits.highestTemperature.value,
    availableTime: limits.availableTime.value,
    targetConversion: limits.targetConversion.value,
    coolingUse: limits.coolingUse.value,
    minimumTimeToMaximumRate: limits.minimumTimeToMaximumRate.value,
    decompositionAllowed: limits.decompositionAllowed.value,
    controlBand: limits.controlBand.value,
    controlBandGiven,
  };
}

type FailureFigures = NonNullable<CaseFigures["failures"]>[number];

function failureOf(failure: FailureFigures): FailureModel {
  const { response } = failure;
  return {
    name: failure.name,
    at: failure.at === "worst" ? failure.at : failure.at.value,
    startTemperature: failure.startTemperature?.value ?? null,
    horizon: failure.horizon?.value ?? null,
    response:
      response === undefined
        ? null
        : {
            detection: response.detection.value,
            decision: response.decision.value,
            action: response.action.value,
          },
    changes: failure.changes.map(changeOf),
  };
}

function changeOf(change: FailureFigures["changes"][number]): FailureChange {
  const { after, coolantTemperature, quench, ...factors } = change;
  return {
    ...defined(factors),
    after: after.value,
    ...(coolantTemperature === undefined ? {} : { coolantTemperature: coolantTemperature.value }),
    ...(quench === undefined
      ? {}
      : {
          quench: {
            mass: quench.mass.value,
            heatCapacity: quench.heatCapacity.value,
            density: quench.density.value,
            temperature: quench.temperature.value,
          },
        }),
  };
}

/** The same without its keys of no value. */
function defined<Parts extends object>(
  parts: Parts,
): { [Key in keyof Parts]: Exclude<Parts[Key], undefined> } {
  const kept = Object.entries(parts).filter(([, part]) => part !== undefined);
  return Object.fromEntries(kept) as {
    [Key in keyof Parts]: Exclude<Parts[Key], undefined>;
  };
}
