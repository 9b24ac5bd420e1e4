import type { CoolingFindings, Findings } from "../screening/findings.js";
import { numberText, percentText, powerText, temperatureNumber, temperatureText } from "../words/numbers.js";
import type { Axis, Figure, Mark } from "./figure.js";
import { tableReadings } from "./readings.js";
import { celsius, evenly } from "./temperatureAxis.js";

type CurvePoint = CoolingFindings["curve"][number];

/** Value on a curve between two of its points; null beyond its ends. */
function valueAt(
  curve: readonly CurvePoint[],
  kelvin: number,
  read: (point: CurvePoint) => number,
): number | null {
  const after = curve.findIndex((point) => point.temperature_K >= kelvin);
  const [before, next] = [curve[Math.max(0, after - 1)], curve[after]];
  if (before === undefined || next === undefined || kelvin < before.temperature_K) return null;
  const width = next.temperature_K - before.temperature_K;
  const part = width === 0 ? 0 : (kelvin - before.temperature_K) / width;
  return read(before) + part * (read(next) - read(before));
}

/** Heat removed per kelvin, W/K: the removal is a straight line. */
function removalSlope(curve: readonly CurvePoint[]): number | null {
  const [first, last] = [curve[0], curve.at(-1)];
  if (first === undefined || last === undefined || first.temperature_K === last.temperature_K) return null;
  return (last.removal_W - first.removal_W) / (last.temperature_K - first.temperature_K);
}

function named(
  curve: readonly CurvePoint[],
  kelvin: number | null,
  words: string,
  tone: "plan" | "decomposition" | "removal",
): Mark[] {
  if (kelvin === null) return [];
  const watts = valueAt(curve, kelvin, (point) => point.release_W);
  if (watts === null) return [];
  const shape = tone === "plan" ? "diamond" : tone === "decomposition" ? "triangle" : "square";
  return [
    {
      type: "note",
      x: celsius(kelvin),
      y: watts / 1000,
      tone,
      shape,
      text: `${words} ${temperatureText(kelvin, tone === "plan" ? "nearest" : "down")}`,
    },
  ];
}

/** The removal line that just touches the release: with any warmer coolant there is no steady state. */
function tangentMarks(cooling: CoolingFindings): Mark[] {
  const slope = removalSlope(cooling.curve);
  const { tangency_K, criticalCoolant_K, curve } = cooling;
  if (slope === null || tangency_K === null || criticalCoolant_K === null) return [];
  const last = curve.at(-1)?.temperature_K ?? tangency_K;
  const at = (kelvin: number) => [celsius(kelvin), (slope * (kelvin - criticalCoolant_K)) / 1000] as const;
  return [
    {
      type: "line",
      tone: "removal",
      dash: "dashdot",
      weight: "thin",
      points: [at(criticalCoolant_K), at(last)],
      name: `removed at the critical coolant temperature, ${temperatureText(criticalCoolant_K, "down")}`,
      keyed: true,
    },
  ];
}

/** Highest heat flow shown, W: the release beyond the crossings would flatten all the rest. */
function ceiling({ curve, capacity_W, duty_W }: CoolingFindings): number {
  const removal = Math.max(...curve.map((point) => point.removal_W));
  const release = Math.max(...curve.map((point) => point.release_W));
  return Math.min(Math.max(release, removal), 1.5 * Math.max(removal, capacity_W, duty_W, 1)) * 1.05;
}

function sentenceOf(cooling: CoolingFindings, process_K: number): string {
  const { duty_W, capacity_W, use, stabilityRatio, noReturn_K, tangency_K, criticalCoolant_K } = cooling;
  const share = use === null ? "the coolant takes up no heat" : `${percentText(use, "up")} of it is used`;
  const parts = [
    `At ${temperatureText(process_K)} the largest duty is ${powerText(duty_W, "up")}, full cooling removes ${powerText(capacity_W, "down")}: ${share}.`,
    `The stability ratio is ${numberText(stabilityRatio, 2)}: with a constant coolant the vessel ${stabilityRatio < 1 ? "steadies itself" : "does not steady itself"}.`,
    noReturn_K === null
      ? "There is no temperature of no return in the range computed."
      : `From ${temperatureText(noReturn_K, "down")} upwards full cooling no longer turns the temperature round (no return).`,
  ];
  if (tangency_K !== null && criticalCoolant_K !== null)
    parts.push(
      `The cooling line touches the release at ${temperatureText(tangency_K, "down")} with coolant at ${temperatureText(criticalCoolant_K, "down")} (tangency).`,
    );
  return parts.join(" ");
}

/**
 * Heat released and heat removed at full cooling against temperature.
 *
 * @returns null where there is nothing to draw
 */
export function heat(findings: Findings): Figure | null {
  const { cooling, temperatures } = findings;
  if (cooling === null || cooling.curve.length < 2) return null;
  const curve = [...cooling.curve].sort((a, b) => a.temperature_K - b.temperature_K);
  const top = ceiling(cooling) / 1000;
  const bottom = Math.min(0, ...curve.map((point) => point.removal_W / 1000));
  const xAxis: Axis = {
    scale: "linear",
    domain: [celsius(curve[0]?.temperature_K ?? 0), celsius(curve.at(-1)?.temperature_K ?? 0)],
    label: "Temperature of the contents, °C",
  };
  const rows = evenly(curve, 25);
  const table = {
    columns: ["Temperature, °C", "Released", "Removed at full cooling"],
    rows: rows.map((point) => [
      temperatureNumber(point.temperature_K),
      powerText(point.release_W, "up"),
      powerText(point.removal_W, "down"),
    ]),
  };
  return {
    id: "heat",
    title: "Heat released and heat removed",
    sentence: sentenceOf(cooling, temperatures.process_K),
    panels: [
      {
        type: "plot",
        height: 260,
        xAxis,
        yAxis: {
          scale: "linear",
          domain: [Math.max(bottom, -0.4 * top), top],
          label: "Heat flow, kW",
        },
        marks: [
          {
            type: "line",
            tone: "removal",
            dash: "dashed",
            weight: "strong",
            points: curve.map((point) => [celsius(point.temperature_K), point.removal_W / 1000]),
            name: "removed at full cooling",
          },
          ...tangentMarks({ ...cooling, curve }),
          {
            type: "line",
            tone: "reaction",
            dash: "solid",
            weight: "strong",
            points: curve.map((point) => [celsius(point.temperature_K), point.release_W / 1000]),
            name: "released",
          },
          ...named(curve, temperatures.process_K, "Tp", "plan"),
          ...named(curve, cooling.noReturn_K, "no return", "decomposition"),
          ...named(curve, cooling.tangency_K, "tangency", "removal"),
        ],
      },
    ],
    captions: [
      "Released: reaction, decomposition and agitator at the moment of the largest reaction heat, the composition held; cooling by the feed left out.",
    ],
    table,
    readings: tableReadings(
      xAxis,
      rows.map((point) => celsius(point.temperature_K)),
      table,
    ),
  };
}
