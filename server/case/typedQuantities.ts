import type { Estimate } from "../numeric/estimate.js";
import { type Dimension, dimensions } from "./dimensions.js";
import { cameAs, shortened } from "./faults.js";
import { readQuantity } from "./quantities.js";
import { type Basis, isGroup, type Report, readNotes, readText, unknownKey } from "./typedParts.js";

/** A quantity as typed. */
export type TypedQuantity =
  | string
  | {
      value: string;
      standardError?: string | undefined;
      source?: string | undefined;
      basis?: Basis | undefined;
    };

/** A limit as typed: a quantity, or one with its basis told in any words. */
export type TypedLimit =
  | string
  | {
      value: TypedQuantity;
      standardError?: string | undefined;
      source?: string | undefined;
      basis?: string | undefined;
    };

/** A limit, and on what it rests. */
export interface Limit extends Estimate {
  readonly basis: string | null;
}

/** A rate constant as typed; its figure waits for the order of its rate law. */
export interface TypedRate {
  readonly value: string;
  readonly standardError: string | null;
}

/** What a quantity may not be. */
export type Sign = "positive" | "notNegative" | "exothermic" | "any";

/** The dimension of a standard error: that of its quantity, as a difference. */
function errorDimension(dimension: Dimension): Dimension {
  return dimension.absolute === true ? dimensions.temperatureDifference : dimension;
}

/** Reads a quantity in either of its shapes; null where something was reported. */
export function readEstimate(
  typed: unknown,
  dimension: Dimension,
  sign: Sign,
  report: Report,
): Estimate | null {
  const parts = readParts(typed, `${dimension.words}, such as "${dimension.example}"`, report);
  if (parts === null) return null;
  const valuePath = typeof typed === "string" ? [] : ["value"];
  const value = readFigure(parts.value, dimension, sign, (message) => report(message, ...valuePath));
  if (parts.standardError === null) return value === null ? null : { value, standardError: null };
  const standardError = readFigure(parts.standardError, errorDimension(dimension), "notNegative", (message) =>
    report(message, "standardError"),
  );
  return value === null || standardError === null ? null : { value, standardError };
}

function readFigure(
  typed: string,
  dimension: Dimension,
  sign: Sign,
  report: (message: string) => void,
): number | null {
  const reading = readQuantity(typed, dimension);
  if (!reading.ok) {
    report(reading.message);
    return null;
  }
  const { value } = reading.measured;
  const wrong = Number.isFinite(value)
    ? wrongSign(value, sign, dimension)
    : "is not finite in the SI: too large to calculate with";
  if (wrong === null) return value;
  report(`${shortened(typed)} ${wrong}`);
  return null;
}

/** What is wrong with the sign of a value, or null. */
function wrongSign(value: number, sign: Sign, dimension: Dimension): string | null {
  if (sign === "positive" && !(value > 0)) {
    return `is not above zero; expected ${dimension.words} above zero, such as "${dimension.example}"`;
  }
  if (sign === "notNegative" && value < 0)
    return `is below zero; expected ${dimension.words} of zero or more`;
  if (sign === "exothermic" && !(value < 0)) {
    return value === 0
      ? 'gives no heat; expected a negative heat of reaction, such as "-85 kJ/mol"'
      : `is endothermic, which is out of scope here; an exothermic heat of reaction is negative, such as "-85 kJ/mol"`;
  }
  return null;
}

/** The texts of a quantity, its shape checked; the figures are not read yet. */
export function readParts(typed: unknown, wanted: string, report: Report): TypedRate | null {
  if (typeof typed === "string") return { value: typed, standardError: null };
  if (!isGroup(typed)) {
    report(`${cameAs(typed)}; expected ${wanted}${typeof typed === "number" ? ": text with its unit" : ""}`);
    return null;
  }
  let sound = readNotes(typed, report);
  for (const key of ["value", "standardError"]) {
    const part = typed[key];
    if (typeof part === "string" || (key === "standardError" && part === undefined)) continue;
    report(`${cameAs(part)}; expected text with its unit`, key);
    sound = false;
  }
  const { value, standardError } = typed;
  if (!sound || typeof value !== "string") return null;
  return {
    value,
    standardError: typeof standardError === "string" ? standardError : null,
  };
}

/** Reads a limit: its basis is free text, and its value may be a quantity with an error of its own. */
export function readLimit(typed: unknown, dimension: Dimension, report: Report): Limit | null {
  if (!isGroup(typed)) {
    const bare = readEstimate(typed, dimension, "any", report);
    return bare === null ? null : { ...bare, basis: null };
  }
  const { basis, ...rest } = typed;
  const words = basis === undefined ? "" : readText(basis, "text", (message) => report(message, "basis"));
  const nested = isGroup(rest.value);
  const plain = nested ? Object.keys(rest).filter((key) => key !== "value") : [];
  for (const key of plain) report(`${unknownKey(key, ["value", "basis"])}; value holds a group already`, key);
  if (isGroup(rest.value) && rest.value.basis !== undefined) {
    report("stands inside the value; the basis of a limit stands beside it, in any words", "value", "basis");
    return null;
  }
  const estimate = nested
    ? readEstimate(rest.value, dimension, "any", (message, ...path) => report(message, "value", ...path))
    : readEstimate(rest, dimension, "any", report);
  if (estimate === null || words === null || plain.length > 0) return null;
  return { ...estimate, basis: words === "" ? null : words };
}
