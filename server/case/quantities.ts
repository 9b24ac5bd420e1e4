import { type Dimension, sameDimension } from "./dimensions.js";
import { plainCharacters } from "./pasted.js";
import { ambiguous, repairedUnit, wrongDimension } from "./unitAdvice.js";
import { type UnitFactor, unitFactor } from "./units.js";

/** A quantity in the SI. */
export interface Measured {
  /** infinite or 0 where the SI figure is beyond doubles; then only `ln` counts */
  readonly value: number;
  /** ln |value|, from the parts, so that 1e84 1/h keeps every digit; -Infinity for 0 */
  readonly ln: number;
}

/** The SI figure, or what is wrong in words: what came, what was expected, what would do. */
export type Reading = { readonly ok: true; readonly measured: Measured } | Refusal;

interface Refusal {
  readonly ok: false;
  readonly message: string;
}

const longest = 100;
/** Typed temperatures end here, K: a study over more would only be long. */
const hottest = 3000;
const allowed = /^[A-Za-z0-9 .+\-*/^()]*$/;
const leadingNumber =
  /^([+-]? ?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)(?: ?[*xX] ?10 ?\^ ?([+-]?\d+))?(?![\d.^])/;
const powerOfTen = /^([+-]?)10 ?\^ ?([+-]?\d+)/;

/**
 * Reads text such as `2.05 kJ/(kg K)`, `−118 kJ·mol⁻¹` or `35 °C` as a quantity of one dimension.
 *
 * The number is read here, the unit by mathjs's unit parser: nothing is ever evaluated.
 *
 * @param text as typed
 * @param dimension expected; an absolute temperature takes the zero of its scale into account
 */
export function readQuantity(text: string, dimension: Dimension): Reading {
  const split = splitQuantity(text, dimension);
  if (!split.ok) return split;
  const { number, factor } = split;
  if (!sameDimension(factor.powers, dimension.powers)) {
    return refuse(`${quoted(text)} ${wrongDimension(split.unit, factor, dimension)}`);
  }
  if (!Number.isFinite(number)) {
    return refuse(`${quoted(text)} is not finite: the number is too large to calculate with`);
  }
  if (dimension.absolute !== true) return { ok: true, measured: scaled(number, factor) };
  const kelvin = ((number + factor.offset) * factor.over) / factor.under;
  // The sum is exact to rounding only: -273.15 degC must not come out as a hair above zero.
  if (!(kelvin > 1e-9)) {
    return refuse(
      `${quoted(text)} is ${kelvin < -1e-9 ? "below" : "at"} absolute zero; expected ${dimension.words} above 0 K, such as ${dimension.example}`,
    );
  }
  if (kelvin > hottest) {
    return refuse(
      `${quoted(text)} is above ${hottest} K, where no such process runs; expected ${dimension.words}, such as ${dimension.example}`,
    );
  }
  return { ok: true, measured: { value: kelvin, ln: Math.log(kelvin) } };
}

/**
 * The size of a unit on its own, such as the unit of a logarithm's argument.
 *
 * @returns ln of the unit in the SI
 */
export function readUnit(text: string, dimension: Dimension): Reading {
  const split = splitQuantity(`1 ${text}`, dimension);
  if (!split.ok) return split;
  if (split.number !== 1)
    return refuse(`${quoted(text)} holds a number; expected a unit alone, such as "${dimension.unit}"`);
  if (!sameDimension(split.factor.powers, dimension.powers)) {
    return refuse(`${quoted(text)} ${wrongDimension(split.unit, split.factor, dimension)}`);
  }
  return { ok: true, measured: scaled(1, split.factor) };
}

interface Split {
  readonly ok: true;
  readonly number: number;
  readonly unit: string;
  readonly factor: UnitFactor;
}

function splitQuantity(text: string, dimension: Dimension): Split | Refusal {
  const wanted = `expected ${dimension.words}, such as "${dimension.example}"`;
  if (text.trim() === "") return refuse(`nothing was typed; ${wanted}`);
  if (text.length > longest) {
    return refuse(`the text is ${text.length} characters long, at most ${longest} are read; ${wanted}`);
  }
  const plain = plainCharacters(text);
  if (plain.includes(",")) {
    const suggestion = /^[^,]*\d,\d[^,]*$/.test(plain) ? `, such as "${plain.replace(",", ".")}"` : "";
    return refuse(
      `${quoted(text)} has a comma: write a decimal point and no marks between thousands${suggestion}`,
    );
  }
  if (/±|\+ ?\/ ?-/.test(plain)) {
    return refuse(
      `${quoted(text)} holds an error as well: give the value alone, and its error as standardError`,
    );
  }
  const odd = Array.from(plain).find((character) => !allowed.test(character));
  if (odd !== undefined) return refuse(`${quoted(text)} holds ${characterName(odd)}; ${wanted}`);
  const read = readNumber(plain);
  if (read === null) return refuse(`${quoted(text)} does not start with a number; ${wanted}`);
  const unit = read.rest.replace(/^\*/, "").trim();
  if (unit === "") {
    return refuse(`${quoted(text)} has no unit; ${wanted}`);
  }
  if (/^[.+\-\d]/.test(unit) && !/^1 ?\//.test(unit)) return refuse(secondNumber(text, wanted));
  const factor = unitFactor(unit);
  if (typeof factor === "string") {
    if (/[A-Za-z] +[\d.]/.test(unit)) return refuse(secondNumber(text, wanted));
    const repaired = repairedUnit(unit, dimension);
    return refuse(
      `${quoted(text)}: ${factor}${repaired === null ? `; ${wanted}` : `: did you mean "${repaired}"?`}`,
    );
  }
  const doubtful = ambiguous(unit);
  if (doubtful !== null) return refuse(`${quoted(text)}: ${doubtful}`);
  return { ok: true, number: read.number, unit, factor };
}

function secondNumber(text: string, wanted: string): string {
  return `${quoted(text)} holds more than one number: write one number with one unit, such as "200 min" for 3 h 20 min, without marks between thousands; ${wanted}`;
}

function readNumber(plain: string): { number: number; rest: string } | null {
  const bare = powerOfTen.exec(plain);
  if (bare !== null) {
    return {
      number: Number(`${bare[1]}1e${bare[2]}`),
      rest: plain.slice(bare[0].length),
    };
  }
  const match = leadingNumber.exec(plain);
  if (match === null) return null;
  const [whole, mantissa, exponent] = match;
  const digits = mantissa.replace(" ", "");
  const number = exponent === undefined ? Number(digits) : Number(withExponent(digits, exponent));
  return { number, rest: plain.slice(whole.length) };
}

/** `1.2` and `-5` as 1.2e-5; a number that has an exponent already is multiplied. */
function withExponent(digits: string, exponent: string): string | number {
  return /e/i.test(digits) ? Number(digits) * 10 ** Number(exponent) : `${digits}e${exponent}`;
}

function scaled(number: number, factor: UnitFactor): Measured {
  return {
    value: (number * factor.over) / factor.under,
    ln: Math.log(Math.abs(number)) + factor.ln,
  };
}

function refuse(message: string): Refusal {
  return { ok: false, message };
}

function quoted(text: string): string {
  return `"${text.trim()}"`;
}

function characterName(character: string): string {
  const printable = /^[\p{L}\p{N}\p{P}\p{S}]$/u.test(character);
  const code = (character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, "0");
  return printable
    ? `the character "${character}"`
    : `a character (U+${code}) that has no place in a quantity`;
}
