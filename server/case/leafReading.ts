import type { Estimate } from "../numeric/estimate.js";
import { hasLoneSurrogate } from "./canonical.js";
import { type Dimension, dimensions } from "./dimensions.js";
import { cameAs, nearestKey, shortened } from "./faults.js";
import { readQuantity } from "./quantities.js";

/** How well a quantity is known, in one word. */
export const bases = {
  measured: "measured",
  estimated: "estimated",
  assumed: "assumed",
} as const;
export type Basis = keyof typeof bases;

/** A quantity as typed. */
export type TypedQuantity =
  | string
  | {
      value: string;
      standardError?: string | undefined;
      source?: string | undefined;
      basis?: Basis | undefined;
    };

/** A number without dimension as typed. */
export type TypedNumber =
  | number
  | {
      value: number;
      standardError?: number | undefined;
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

/** Says what is wrong with a part of a leaf; the path is relative to the leaf. */
export type Report = (message: string, ...path: string[]) => void;

const longestText = 2000;

/** What a quantity may not be. */
export type Sign = "positive" | "notNegative" | "exothermic" | "any";

/** The dimension of a standard error: that of its quantity, as a difference. */
export function errorDimension(dimension: Dimension): Dimension {
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
  return { value, standardError: typeof standardError === "string" ? standardError : null };
}

const quantityKeys = ["value", "standardError", "source", "basis"];

/** Checks source, basis and the keys of a quantity's object. */
function readNotes(typed: Readonly<Record<string, unknown>>, report: Report): boolean {
  let sound = true;
  const wrong = (message: string, key: string) => {
    report(message, key);
    sound = false;
  };
  for (const key of Object.keys(typed)) {
    if (!quantityKeys.includes(key)) wrong(unknownKey(key, quantityKeys), key);
  }
  if (typed.source !== undefined) {
    readText(typed.source, "text", (message) => wrong(message, "source"));
  }
  if (typed.basis !== undefined && !isWord(typed.basis, bases)) {
    wrong(`${cameAs(typed.basis)}; expected ${oneOf(Object.keys(bases))}`, "basis");
  }
  return sound;
}

/** The fault of a key that nothing reads. */
export function unknownKey(key: string, known: readonly string[]): string {
  const near = nearestKey(key, known);
  return `${shortened(key)} is not a known key here${
    near === null ? `; known are ${known.join(", ")}` : `; did you mean "${near}"?`
  }`;
}

/** Whether a value is an object with keys, not a list. */
export function isGroup(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

export function readText(typed: unknown, wanted: string, report: (message: string) => void): string | null {
  if (typeof typed !== "string") report(`${cameAs(typed)}; expected ${wanted}`);
  else if (typed.trim() === "") report(`is empty; expected ${wanted}, or leave the key out`);
  else if (typed.length > longestText) {
    report(`is ${typed.length} characters long; at most ${longestText} are kept`);
  } else if (hasLoneSurrogate(typed)) report("holds half of a surrogate pair, which is not text");
  else return typed;
  return null;
}

export function isWord<Choices extends object>(
  typed: unknown,
  choices: Choices,
): typed is Extract<keyof Choices, string> {
  return typeof typed === "string" && Object.hasOwn(choices, typed);
}

/** `"a", "b" or "c"` */
export function oneOf(words: readonly string[]): string {
  const quoted = words.map((word) => `"${word}"`);
  const last = quoted.pop() ?? "";
  return quoted.length === 0 ? last : `${quoted.join(", ")} or ${last}`;
}

export function meant(typed: unknown, words: readonly string[]): string {
  const near = typeof typed === "string" ? nearestKey(typed, words) : null;
  return near === null ? "" : `: did you mean "${near}"?`;
}

/** Which numbers a plain number may be. */
export interface Range {
  readonly above?: number;
  readonly atLeast?: number;
  readonly below?: number;
  readonly atMost?: number;
  readonly whole?: true;
}

export function readNumber(typed: unknown, range: Range, report: (message: string) => void): number | null {
  if (typeof typed === "number" && Number.isFinite(typed) && within(typed, range)) return typed;
  const comma = typeof typed === "string" && /^\s*-?\d+,\d+\s*$/.test(typed) ? ": write a decimal point" : "";
  report(`${cameAs(typed)}; expected ${rangeWords(range)}${comma}`);
  return null;
}

function within(value: number, range: Range): boolean {
  return (
    (range.above === undefined || value > range.above) &&
    (range.atLeast === undefined || value >= range.atLeast) &&
    (range.below === undefined || value < range.below) &&
    (range.atMost === undefined || value <= range.atMost) &&
    (range.whole === undefined || Number.isInteger(value))
  );
}

function rangeWords(range: Range): string {
  const limits = [
    range.above === undefined ? "" : `above ${range.above}`,
    range.atLeast === undefined ? "" : `not below ${range.atLeast}`,
    range.below === undefined ? "" : `below ${range.below}`,
    range.atMost === undefined ? "" : `not above ${range.atMost}`,
  ].filter((limit) => limit !== "");
  const number = range.whole === undefined ? "a number" : "a whole number";
  return limits.length === 0 ? number : `${number} ${limits.join(" and ")}`;
}

/** Reads a number that may carry a standard error. */
export function readEstimatedNumber(typed: unknown, range: Range, report: Report): Estimate | null {
  if (!isGroup(typed)) {
    const value = readNumber(typed, range, report);
    return value === null ? null : { value, standardError: null };
  }
  const sound = readNotes(typed, report);
  const value = readNumber(typed.value, range, (message) => report(message, "value"));
  if (typed.standardError === undefined) {
    return sound && value !== null ? { value, standardError: null } : null;
  }
  const standardError = readNumber(typed.standardError, { atLeast: 0 }, (message) =>
    report(message, "standardError"),
  );
  return sound && value !== null && standardError !== null ? { value, standardError } : null;
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
