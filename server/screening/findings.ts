import type { DriverFindings, NextMeasurements } from "./decisionFindings.js";
import type { Working } from "./workingsOutline.js";

/** The document that a screening gives: SI, full precision, every number finite or null. */
export interface Findings {
  readonly format: "thermal-window/findings-1";
  readonly notice: string;
  readonly program: { readonly name: string; readonly version: string };
  /** sha256 of the case in RFC 8785 canonical JSON, lower-case hex */
  readonly digest: string;
  /** the desired reaction; null where only a measured accumulation is known */
  readonly rate: RateFindings | null;
  readonly decompositionRate: RateFindings | null;
  readonly heat: {
    readonly adiabaticRise_K: number;
    readonly severity: Severity;
    readonly decompositionRise_K: number | null;
    readonly decompositionSeverity: Severity | null;
  };
  readonly accumulation: AccumulationFindings | null;
  readonly temperatures: {
    readonly process_K: number;
    readonly mtsr_K: number | null;
    readonly mtt_K: number;
    readonly td24_K: number | null;
    readonly allAtOnce_K: number | null;
  };
  readonly timeToMaximumRate: TmradFindings | null;
  readonly criticality: {
    /** null: not assessed */
    readonly class: CriticalityClass | null;
    readonly probability: Readonly<Record<CriticalityKey, number>> | null;
  };
  readonly cooling: CoolingFindings | null;
  readonly window: WindowFindings | null;
  readonly failures: readonly FailureFindings[] | null;
  readonly uncertainty: UncertaintyFindings | null;
  /** how fields were worked out from other figures */
  readonly workings: readonly Working[];
  readonly cautions: readonly Caution[];
}

export type Severity = "low" | "medium" | "high";
export type CriticalityClass = 1 | 2 | 3 | 4 | 5 | "none";
export type CriticalityKey = "1" | "2" | "3" | "4" | "5" | "none";

export interface RateFindings {
  readonly atProcess: {
    readonly temperature_K: number;
    /** (m^3/mol)^(n-1)/s; null beyond the range of floating-point numbers */
    readonly k: number | null;
    readonly unit: string;
    readonly low95: number | null;
    readonly high95: number | null;
    /** outside the fitted range by so many kelvin, below it negative; 0 inside; null: no range known */
    readonly extrapolation_K: number | null;
    readonly apparentActivationEnergy_J_mol: number;
  };
  readonly table: readonly {
    readonly temperature_K: number;
    readonly k: number;
    readonly low95: number | null;
    readonly high95: number | null;
    readonly extrapolated: boolean | null;
  }[];
  readonly eyring: {
    readonly activationEnthalpy_J_mol: number;
    readonly activationEntropy_J_molK: number;
    readonly activationEnthalpyError_J_mol: number | null;
    readonly activationEntropyError_J_molK: number | null;
    readonly correlation: number | null;
    readonly standardConcentration_mol_m3: number;
    readonly transmissionCoefficient: number;
    /** K at which the pair is equivalent to the typed form; null where it was typed or fitted itself */
    readonly equivalentAt_K: number | null;
  };
  readonly arrhenius: {
    /** ln of A in `atProcess.unit` */
    readonly lnPreExponential: number;
    readonly activationEnergy_J_mol: number;
    readonly lnPreExponentialError: number | null;
    readonly activationEnergyError_J_mol: number | null;
    readonly correlation: number | null;
    readonly equivalentAt_K: number | null;
  };
  readonly fittedRange_K: readonly [number, number] | null;
  readonly fit: FitFindings | null;
}

export interface FitFindings {
  readonly residualStandardDeviation: number;
  readonly degreesOfFreedom: number;
  /** null with fewer than four rows */
  readonly curvatureP: number | null;
  readonly rows: readonly {
    readonly temperature_K: number;
    readonly k: number;
    readonly fitted: number | null;
    /** ln(k/fitted) */
    readonly residual: number | null;
    readonly leverage: number | null;
    readonly leftOut: string | null;
  }[];
}

export interface AccumulationFindings {
  readonly maximumFraction: number;
  readonly at_s: number;
  readonly curve: readonly {
    readonly time_s: number;
    readonly fed: number;
    readonly reacted: number;
    readonly accumulated: number;
    readonly mtsr_K: number;
  }[];
  /** from a calorimetric run, where one was given */
  readonly measured: {
    readonly temperature_K: number;
    readonly maximumFraction: number;
    readonly at_s: number;
    readonly mtsr_K: number;
    readonly curve: readonly {
      readonly time_s: number;
      readonly fed: number;
      readonly reacted: number;
      readonly accumulated: number;
      readonly mtsr_K: number;
    }[];
  } | null;
  /** which of the two gives the MTSR that is used */
  readonly usedFor: "kinetics" | "measured";
}

export interface TmradFindings {
  readonly atProcess_s: number | null;
  readonly atMtsr_s: number | null;
  readonly zeroOrderAtProcess_s: number | null;
  /** whether the closed form is on the careful side here */
  readonly zeroOrderCautious: boolean | null;
  readonly likelihood: "low" | "medium" | "high" | null;
  readonly curve: readonly {
    readonly temperature_K: number;
    readonly time_s: number | null;
    readonly zeroOrder_s: number | null;
  }[];
}

