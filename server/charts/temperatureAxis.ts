import { zeroCelsius } from "../numeric/constants.js";
import type { Axis } from "./figure.js";

/** A temperature as the axes of all figures read it, degC. */
export function celsius(kelvin: number): number {
  return kelvin - zeroCelsius;
}

/**
 * A temperature axis, degC, with a little room at both ends.
 *
 * @param temperatures all that must lie on it, K; null ones are skipped
 * @param label what stands under it
 */
export function temperatureAxis(temperatures: readonly (number | null)[], label = "Temperature, °C"): Axis {
  return {
    scale: "linear",
    domain: roomyDomain(temperatures.map((each) => each ?? Number.NaN).map(celsius)),
    label,
  };
}

/**
 * From a little below the least to a little above the greatest of the values.
 *
 * @param atLeast smallest width of the domain
 */
export function roomyDomain(values: readonly number[], atLeast = 4): readonly [number, number] {
  const finite = values.filter(Number.isFinite);
  const low = Math.min(...finite);
  const high = Math.max(...finite);
  if (!(low <= high)) return [0, atLeast];
  const room = Math.max(0.05 * (high - low), (atLeast - (high - low)) / 2);
  return [low - room, high + room];
}

/** At most `count` of the rows, evenly chosen, the first and the last among them. */
export function evenly<T>(rows: readonly T[], count: number): T[] {
  if (rows.length <= count) return [...rows];
  const step = (rows.length - 1) / (count - 1);
  return Array.from({ length: count }, (_, at) => rows[Math.round(at * step)] as T);
}
