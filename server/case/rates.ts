import type { Estimate } from "../numeric/estimate.js";
import { type Dimension, rateConstantDimension } from "./dimensions.js";
import { readQuantity, readUnit } from "./quantities.js";
import type { TypedRate } from "./typedQuantities.js";

/** A rate constant in SI, or what is wrong with it. */
export type RateReading =
  | {
      readonly ok: true;
      /** k itself; infinite or 0 where only its logarithm can be held */
      readonly k: Estimate;
      /** ln k, its standard error that of k over k */
      readonly lnK: Estimate;
    }
  | {
      readonly ok: false;
      readonly part: "value" | "standardError";
      readonly message: string;
    };

/**
 * Reads a rate constant or a pre-exponential factor.
 *
 * @param order overall order of its rate law
 */
export function readRate(typed: TypedRate, order: number): RateReading {
  const dimension = rateConstantDimension(order);
  const reading = readQuantity(typed.value, dimension);
  if (!reading.ok) return { ok: false, part: "value", message: reading.message };
  const { value, ln } = reading.measured;
  if (!(value > 0)) {
    return {
      ok: false,
      part: "value",
      message: `"${typed.value.trim()}" is not above zero; expected ${dimension.words} above zero, such as "${dimension.example}"`,
    };
  }
  if (typed.standardError === null) {
    return {
      ok: true,
      k: { value, standardError: null },
      lnK: { value: ln, standardError: null },
    };
  }
  return withError(value, ln, typed.standardError, dimension);
}

function withError(value: number, ln: number, typed: string, dimension: Dimension): RateReading {
  const reading = readQuantity(typed, dimension);
  if (!reading.ok) return { ok: false, part: "standardError", message: reading.message };
  const error = reading.measured;
  if (error.value < 0) {
    return {
      ok: false,
      part: "standardError",
      message: `"${typed.trim()}" is below zero; expected a standard error of zero or more`,
    };
  }
  return {
    ok: true,
    k: { value, standardError: error.value },
    lnK: {
      value: ln,
      standardError: error.value === 0 ? 0 : Math.exp(error.ln - ln),
    },
  };
}

/**
 * Reads the unit in which the logarithm of a rate constant was taken.
 *
 * @returns ln of the unit in SI, or what is wrong with it
 */
export function readRateUnit(text: string, order: number): number | string {
  const reading = readUnit(text, rateConstantDimension(order));
  return reading.ok ? reading.measured.ln : reading.message;
}
