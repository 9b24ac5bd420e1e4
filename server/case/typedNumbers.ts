import type { Estimate } from "../numeric/estimate.js";
import { cameAs } from "./faults.js";
import { type Basis, isGroup, type Report, readNotes } from "./typedParts.js";

/** A number without dimension as typed. */
export type TypedNumber =
  | number
  | {
      value: number;
      standardError?: number | undefined;
      source?: string | undefined;
      basis?: Basis | undefined;
    };

/** Which numbers a plain number may be. */
export interface Range {
  readonly above?: number;
  readonly atLeast?: number;
  readonly below?: number;
  readonly atMost?: number;
  readonly whole?: true;
}

/** Reads a number within its range. */
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
