import type { FailureFindings } from "../screening/findings.js";
import { durationText, temperatureText } from "../words/numbers.js";
import { scaleOf } from "./axes.js";
import type { Axis } from "./figure.js";
import { type Reading, readingsAt } from "./readings.js";

/** Moments that are told along the axis. */
const moments = 41;

/** Temperature of a failure at a moment, K; null beyond its trace. */
export function temperatureAt({ trace }: FailureFindings, time: number): number | null {
  const after = trace.findIndex((point) => point.time_s >= time);
  const [before, next] = [trace[Math.max(0, after - 1)], trace[after]];
  if (before === undefined || next === undefined) return null;
  const width = next.time_s - before.time_s;
  const part = width === 0 ? 0 : (time - before.time_s) / width;
  return before.temperature_K + part * (next.temperature_K - before.temperature_K);
}

/**
 * Temperatures of all failures at moments along the axis: "12 min after the failure · 1 Stirrer stops: 61.2 °C".
 * Above MTT no temperature is told, because the model does not hold there.
 *
 * @param per seconds in one unit of the axis
 */
export function failureReadings(failures: readonly FailureFindings[], axis: Axis, per: number): Reading[] {
  const value = scaleOf(axis, 0, 1).invert;
  const places = Array.from({ length: moments }, (_, step) => {
    const place = value(step / (moments - 1));
    const time = place * per;
    const told = failures.map((failure, at) => `${at + 1} ${failure.name}: ${reached(failure, time)}`);
    return {
      value: place,
      text: [`${durationText(time, "nearest")} after the failure`, ...told].join(" · "),
    };
  });
  return readingsAt(axis, places);
}

function reached(failure: FailureFindings, time: number): string {
  if (failure.timeToMtt_s !== null && time >= failure.timeToMtt_s) return "has passed MTT";
  const kelvin = temperatureAt(failure, time);
  return kelvin === null ? "not computed so far" : temperatureText(kelvin, "up");
}
