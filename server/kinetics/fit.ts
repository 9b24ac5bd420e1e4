import { gasConstant } from "../numeric/constants.js";
import { quadraticTermP } from "../numeric/curvature.js";
import { fitLine, type Line, meanResponse } from "../numeric/leastSquares.js";
import type { TableParameters } from "./parameters.js";
import { fromArrhenius, fromEyring, type ModifiedArrhenius } from "./rateConstant.js";

/** Standard concentration of the activation entropy that a table gives: 1 mol/L in mol/m^3. */
const standardConcentration = 1000;

/** A table of rate constants fitted in both forms, as plain data in SI. */
export interface TableFit {
  /** the form that is used; the other stands beside it */
  readonly fitAs: "eyring" | "arrhenius";
  readonly order: number;
  readonly eyring: FormFit & {
    /** J/mol */
    readonly activationEnthalpy: number;
    readonly activationEnthalpyError: number;
    /** J/(mol K), for 1 mol/L */
    readonly activationEntropy: number;
    readonly activationEntropyError: number;
    readonly standardConcentration: number;
    readonly transmissionCoefficient: number;
  };
  readonly arrhenius: FormFit & {
    /** ln of A in (m^3/mol)^(n-1)/s */
    readonly lnPreExponential: number;
    readonly lnPreExponentialError: number;
    /** J/mol */
    readonly activationEnergy: number;
    readonly activationEnergyError: number;
  };
  /** all rows, in the order of the table */
  readonly rows: readonly FittedRow[];
  /** lowest and highest temperature of the rows that take part, K */
  readonly fittedRange: readonly [number, number];
  /** number of rows that take part */
  readonly points: number;
  readonly degreesOfFreedom: number;
  /** whether the rows weigh by their own errors: only where every one that takes part has one */
  readonly weighted: boolean;
  /** whether some rows have errors that went unused because others have none */
  readonly errorsUnused: boolean;
}

/** What both forms have. */
interface FormFit {
  readonly rate: ModifiedArrhenius;
  /** line of ln(k/T) or ln k on 1/T */
  readonly line: Line;
  /** of dS and dH, or of ln A and Ea */
  readonly correlation: number;
  /** scatter of ln k about the line, of a row of mean weight */
  readonly residualStandardDeviation: number;
  /** chance of such a bend in data on one straight line; null with fewer than four rows */
  readonly curvatureP: number | null;
}

/** A row of the table beside what the form in use makes of it. */
interface FittedRow {
  /** K */
  readonly temperature: number;
  readonly lnRateConstant: number;
  readonly lnFitted: number;
  /** ln(k/fitted) */
  readonly residual: number;
  /** null for a row that takes no part */
  readonly leverage: number | null;
  readonly leftOut: string | null;
}

/**
 * Fits a table of rate constants by linear least squares of ln(k/T) (Eyring) and of ln k (Arrhenius) on 1/T.
 *
 * ln(k/T) = ln(kappa kB/h c0^(1-n)) + dS/R - dH/(R T) with kappa = 1 and c0 = 1 mol/L; ln k = ln A - Ea/(R T).
 * Rows count with equal relative weights, or by 1/s^2 where each of them has a relative error s; what scatters
 * beyond such errors widens the result. Rows left out are reported and do not count.
 *
 * @param table temperatures in K, k in (m^3/mol)^(n-1)/s
 * @returns both fits, with standard errors of their parameters
 * @throws RangeError where the rows that take part have fewer than three different temperatures
 * @see Eyring 1935, J. Chem. Phys. 3:107; Lente, Fabian & Poe 2005, New J. Chem. (what a fit of the
 * Eyring equation can tell)
 */
export function fitTable(table: TableParameters): TableFit {
  const used = table.rows.filter((row) => row.leftOut === null);
  const temperatures = used.map((row) => row.temperature);
  if (new Set(temperatures).size < 3) {
    throw new RangeError("A fit needs rate constants at three or more different temperatures");
  }
  const stated = used.filter((row) => row.relativeError !== null && row.relativeError > 0);
  const weighted = stated.length === used.length;
  const errors = weighted ? used.map((row) => row.relativeError ?? 1) : undefined;
  const inverse = temperatures.map((each) => 1 / each);
  const lnK = used.map((row) => row.lnRateConstant);
  const lnKOverT = used.map((row) => row.lnRateConstant - Math.log(row.temperature));

  const eyringLine = fitLine(inverse, lnKOverT, errors);
  const entropyFree = fromEyring(0, 0, standardConcentration, 1, table.order).lnPreExponential;
  const activationEnthalpy = -gasConstant * eyringLine.slope;
  const activationEntropy = gasConstant * (eyringLine.intercept - entropyFree);
  const arrheniusLine = fitLine(inverse, lnK, errors);
  const activationEnergy = -gasConstant * arrheniusLine.slope;

  const fit = {
    fitAs: table.fitAs,
    order: table.order,
    eyring: {
      ...formFit(eyringLine, quadraticTermP(inverse, lnKOverT, errors)),
      rate: fromEyring(activationEnthalpy, activationEntropy, standardConcentration, 1, table.order),
      activationEnthalpy,
      activationEnthalpyError: gasConstant * eyringLine.slopeError,
      activationEntropy,
      activationEntropyError: gasConstant * eyringLine.interceptError,
      standardConcentration,
      transmissionCoefficient: 1,
    },
    arrhenius: {
      ...formFit(arrheniusLine, quadraticTermP(inverse, lnK, errors)),
      rate: fromArrhenius(arrheniusLine.intercept, activationEnergy),
      lnPreExponential: arrheniusLine.intercept,
      lnPreExponentialError: arrheniusLine.interceptError,
      activationEnergy,
      activationEnergyError: gasConstant * arrheniusLine.slopeError,
    },
    fittedRange: [Math.min(...temperatures), Math.max(...temperatures)] as const,
    points: used.length,
    degreesOfFreedom: used.length - 2,
    weighted,
    errorsUnused: !weighted && stated.length > 0,
  };
  let place = 0;
  const leverages = fit[table.fitAs].line.leverages;
  const rows = table.rows.map(({ temperature, lnRateConstant, leftOut }): FittedRow => {
    const lnFitted = meanLnRateConstant(fit, temperature).lnRateConstant;
    const leverage = leftOut === null ? leverages[place++] : null;
    return { temperature, lnRateConstant, lnFitted, residual: lnRateConstant - lnFitted, leverage, leftOut };
  });
  return { ...fit, rows };
}

function formFit(line: Line, curvatureP: number | null) {
  // The slope is minus the energy, so the correlation changes its sign.
  const correlation = -line.correlation;
  return { line, correlation, residualStandardDeviation: line.residualStandardDeviation, curvatureP };
}

/**
 * ln k on a fitted line and the standard error of this mean response.
 *
 * The 95 % interval of k is exp(lnRateConstant +- t standardError), Student's t with the fit's degrees of
 * freedom. It tells what the rows leave open as long as one rate law holds; it knows nothing of a change of
 * mechanism outside them.
 *
 * @param fit of a table
 * @param temperature K
 * @param form the one that the table is fitted as, unless said
 * @see Draper & Smith, Applied Regression Analysis, section 1.4
 */
export function meanLnRateConstant(
  fit: Pick<TableFit, "fitAs" | "eyring" | "arrhenius">,
  temperature: number,
  form: "eyring" | "arrhenius" = fit.fitAs,
): { readonly lnRateConstant: number; readonly standardError: number } {
  const { value, standardError } = meanResponse(fit[form].line, 1 / temperature);
  return { lnRateConstant: form === "eyring" ? value + Math.log(temperature) : value, standardError };
}
