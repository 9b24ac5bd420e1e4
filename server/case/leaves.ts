import { z } from "zod";
import type { Estimate } from "../numeric/estimate.js";
import { type Dimension, dimensions, type Kind } from "./dimensions.js";
import { cameAs } from "./faults.js";
import { type Range, readEstimatedNumber, readNumber, type TypedNumber } from "./typedNumbers.js";
import { isWord, meant, oneOf, type Report, readText } from "./typedParts.js";
import {
  type Limit,
  readEstimate,
  readLimit,
  readParts,
  type Sign,
  type TypedLimit,
  type TypedQuantity,
  type TypedRate,
} from "./typedQuantities.js";
import type { TypicalRange } from "./typicalRanges.js";

/** More about a field than its label. */
interface About {
  readonly hint?: string;
  /** its name where it stands alone, its group included: "heat of reaction" */
  readonly alone?: string;
  /** its name where it stands alone, before that of its group: "lowest fitted temperature" */
  readonly short?: string;
  /** where most values of a quantity lie */
  readonly typical?: TypicalRange;
  /** what a choice that was not made means: "As it was" */
  readonly blank?: string;
}

/** What a form, a sheet or a fault must know about a field that holds one typed thing. */
export type Leaf = About & {
  /** as the form names it: "Heat transfer coefficient" */
  readonly label: string;
} & (
    | { readonly kind: "text" }
    | {
        readonly kind: "choice";
        readonly choices: Readonly<Record<string, string>>;
      }
    /** a number without dimension; `estimated` ones may carry a standard error */
    | { readonly kind: "number"; readonly estimated: boolean }
    /** `freeBasis`: its basis is any text, not one of the three words */
    | {
        readonly kind: "quantity";
        readonly dimension: Dimension;
        readonly freeBasis?: true;
        /** a word that may stand instead of the quantity */
        readonly word?: string;
      }
    /** a quantity whose dimension depends on the order of its rate law */
    | { readonly kind: "rate" }
    /** the unit of a rate constant alone */
    | { readonly kind: "rateUnit" }
  );

/** Every leaf of the schema with what is known about it. */
export const leaves = z.registry<Leaf>();

/**
 * A leaf of the schema: reads what was typed, or reports what is wrong with it.
 *
 * @param read returns null after it has reported
 */
function leafSchema<Typed, Read>(leaf: Leaf, read: (typed: unknown, report: Report) => Read | null) {
  return z
    .custom<Typed>()
    .transform((typed, context): Read => {
      const value = read(typed, (message, ...path) => {
        context.issues.push({ code: "custom", message, path, input: typed });
      });
      return value ?? z.NEVER;
    })
    .register(leaves, leaf);
}

/** Free text of one line or more, at least one character. */
export function text(label: string, about: About = {}) {
  return leafSchema<string, string>({ kind: "text", label, ...about }, (typed, report) =>
    readText(typed, "text", report),
  );
}

/** One of a few words. */
export function choice<const Choices extends Readonly<Record<string, string>>>(
  label: string,
  choices: Choices,
  about: About = {},
) {
  type Word = Extract<keyof Choices, string>;
  return leafSchema<Word, Word>({ kind: "choice", label, choices, ...about }, (typed, report) => {
    const words = Object.keys(choices);
    if (isWord(typed, choices)) return typed;
    report(`${cameAs(typed)}; expected ${oneOf(words)}${meant(typed, words)}`);
    return null;
  });
}

/** A quantity with a dimension: text with its unit, or an object with its error, source and basis. */
export function quantity(
  kind: Kind,
  label: string,
  { sign, ...about }: About & { readonly sign?: Sign } = {},
) {
  const dimension: Dimension = dimensions[kind];
  const bound = sign ?? (dimension.absolute === true ? "any" : "positive");
  return leafSchema<TypedQuantity, Estimate>(
    { kind: "quantity", label, dimension, ...about },
    (typed, report) => readEstimate(typed, dimension, bound, report),
  );
}

/** A number without dimension that is taken as it is. */
export function plain(label: string, range: Range, about: About = {}) {
  return leafSchema<number, number>({ kind: "number", label, estimated: false, ...about }, (typed, report) =>
    readNumber(typed, range, report),
  );
}

/** A number without dimension that may carry a standard error. */
export function estimatedNumber(label: string, range: Range, about: About = {}) {
  return leafSchema<TypedNumber, Estimate>(
    { kind: "number", label, estimated: true, ...about },
    (typed, report) => readEstimatedNumber(typed, range, report),
  );
}

/** A rate constant, or a pre-exponential factor: its unit follows from the order of its rate law. */
export function rate(label: string, about: About = {}) {
  return leafSchema<TypedQuantity, TypedRate>({ kind: "rate", label, ...about }, (typed, report) =>
    readParts(typed, 'a rate constant with its unit, such as "2.4e-5 1/s"', report),
  );
}

/** The unit in which a logarithm of a rate constant was taken. */
export function rateUnit(label: string, about: About = {}) {
  return leafSchema<string, string>({ kind: "rateUnit", label, ...about }, (typed, report) =>
    readText(typed, 'the unit of a rate constant, such as "1/s"', report),
  );
}

/** A limit whose basis is told in any words: "boiling point at 1 atm". */
export function limit(kind: Kind, label: string, about: About = {}) {
  const dimension: Dimension = dimensions[kind];
  return leafSchema<TypedLimit, Limit>(
    { kind: "quantity", label, dimension, freeBasis: true, ...about },
    (typed, report) => readLimit(typed, dimension, report),
  );
}

/** A moment: a time of zero or more, or the one that turns out worst. */
export function timeOrWorst(label: string, about: About = {}) {
  const dimension: Dimension = dimensions.time;
  return leafSchema<TypedQuantity, Estimate | "worst">(
    { kind: "quantity", label, dimension, word: "worst", ...about },
    (typed, report) => {
      if (typed === "worst") return typed;
      return readEstimate(typed, dimension, "notNegative", (message, ...path) =>
        report(`${message}, or "worst"`, ...path),
      );
    },
  );
}
