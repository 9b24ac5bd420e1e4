import { type Dimension, describe, sameDimension } from "./dimensions.js";
import { type UnitFactor, unitFactor } from "./units.js";

/** Units that people write with the wrong case, or run together. */
const usual =
  "kg g mg t lb mol mmol kmol L mL m cm mm s min h d J kJ MJ cal kcal W kW MW K degC degF bar mbar Pa kPa MPa atm M mM".split(
    " ",
  );

/**
 * What would do in the place of a unit that is none, or of the wrong dimension: the same with its
 * denominator in parentheses, its units apart, or its letters in the right case.
 *
 * @returns a unit of the dimension, or null
 */
export function repairedUnit(unit: string, dimension: Dimension): string | null {
  const apart = unit.replace(/[A-Za-z]+\d*[A-Za-z]\w*/g, (name) => unitsApart(name) ?? name);
  const candidates = [parenthesised(unit), apart, parenthesised(apart)];
  return candidates.find((candidate) => candidate !== unit && fits(candidate, dimension)) ?? null;
}

function fits(unit: string, dimension: Dimension): boolean {
  const factor = unitFactor(unit);
  return typeof factor !== "string" && sameDimension(factor.powers, dimension.powers);
}

/** `kgK` as `kg K`, `m2K` as `m2 K`, `KJ` as `kJ`; null for a unit as it is, and where nothing is near. */
function unitsApart(name: string): string | null {
  if (typeof unitFactor(name) !== "string") return null;
  const same = usual.find((each) => each.toLowerCase() === name.toLowerCase());
  if (same !== undefined) return same;
  for (let i = 1; i < name.length; i++) {
    const [first, second] = [name.slice(0, i), name.slice(i)];
    const known = (part: string) => usual.includes(part.replace(/[23]$/, ""));
    if (known(first) && known(second)) return `${first} ${second}`;
  }
  return null;
}

/** `W/m^2 K` as `W/(m^2 K)`: everything behind the first division as its denominator. */
function parenthesised(unit: string): string {
  const at = unit.indexOf("/");
  if (at < 0 || unit.includes("(") || unit.indexOf("/", at + 1) >= 0) return unit;
  const below = unit
    .slice(at + 1)
    .replaceAll("*", " ")
    .trim();
  return `${unit.slice(0, at)}/(${below})`;
}

/** The fault of a unit that is known, but of another dimension: both are named. */
export function wrongDimension(unit: string, factor: UnitFactor, dimension: Dimension): string {
  const came = `is ${describe(factor.powers)}; expected ${dimension.words} in ${dimension.unit}`;
  const repaired = repairedUnit(unit, dimension);
  if (repaired !== null) return `${came}. A division takes only the next unit along: write "${repaired}"`;
  if (dimension.powers.temperature === 1 && /^[CF]$/.test(unit)) {
    return `${came}. ${unit} is the ${unit === "C" ? "coulomb" : "farad"}: write deg${unit}, such as "${dimension.example}"`;
  }
  if (unit === "m" && dimension.powers.time === 1) return `${came}. m is the metre; the minute is min`;
  return `${came}, such as "${dimension.example}"`;
}

/** Units that mean different things to different people, with what to write instead. */
export function ambiguous(unit: string): string | null {
  const name = /\b(tons?|mt)\b/.exec(unit)?.[1];
  if (name === undefined) return null;
  return name === "mt"
    ? "mt would be a thousandth of a tonne: write t for 1000 kg"
    : `a ${name} is 1000 kg to some and 907 kg to others: write t for 1000 kg, or lb`;
}
