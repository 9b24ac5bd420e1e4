import { format } from "d3-format";
import { zeroCelsius } from "../numeric/constants.js";

/** Which way a shown figure may err: times and upper ends down, temperatures reached and lower ends up. */
export type Rounding = "down" | "up" | "nearest";

const steps = { down: Math.floor, up: Math.ceil, nearest: Math.round } as const;

/** Rounds to a whole number of `unit` in the given direction, forgiving the last bits of a binary fraction. */
function roundTo(value: number, unit: number, rounding: Rounding): number {
  const scaled = value / unit;
  const whole = Math.round(scaled);
  return Math.abs(scaled - whole) < 1e-9 * Math.max(1, Math.abs(scaled))
    ? whole * unit
    : steps[rounding](scaled) * unit;
}

/** Decimal text with a true minus sign. */
function fixed(value: number, decimals: number): string {
  return (Object.is(value, -0) ? 0 : value).toFixed(decimals).replace("-", "−");
}

/**
 * A temperature as people read it, degC with one decimal unless said.
 *
 * @param kelvin K
 * @param rounding towards caution; the caller knows which way that is
 */
export function temperatureText(kelvin: number, rounding: Rounding = "nearest", decimals = 1): string {
  return `${temperatureNumber(kelvin, rounding, decimals)} °C`;
}

/** The number of `temperatureText` without its unit, for tables whose heading holds the unit. */
export function temperatureNumber(kelvin: number, rounding: Rounding = "nearest", decimals = 1): string {
  return fixed(roundTo(kelvin - zeroCelsius, 10 ** -decimals, rounding), decimals);
}

/** A temperature difference, K with one decimal unless said. */
export function differenceText(kelvin: number, rounding: Rounding = "nearest", decimals = 1): string {
  return `${fixed(roundTo(kelvin, 10 ** -decimals, rounding), decimals)} K`;
}

const spans: readonly {
  readonly below: number;
  readonly unit: number;
  readonly name: string;
  readonly step: number;
}[] = [
  { below: 120, unit: 1, name: "s", step: 1 },
  { below: 7200, unit: 60, name: "min", step: 0.1 },
  { below: 72 * 3600, unit: 3600, name: "h", step: 0.1 },
  { below: 3 * 365.25 * 86400, unit: 86400, name: "days", step: 1 },
  { below: 100 * 365.25 * 86400, unit: 365.25 * 86400, name: "years", step: 1 },
];

/**
 * A span of time in the unit that people would use for it: s, min, h, days or years.
 *
 * @param seconds s, >= 0
 */
export function durationText(seconds: number, rounding: Rounding = "down"): string {
  const span = spans.find((each) => Math.abs(seconds) < each.below);
  if (span === undefined) return rounding === "up" ? "over 100 years" : "more than 100 years";
  const decimals = span.step < 1 ? 1 : 0;
  return `${fixed(roundTo(seconds / span.unit, span.step, rounding), decimals)} ${span.name}`;
}

/** A part of one as a percentage with a sensible number of digits. */
export function percentText(fraction: number, rounding: Rounding = "nearest"): string {
  const percent = 100 * fraction;
  const step = Math.abs(percent) < 10 ? 0.1 : 1;
  return `${fixed(roundTo(percent, step, rounding), step < 1 ? 1 : 0)} %`;
}

const digits: Readonly<Record<string, string>> = {
  "-": "⁻",
  "0": "⁰",
  "1": "¹",
  "2": "²",
  "3": "³",
  "4": "⁴",
  "5": "⁵",
  "6": "⁶",
  "7": "⁷",
  "8": "⁸",
  "9": "⁹",
};

/** A whole number as superscript characters. */
export function superscript(whole: number): string {
  return String(whole).replace(/./g, (character) => digits[character] ?? character);
}

/**
 * Any number with `significant` digits; very large and very small ones as 1.07×10⁻⁴.
 */
export function numberText(value: number, significant = 3): string {
  if (value === 0) return "0";
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e6) {
    const decimals = Math.max(0, significant - 1 - Math.floor(Math.log10(size)));
    return format(`,.${Math.min(decimals, 12)}f`)(value)
      .replace(/,/g, " ")
      .replace("-", "−");
  }
  const [mantissa = "", exponent = "0"] = value.toExponential(significant - 1).split("e");
  return `${mantissa.replace("-", "−")}×10${superscript(Number(exponent))}`;
}

/** `numberText` without noughts behind the last digit that counts: 1950 and not 1950.00. */
export function plainNumberText(value: number, significant: number): string {
  const text = numberText(value, significant);
  return text.replace(/(\.\d*?)0+(?=×|$)/u, (_, kept: string) => (kept === "." ? "" : kept));
}

/** A heat flow, W or kW. */
export function powerText(watts: number, rounding: Rounding = "nearest"): string {
  return Math.abs(watts) < 1000
    ? `${fixed(roundTo(watts, 1, rounding), 0)} W`
    : `${fixed(roundTo(watts / 1000, 0.1, rounding), 1)} kW`;
}