export interface CoolingFindings {
  readonly duty_W: number;
  readonly capacity_W: number;
  /** duty over capacity; null where the capacity is not positive */
  readonly use: number | null;
  readonly stabilityRatio: number;
  readonly noReturn_K: number | null;
  readonly tangency_K: number | null;
  readonly criticalCoolant_K: number | null;
  /** heat released and heat removed at full cooling against temperature */
  readonly curve: readonly {
    readonly temperature_K: number;
    readonly release_W: number;
    readonly removal_W: number;
  }[];
}

/** completion, cooling, stability, mtsr-mtt, mtsr-tmr, hold, and what is added to server/window/criteria */
export type CriterionKey = string;
export type Spans = readonly (readonly [number, number])[];

export interface WindowFindings {
  readonly lower_K: number | null;
  readonly upper_K: number | null;
  /** a criterion, or the study's own "lowest" / "highest" */
  readonly lowerSetBy: CriterionKey | null;
  readonly upperSetBy: CriterionKey | null;
  readonly incomplete: boolean;
  readonly containsProcess: boolean;
  readonly controlBand_K: number;
  readonly lowest_K: number;
  readonly highest_K: number;
  /** all parts of the intersection; the window is one of them */
  readonly allowed: Spans;
  /** why nothing is left, in words; null where something is */
  readonly conflict: string | null;
  /** null without draws; its ends are null where nothing is left */
  readonly cautious: { readonly lower_K: number | null; readonly upper_K: number | null } | null;
  readonly criteria: readonly {
    readonly key: CriterionKey;
    /** its lane's name in plain words */
    readonly label: string;
    readonly binding: boolean;
    readonly assessed: boolean;
    readonly allowed: Spans;
    readonly cautious: Spans | null;
    readonly metAtProcess: boolean | null;
    /** that it holds at the planned temperature and its band */
    readonly probability: number | null;
  }[];
  /** what a slower or faster feed does to the window; null for batch cases */
  readonly feedLever:
    | readonly {
        readonly durationFactor: number;
        readonly duration_s: number;
        readonly lower_K: number | null;
        readonly upper_K: number | null;
      }[]
    | null;
}

export interface FailureFindings {
  readonly name: string;
  readonly startedAt_s: number;
  readonly peak_K: number;
  readonly peakAt_s: number;
  readonly timeToMtt_s: number | null;
  readonly timeToTd24_s: number | null;
  readonly maximumRate_K_s: number;
  readonly timeToMaximumRate_s: number;
  readonly conversion: number;
  readonly decomposed: number | null;
  readonly beyondModel: boolean;
  readonly mixingAssumed: "mixed" | "unmixed" | null;
  readonly verdict: "holds" | "act" | "lost";
  /** 0 for lost, null for holds */
  readonly timeToAct_s: number | null;
  readonly margin_s: number | null;
  readonly alarm_K: number | null;
  /** what stopping the feed alone would do; null where the failure holds or no feed runs on */
  readonly stopFeedOnly?: { readonly suffices: boolean; readonly timeToAct_s: number | null } | null;
  /** the same failure started at other moments of the feed; null for a batch */
  readonly vulnerable?:
    | readonly {
        readonly startedAt_s: number;
        readonly timeToAct_s: number | null;
        readonly verdict: "holds" | "act" | "lost";
      }[]
    | null;
  /** what draws say about it; null without draws */
  readonly drawn?: DrawnFailureFindings | null;
  readonly trace: readonly {
    readonly time_s: number;
    readonly temperature_K: number;
    readonly jacket_K: number;
  }[];
}

/** The time to act over draws. A failure that holds counts as an infinite time, one that is lost as 0. */
export interface DrawnFailureFindings {
  readonly draws: number;
  /** null: so many draws hold that this percentile is one of them */
  readonly p05_s: number | null;
  readonly p50_s: number | null;
  readonly p95_s: number | null;
  /** that the time to act exceeds the response; null where none is stated */
  readonly probabilityMarginPositive: number | null;
  /** parts of the draws; they add up to 1 */
  readonly probability: { readonly holds: number; readonly act: number; readonly lost: number };
  /** whether the median tells what the estimates tell, to a tenth or a minute */
  readonly estimateAgrees: boolean;
}

export interface Percentiles {
  readonly p05: number | null;
  readonly p50: number | null;
  readonly p95: number | null;
}

export interface UncertaintyFindings {
  readonly draws: number;
  readonly seed: number;
  readonly td24_K: Percentiles | null;
  readonly mtsr_K: Percentiles | null;
  /** the window's upper end; a percentile is null where nothing is left of the window */
  readonly upper_K: Percentiles | null;
  readonly timeToMaximumRateAtProcess_s: Percentiles | null;
  readonly timeToMaximumRateAtMtsr_s: Percentiles | null;
  /** cooling duty over capacity at the planned temperature */
  readonly coolingUse: Percentiles | null;
  readonly timeToAct_s: Percentiles | null;
  /** null without draws */
  readonly drivers: readonly DriverFindings[] | null;
  readonly nextMeasurement: NextMeasurements | null;
}

export type CautionLevel = "stop" | "warn" | "note";

export interface Caution {
  readonly code: string;
  readonly level: CautionLevel;
  readonly text: string;
  /** JSON pointer into the case document; "" for the case as a whole */
  readonly about: string;
}
