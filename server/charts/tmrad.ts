import type { Findings, TmradFindings } from "../screening/findings.js";
import { durationText, temperatureNumber, temperatureText } from "../words/numbers.js";
import { durationAxis } from "./durationAxis.js";
import type { Axis, Figure, Mark, Rule, Tone } from "./figure.js";
import { tableReadings } from "./readings.js";
import { celsius, evenly, temperatureAxis } from "./temperatureAxis.js";

const eightHours = 8 * 3600;
const day = 24 * 3600;

interface Marked {
  readonly name: string;
  readonly temperature_K: number;
  readonly text: string;
  readonly time_s: number | null;
  readonly tone: Tone;
}

function markedOf(times: TmradFindings, { process_K, mtsr_K, td24_K }: Findings["temperatures"]): Marked[] {
  const marked: Marked[] = [
    {
      name: "Tp",
      temperature_K: process_K,
      text: temperatureText(process_K),
      time_s: times.atProcess_s,
      tone: "plan",
    },
  ];
  if (mtsr_K !== null)
    marked.push({
      name: "MTSR",
      temperature_K: mtsr_K,
      text: temperatureText(mtsr_K, "up"),
      time_s: times.atMtsr_s,
      tone: "reaction",
    });
  if (td24_K !== null)
    marked.push({
      name: "T_D24",
      temperature_K: td24_K,
      text: temperatureText(td24_K, "down"),
      time_s: day,
      tone: "decomposition",
    });
  return marked;
}

/** Where the closed form promises more time than there is. */
function carelessPlaces(times: TmradFindings): (readonly [number, number])[] {
  const places = times.curve.flatMap(({ temperature_K, time_s, zeroOrder_s }) =>
    time_s !== null && zeroOrder_s !== null && zeroOrder_s > time_s * (1 + 1e-9)
      ? [[celsius(temperature_K), zeroOrder_s] as const]
      : [],
  );
  return evenly(places, 9);
}

function marksOf(times: TmradFindings, marked: readonly Marked[]): Mark[] {
  const curve = (which: "time_s" | "zeroOrder_s") =>
    times.curve.map((row) => {
      const time = row[which];
      return time === null || time <= 0 ? null : ([celsius(row.temperature_K), time] as const);
    });
  const careless = carelessPlaces(times);
  const rule = (value: number, label: string): Rule => ({
    type: "rule",
    across: "y",
    value,
    tone: "quiet",
    dash: "longdash",
    weight: "thin",
    label,
  });
  return [
    rule(eightHours, "8 h"),
    rule(day, "24 h"),
    ...marked.map(
      ({ name, temperature_K, text, time_s, tone }): Rule => ({
        type: "rule",
        across: "x",
        value: celsius(temperature_K),
        tone,
        dash: "dotted",
        weight: "normal",
        label: time_s === null ? `${name} ${text}` : `${name} ${text}: ${durationText(time_s)}`,
      }),
    ),
    {
      type: "line",
      tone: "quiet",
      dash: "dashed",
      weight: "thin",
      points: curve("zeroOrder_s"),
      name: "closed form, zero order",
    },
    ...(careless.length > 0
      ? [
          {
            type: "points",
            tone: "quiet",
            shape: "cross",
            points: careless,
            name: "closed form longer than TMRad: not on the careful side",
          } as const,
        ]
      : []),
    {
      type: "line",
      tone: "decomposition",
      dash: "solid",
      weight: "strong",
      points: curve("time_s"),
      name: "TMRad",
    },
    ...marked.flatMap(({ temperature_K, time_s, tone }): Mark[] =>
      time_s === null || time_s <= 0
        ? []
        : [
            {
              type: "points",
              tone,
              shape: "circle",
              points: [[celsius(temperature_K), time_s]],
            },
          ],
    ),
  ];
}

function sentenceOf(times: TmradFindings, { process_K, mtsr_K, td24_K }: Findings["temperatures"]): string {
  const from = (kelvin: string, time: number | null) =>
    time === null
      ? `From ${kelvin} no time to maximum rate was computed`
      : `From ${kelvin} TMRad is ${durationText(time)}`;
  const parts = [`${from(temperatureText(process_K), times.atProcess_s)}.`];
  if (mtsr_K !== null) parts.push(`${from(`MTSR ${temperatureText(mtsr_K, "up")}`, times.atMtsr_s)}.`);
  parts.push(
    td24_K === null
      ? "There is no T_D24 in the range computed."
      : `It is 24 h from T_D24 ${temperatureText(td24_K, "down")}.`,
  );
  if (times.likelihood !== null)
    parts.push(`The likelihood of the decomposition after a cooling failure is ${times.likelihood}.`);
  if (times.zeroOrderCautious === false) parts.push("The closed form is not on the careful side here.");
  return parts.join(" ");
}

/**
 * Adiabatic time to maximum rate against temperature.
 *
 * @returns null without a decomposition
 */
export function tmrad(findings: Findings): Figure | null {
  const { timeToMaximumRate: times, temperatures } = findings;
  if (times === null || times.curve.filter((row) => row.time_s !== null && row.time_s > 0).length < 2)
    return null;
  const marked = markedOf(times, temperatures);
  const shownTimes = times.curve.flatMap((row) => (row.time_s === null ? [] : [row.time_s]));
  const roomy = temperatureAxis(
    times.curve.map((row) => row.temperature_K),
    "Temperature at the loss of cooling, °C",
  );
  const xAxis: Axis = {
    ...roomy,
    domain: [celsius(times.curve[0]?.temperature_K ?? 0), roomy.domain[1]],
  };
  const rows = evenly(times.curve, 25);
  const table = {
    columns: ["Temperature, °C", "TMRad", "Closed form, zero order", "Closed form on the careful side"],
    rows: rows.map(({ temperature_K, time_s, zeroOrder_s }) => [
      temperatureNumber(temperature_K),
      time_s === null ? "not computed" : durationText(time_s),
      zeroOrder_s === null ? "not computed" : durationText(zeroOrder_s),
      time_s === null || zeroOrder_s === null
        ? "not known"
        : zeroOrder_s <= time_s * (1 + 1e-9)
          ? "yes"
          : "no",
    ]),
  };
  return {
    id: "tmrad",
    title: "Time to maximum rate",
    sentence: sentenceOf(times, temperatures),
    panels: [
      {
        type: "plot",
        height: 270,
        xAxis,
        yAxis: durationAxis([...shownTimes, eightHours, day], "TMRad (logarithmic)"),
        marks: marksOf(times, marked),
      },
    ],
    captions: ["Adiabatic, from fresh material; the time rounded down."],
    table,
    readings: tableReadings(
      xAxis,
      rows.map((row) => celsius(row.temperature_K)),
      table,
    ),
  };
}
