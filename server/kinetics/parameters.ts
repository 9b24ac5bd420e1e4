import type { Estimate } from "../numeric/estimate.js";

/**
 * Parameters of a rate constant as they were fitted and typed, in SI.
 * `order` is the overall order n of the rate law; k has the unit (m^3/mol)^(n-1)/s.
 */
export type RateConstant = EyringParameters | ArrheniusParameters | ReferenceParameters | TableParameters;

/** What only a decomposition may state instead of a rate constant. */
export type DecompositionRate = RateConstant | HeatRateParameters | Td24Parameters;

interface FittedPair {
  readonly order: number;
  /** Correlation of the two fitted parameters, -1 < rho < 1. */
  readonly correlation: number | null;
  /** Lowest and highest temperature of the fit, K. */
  readonly fittedRange: readonly [number, number] | null;
  /** Number of rate constants behind the fit. */
  readonly points: number | null;
  /** Viscosity of the medium, Pa s; water's is used where none is given. */
  readonly viscosity: number | null;
}

export interface EyringParameters extends FittedPair {
  readonly form: "eyring";
  /** J/mol */
  readonly activationEnthalpy: Estimate;
  /** J/(mol K), for `standardConcentration` */
  readonly activationEntropy: Estimate;
  /** mol/m^3 */
  readonly standardConcentration: number;
  readonly transmissionCoefficient: number;
}

export interface ArrheniusParameters extends FittedPair {
  readonly form: "arrhenius";
  /** ln of A in (m^3/mol)^(n-1)/s; its standard error is that of ln A */
  readonly lnPreExponential: Estimate;
  /** J/mol */
  readonly activationEnergy: Estimate;
}

export interface ReferenceParameters {
  readonly form: "reference";
  readonly order: number;
  /** k at `at`, (m^3/mol)^(n-1)/s */
  readonly rateConstant: Estimate;
  /** K */
  readonly at: Estimate;
  /** J/mol */
  readonly activationEnergy: Estimate;
  readonly fittedRange: readonly [number, number] | null;
}

export interface TableRow {
  /** K */
  readonly temperature: number;
  /** ln of k in (m^3/mol)^(n-1)/s */
  readonly lnRateConstant: number;
  /** standard error of k over k */
  readonly relativeError: number | null;
  /** reason why the row takes no part in the fit */
  readonly leftOut: string | null;
}

export interface TableParameters {
  readonly form: "table";
  readonly order: number;
  readonly rows: readonly TableRow[];
  readonly fitAs: "eyring" | "arrhenius";
  readonly viscosity: number | null;
}

export interface HeatRateParameters {
  readonly form: "heatRate";
  /** W/kg at `at`: initial rate of an order law, largest isothermal rate of an autocatalytic one */
  readonly heatReleaseRate: Estimate;
  /** K */
  readonly at: Estimate;
  /** J/mol */
  readonly activationEnergy: Estimate;
}

export interface Td24Parameters {
  readonly form: "td24";
  /** temperature from which TMRad is 24 h, K */
  readonly temperature: Estimate;
  /** J/mol */
  readonly activationEnergy: Estimate;
}
