import { createRequire } from "node:module";
import { dirname, join } from "node:path";

/**
 * A unit as a factor to the SI. A value x in it is `(x + offset) * over / under` for an absolute
 * temperature and `x * over / under` for everything else; two factors, so that both are whole
 * numbers, and exact, for most units.
 */
export interface UnitFactor {
  readonly over: number;
  readonly under: number;
  /** ln(over/under), finite even where the factor itself is not */
  readonly ln: number;
  /** zero of the scale below that of the value, in the unit itself: 273.15 for degC */
  readonly offset: number;
  readonly powers: Powers;
}

/** Powers of mass, length, time, temperature and amount of substance, and the rest (current, angle ...) as one list. */
export interface Powers {
  readonly mass: number;
  readonly length: number;
  readonly time: number;
  readonly temperature: number;
  readonly amount: number;
  readonly other: boolean;
}

/** What of the unit parser's result is used here. */
interface ParsedUnit {
  readonly units: readonly {
    readonly unit: {
      readonly name: string;
      readonly value: unknown;
      readonly offset: number;
    };
    readonly prefix: { readonly value: number };
    readonly power: number;
  }[];
  readonly dimensions: readonly number[];
}

interface UnitClass {
  parse(text: string): ParsedUnit;
  createUnitSingle(name: string, definition: { definition: string; prefixes?: "short" }): unknown;
}

/** Stands where the unit file asks for number classes that a plain number never needs; holds the 5/9 of degF. */
class Ratio {
  readonly #value: number;
  constructor(over: unknown, under = 1) {
    this.#value = Number(over) / under;
  }
  valueOf(): number {
    return this.#value;
  }
}

/**
 * mathjs's unit parser, from its one file. The package's own entries load the whole library (0.8 s,
 * 75 MB; its prebuilt bundle 0.15 s, 30 MB) and an expression evaluator with it; this takes 0.03 s and
 * 8 MB, and no evaluator is in the process. The file is not in the package's list of exports: the lock
 * file fixes the version, and a test fails if a newer one moves it.
 */
function loadUnitClass(): UnitClass {
  const require = createRequire(import.meta.url);
  const folder = dirname(require.resolve("mathjs/package.json"));
  const file: {
    createUnitClass(parts: Readonly<Record<string, unknown>>): UnitClass;
  } = require(join(folder, "lib/cjs/type/unit/Unit.js"));
  const units = file.createUnitClass({
    config: { number: "number" },
    addScalar: (a: number, b: number) => a + b,
    subtractScalar: (a: number, b: number) => a - b,
    multiplyScalar: (a: number, b: number) => a * b,
    divideScalar: (a: number, b: number) => a / b,
    pow: (a: number, b: number) => a ** b,
    abs: Math.abs,
    fix: Math.trunc,
    round: Math.round,
    equal: (a: number, b: number) => a === b,
    isNumeric: (value: unknown) => typeof value === "number",
    number: Number,
    format: String,
    Complex: Ratio,
    BigNumber: Ratio,
    Fraction: Ratio,
  });
  units.createUnitSingle("cal", { definition: "4.184 J", prefixes: "short" });
  units.createUnitSingle("M", { definition: "1 mol/L", prefixes: "short" });
  units.createUnitSingle("d", { definition: "86400 s" });
  units.createUnitSingle("P", { definition: "0.1 Pa s", prefixes: "short" });
  return units;
}

const unitClass = loadUnitClass();

/** Known units and refusals by their text; bounded, for the texts come from outside. */
const known = new Map<string, UnitFactor | string>();
const knownAtMost = 2000;

/** Highest power of a unit that is taken seriously. */
const highestPower = 20;

/**
 * The factor of a unit such as `kJ/(mol K)`, `L mol^-1 s^-1` or `1/s`.
 *
 * @param text plain characters only, checked by the caller: letters, digits, space and + - * / ^ ( ) .
 * @returns the factor, or what is wrong with the text in words
 */
export function unitFactor(text: string): UnitFactor | string {
  let found = known.get(text);
  if (found === undefined) {
    found = parseUnit(text);
    if (known.size >= knownAtMost) known.clear();
    known.set(text, found);
  }
  return found;
}

function parseUnit(text: string): UnitFactor | string {
  let parsed: ParsedUnit;
  try {
    parsed = unitClass.parse(text.startsWith("/") ? `1${text}` : text);
  } catch (error) {
    return reasonOf(error, text);
  }
  if (parsed.units.some(({ power }) => !(Math.abs(power) <= highestPower))) {
    return `a power in "${text}" is too large`;
  }
  let over = 1;
  let under = 1;
  let ln = 0;
  for (const { unit, prefix, power } of parsed.units) {
    const size = Number(unit.value) * prefix.value;
    // 0.001 is not exact, 1000 is: a size below one counts on the other side of the division.
    const whole = Math.round(1 / size);
    const inverted = size < 1 && Math.abs(whole * size - 1) < 1e-15;
    const exact = inverted ? whole : size;
    if (power > 0 !== inverted) over *= exact ** Math.abs(power);
    else under *= exact ** Math.abs(power);
    ln += power * Math.log(size);
  }
  const [only] = parsed.units;
  const [mass, length, time, current, temperature, light, amount, angle, bit] = parsed.dimensions;
  return {
    over,
    under,
    ln,
    offset: parsed.units.length === 1 && only.power === 1 ? only.unit.offset / only.prefix.value : 0,
    powers: {
      mass,
      length,
      time,
      temperature,
      amount,
      other: [current, light, angle, bit].some((power) => power !== 0),
    },
  };
}

/** The parser's complaint in our words. */
function reasonOf(error: unknown, text: string): string {
  const message = error instanceof Error ? error.message : "";
  const name = /^Unit "(.*)" not found/.exec(message)?.[1];
  if (name !== undefined) return `"${name}" is not a unit that is known here`;
  const lostCaret = /([A-Za-z])([+-]\d)/.exec(text);
  if (lostCaret !== null) {
    return `a power needs a caret: write "${text.replace(/([A-Za-z])([+-]\d)/g, "$1^$2")}"`;
  }
  if (/Unmatched/.test(message)) return `a parenthesis in "${text}" has no partner`;
  return `"${text}" cannot be read as a unit`;
}
