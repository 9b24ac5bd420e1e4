import { plainNumberText, superscript, temperatureText } from "../words/numbers.js";
import type { Caution } from "./findings.js";

/** A number of a working, in the SI and as it is read. */
export interface WorkingValue {
  readonly label: string;
  /** null for a word, such as the kind of bottom */
  readonly value: number | null;
  /** SI, such as "m^2"; "" for a word or a plain number */
  readonly unit: string;
  readonly text: string;
}

/** One step of a working. */
export interface WorkingStep extends WorkingValue {
  readonly equation: string;
}

/** What keeps a working from a result. */
export interface WorkingFault {
  /** JSON pointer into the case document */
  readonly pointer: string;
  readonly message: string;
}

/** How a field of the case was worked out from other figures, so that a second person can follow it. */
export interface Working {
  /** JSON pointer of the field that it fills */
  readonly field: string;
  /** JSON pointer of the group that holds what it was given */
  readonly group: string;
  readonly title: string;
  readonly given: readonly WorkingValue[];
  readonly steps: readonly WorkingStep[];
  /** SI; null where a fault stands against it */
  readonly result: number | null;
  readonly unit: string;
  /** as one would type it into the field, rounded to the careful side: down */
  readonly resultText: string | null;
  /** how the field is known once it holds the result */
  readonly basis: string;
  readonly source: string;
  /** the field agrees with the result within rounding */
  readonly follows: boolean;
  /** the handbook's typical range of the result, SI; a mark of what is plausible, no more */
  readonly typical: readonly [number, number] | null;
  readonly faults: readonly WorkingFault[];
  readonly cautions: readonly Caution[];
  /** equations and tables behind it */
  readonly reference: string;
}

/** Above it, K, a temperature is a slip of the keyboard, and its decimals are no matter. */
const hottest = 1e6;

/**
 * A number as a working shows it: temperatures in degC, everything else in the SI, without noughts at its end.
 */
export function valueText(value: number, unit: string, significant = 4): string {
  if (unit === "K" && value < hottest) return temperatureText(value, "nearest", 2);
  return `${plainNumberText(value, significant)} ${printedUnit(unit)}`.trim();
}

/** "W/(m^2 K)" as W/(m² K). */
export function printedUnit(unit: string): string {
  return unit.replace(/\^(-?\d+)/g, (_whole, power: string) => superscript(Number(power)));
}

/** A given number of a working with its text. */
export function figureOf(label: string, value: number, unit: string): WorkingValue {
  return { label, value, unit, text: valueText(value, unit, 6) };
}

/** A word of a working. */
export function wordOf(label: string, text: string): WorkingValue {
  return { label, value: null, unit: "", text };
}

/** A step of a working with its text. */
export function stepOf(label: string, equation: string, value: number, unit: string): WorkingStep {
  return { label, equation, value, unit, text: valueText(value, unit) };
}

/**
 * A positive number in plain characters, rounded down to a few digits, as one would type it.
 *
 * @param value > 0
 */
export function roundedDown(value: number, significant = 3): string {
  const unit = 10 ** (Math.floor(Math.log10(value)) - significant + 1);
  // Forgives the last bits: 250 must not become 249.
  const whole = Math.floor((value / unit) * (1 + 1e-12));
  return String(Number((whole * unit).toPrecision(significant)));
}

/** A working that cannot be done. */
export function refusedWorking(
  about: Pick<
    Working,
    "field" | "group" | "title" | "given" | "unit" | "basis" | "source" | "typical" | "reference"
  >,
  faults: readonly WorkingFault[],
): Working {
  return { ...about, steps: [], result: null, resultText: null, follows: false, faults, cautions: [] };
}
