import { gasConstant } from "../numeric/constants.js";
import { coverage95 } from "../numeric/studentT.js";
import type { ArrheniusParameters, EyringParameters, ReferenceParameters } from "./parameters.js";

/**
 * Covariance of the two parameters of ln k = ln A + b ln T - E/(R T):
 * variance of ln A, variance of E (J^2/mol^2) and their covariance (J/mol).
 */
export interface PairCovariance {
  readonly intercept: number;
  readonly barrier: number;
  readonly both: number;
}

/** Covariance of a typed pair, and what could not be made out of its errors. */
export interface PairErrors {
  readonly covariance: PairCovariance | null;
  /** "typed" correlation, "rebuilt" from the fitted range, or nothing to be had */
  readonly basis: "typed" | "rebuilt" | "none";
  /** T0 at which a typed correlation puts the least variance, K */
  readonly leastAt: number | null;
  /** whether any standard error was typed at all */
  readonly errorsTyped: boolean;
  /** standard error of ln A that the rebuilt covariance implies over the typed one; null unless both are known */
  readonly interceptRatio: number | null;
}

/**
 * Covariance of a fitted activation pair from its standard errors. With the correlation rho:
 * var ln k = (sS/R)^2 + (sH/(R T))^2 - 2 rho sS sH/(R^2 T). Without rho, but with the fitted range and the
 * number of points N (taken as evenly spaced in T): var ln k = (sH/R)^2 [(1/T - xbar)^2 + Sxx/N].
 *
 * @param parameters as typed, SI
 * @returns covariance, or null where rho is neither typed nor to be rebuilt
 * @see Draper & Smith, Applied Regression Analysis (straight line); derived from it
 */
export function pairErrors(parameters: EyringParameters | ArrheniusParameters): PairErrors {
  const eyring = parameters.form === "eyring";
  const barrierError = eyring
    ? parameters.activationEnthalpy.standardError
    : parameters.activationEnergy.standardError;
  const entropyError = eyring
    ? parameters.activationEntropy.standardError
    : parameters.lnPreExponential.standardError;
  const interceptError = entropyError !== null && eyring ? entropyError / gasConstant : entropyError;
  const errorsTyped = barrierError !== null || interceptError !== null;
  const { correlation, fittedRange, points } = parameters;
  if (correlation !== null && barrierError !== null && interceptError !== null) {
    const product = correlation * interceptError * gasConstant;
    return {
      covariance: {
        intercept: interceptError ** 2,
        barrier: barrierError ** 2,
        both: correlation * interceptError * barrierError,
      },
      basis: "typed",
      leastAt: product > 0 ? barrierError / product : null,
      errorsTyped,
      interceptRatio: null,
    };
  }
  if (barrierError !== null && fittedRange !== null && points !== null && points >= 3) {
    const covariance = rebuiltCovariance(barrierError, fittedRange, points);
    return {
      covariance,
      basis: "rebuilt",
      leastAt: null,
      errorsTyped,
      interceptRatio:
        interceptError !== null && interceptError > 0
          ? Math.sqrt(covariance.intercept) / interceptError
          : null,
    };
  }
  return { covariance: null, basis: "none", leastAt: null, errorsTyped, interceptRatio: null };
}

/** Regression covariance for N temperatures evenly spaced over the fitted range. */
function rebuiltCovariance(
  barrierError: number,
  fittedRange: readonly [number, number],
  points: number,
): PairCovariance {
  const [low, high] = fittedRange;
  const inverse = Array.from({ length: points }, (_, i) => 1 / (low + ((high - low) * i) / (points - 1)));
  const mean = inverse.reduce((sum, x) => sum + x, 0) / points;
  const spread = inverse.reduce((sum, x) => sum + (x - mean) ** 2, 0);
  const slope = barrierError / gasConstant;
  return {
    intercept: slope ** 2 * (mean ** 2 + spread / points),
    barrier: barrierError ** 2,
    both: slope * mean * barrierError,
  };
}

/**
 * Variance of ln k of a fitted pair, var ln A + var E/(R T)^2 - 2 cov/(R T).
 *
 * @param covariance of ln A and E
 * @param temperature K
 * @returns dimensionless, >= 0
 */
export function lnVariance(covariance: PairCovariance, temperature: number): number {
  const inverse = 1 / (gasConstant * temperature);
  return Math.max(
    0,
    covariance.intercept + covariance.barrier * inverse * inverse - 2 * covariance.both * inverse,
  );
}

/**
 * Variance of ln k of a rate constant given at one temperature,
 * (sk/k)^2 + (sE/R)^2 (1/T - 1/Tref)^2. An error that was not given counts as none.
 *
 * @param parameters SI
 * @param temperature K
 * @returns dimensionless, or null where neither carries an error
 */
export function referenceVariance(parameters: ReferenceParameters, temperature: number): number | null {
  const { rateConstant, activationEnergy, at } = parameters;
  if (rateConstant.standardError === null && activationEnergy.standardError === null) return null;
  const relative = (rateConstant.standardError ?? 0) / rateConstant.value;
  const slope = (activationEnergy.standardError ?? 0) / gasConstant;
  return relative ** 2 + slope ** 2 * (1 / temperature - 1 / at.value) ** 2;
}

/**
 * Factor of the 95 % interval of ln k: Student's t with N - 2 degrees of freedom, or 1.960 where the number
 * of points is not known.
 *
 * @param points N, or null
 */
export function confidenceFactor(points: number | null): number {
  return coverage95(points !== null && points > 2 ? points - 2 : null);
}
