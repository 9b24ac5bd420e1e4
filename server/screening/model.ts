import type { DecompositionRate, RateConstant } from "../kinetics/parameters.js";
import type { Estimate } from "../numeric/estimate.js";
import type { Limits } from "../thermal/step.js";
import type { WorkingsModel } from "./workingsModel.js";

/**
 * A parsed case: SI numbers only, every default filled in, nothing left to check.
 * Plain data, so that it can be handed to a worker thread.
 */
export interface CaseModel {
  readonly title: string;
  readonly mixture: {
    readonly mass: Estimate;
    readonly density: Estimate;
    readonly heatCapacity: Estimate;
    /** phi >= 1 */
    readonly thermalInertia: Estimate;
  };
  readonly reaction: ReactionModel;
  readonly decomposition: DecompositionModel | null;
  readonly vessel: VesselModel;
  readonly limits: LimitsModel;
  readonly workings: WorkingsModel;
  readonly failures: readonly FailureModel[];
  /** what the reviewer must know about each typed input */
  readonly inputs: readonly InputNote[];
}

export interface ReactantModel {
  readonly name: string | null;
  /** mol */
  readonly amount: Estimate;
  readonly order: Estimate;
}

export interface FeedModel {
  readonly reactant: "A" | "B";
  readonly mass: Estimate;
  readonly density: Estimate;
  readonly heatCapacity: Estimate;
  readonly temperature: Estimate;
  /** s */
  readonly duration: Estimate;
}

export interface ReactionModel {
  readonly name: string | null;
  readonly operation: "batch" | "semibatch";
  /** planned process temperature, K */
  readonly temperature: Estimate;
  readonly a: ReactantModel;
  /** `perA`: mol of B per mol of A */
  readonly b: (ReactantModel & { readonly perA: Estimate }) | null;
  /** present exactly where `operation` is "semibatch" */
  readonly feed: FeedModel | null;
  /** J per mol of A, negative */
  readonly heat: Estimate;
  /** null only where `measuredAccumulation` is given */
  readonly rateConstant: RateConstant | null;
  readonly measuredAccumulation: MeasuredAccumulation | null;
}

export interface MeasuredAccumulation {
  /** K */
  readonly temperature: number;
  readonly rows: readonly { /** s */ readonly time: number; readonly releasedFraction: number }[];
}

export interface DecompositionModel {
  /** J/kg of mixture, positive */
  readonly heat: Estimate;
  readonly rateLaw: {
    readonly model: "order" | "autocatalytic";
    readonly order: Estimate;
    readonly productOrder: Estimate;
    /** 0 for an order law */
    readonly initiation: Estimate;
  };
  readonly rateConstant: DecompositionRate;
}

export interface VesselModel {
  /** W/(m^2 K) */
  readonly heatTransferCoefficient: Estimate;
  /** m^2 */
  readonly heatTransferArea: Estimate;
  /** W */
  readonly agitatorPower: Estimate;
  /** heat taken up from warmer surroundings: W/K, K */
  readonly heatGain: { readonly coefficient: Estimate; readonly ambient: Estimate } | null;
  readonly coolant: {
    readonly temperature: Estimate;
    /** kg/s, J/(kg K), kg; null: constant jacket temperature */
    readonly flowing: {
      readonly flow: Estimate;
      readonly heatCapacity: Estimate;
      readonly holdup: Estimate;
    } | null;
  };
}

/** The limits of a step as it is computed with, and what the reviewer must know beside them. */
export interface LimitsModel extends Omit<Limits, "maximumTechnicalTemperature"> {
  readonly maximumTechnicalTemperature: Estimate;
  readonly maximumTechnicalTemperatureBasis: string | null;
  readonly controlBandGiven: boolean;
}

export interface FailureModel {
  readonly name: string;
  /** s from the start of the feed (batch: of the reaction) */
  readonly at: number | "worst";
  /** K; null: the process temperature */
  readonly startTemperature: number | null;
  readonly horizon: number | null;
  readonly response: {
    readonly detection: number;
    readonly decision: number;
    readonly action: number;
  } | null;
  readonly changes: readonly FailureChange[];
}

/** One moment of a failure's timeline. A field that is absent stays as it was. */
export interface FailureChange {
  /** s after the failure */
  readonly after: number;
  readonly coolantFlow?: number;
  readonly heatTransfer?: number;
  /** K */
  readonly coolantTemperature?: number;
  readonly feed?: "stop" | "continue";
  readonly agitator?: "on" | "off";
  readonly mixing?: number;
  readonly quench?: {
    readonly mass: number;
    readonly heatCapacity: number;
    readonly density: number;
    readonly temperature: number;
  };
}

/** How one typed quantity is known. */
export interface InputNote {
  /** JSON pointer into the case document */
  readonly pointer: string;
  /** as a reader names it: "heat transfer coefficient" */
  readonly label: string;
  /** as typed */
  readonly text: string;
  readonly standardErrorText: string | null;
  readonly basis: "measured" | "estimated" | "assumed" | null;
  readonly source: string | null;
}
