import type { AccumulationFindings, Findings } from "../screening/findings.js";
import { durationText, percentText, temperatureNumber, temperatureText } from "../words/numbers.js";
import { timeUnit } from "./durationAxis.js";
import type { Axis, Dash, Figure, Line, Mark, Tone, Weight } from "./figure.js";
import { tableReadings } from "./readings.js";
import { celsius, evenly, roomyDomain } from "./temperatureAxis.js";

type CurvePoint = AccumulationFindings["curve"][number];

function lineOf(
  curve: readonly CurvePoint[],
  per: number,
  read: (point: CurvePoint) => number,
  name: string,
  tone: Tone,
  dash: Dash,
  weight: Weight,
): Line {
  return {
    type: "line",
    tone,
    dash,
    weight,
    points: curve.map((point) => [point.time_s / per, read(point)]),
    name,
  };
}

/** The measured run where it stands beside the kinetics; alone it is itself the course that is drawn. */
function besideKinetics({ rate, accumulation }: Findings): AccumulationFindings["measured"] {
  return rate === null ? null : (accumulation?.measured ?? null);
}

function fractionMarks(accumulation: AccumulationFindings, findings: Findings, per: number): Mark[] {
  const { curve, maximumFraction, at_s } = accumulation;
  const measured = besideKinetics(findings);
  const percent = (read: (point: CurvePoint) => number) => (point: CurvePoint) => 100 * read(point);
  return [
    lineOf(
      curve,
      per,
      percent((point) => point.fed),
      "fed",
      "quiet",
      "longdash",
      "normal",
    ),
    lineOf(
      curve,
      per,
      percent((point) => point.reacted),
      "reacted",
      "plan",
      "dashed",
      "normal",
    ),
    ...(measured === null
      ? []
      : [
          lineOf(
            measured.curve,
            per,
            percent((point) => point.accumulated),
            "accumulated, measured run",
            "removal",
            "dotted",
            "strong",
          ),
        ]),
    lineOf(
      curve,
      per,
      percent((point) => point.accumulated),
      "accumulated",
      "reaction",
      "solid",
      "strong",
    ),
    {
      type: "note",
      x: at_s / per,
      y: 100 * maximumFraction,
      tone: "reaction",
      shape: "circle",
      text: `at most ${percentText(maximumFraction, "up")}`,
    },
  ];
}

function highest(curve: readonly CurvePoint[]): CurvePoint | null {
  return curve.reduce<CurvePoint | null>(
    (most, point) => (most === null || point.mtsr_K > most.mtsr_K ? point : most),
    null,
  );
}

function mtsrMarks(accumulation: AccumulationFindings, findings: Findings, per: number): Mark[] {
  const { curve, usedFor } = accumulation;
  const { temperatures } = findings;
  const measured = besideKinetics(findings);
  const read = (point: CurvePoint) => celsius(point.mtsr_K);
  const peak = highest(measured !== null && usedFor === "measured" ? measured.curve : curve);
  const mtsr = temperatures.mtsr_K ?? peak?.mtsr_K ?? null;
  return [
    {
      type: "rule",
      across: "y",
      value: celsius(temperatures.mtt_K),
      tone: "limit",
      dash: "longdash",
      weight: "normal",
      label: `MTT ${temperatureText(temperatures.mtt_K, "down")}`,
    },
    {
      type: "rule",
      across: "y",
      value: celsius(temperatures.process_K),
      tone: "plan",
      dash: "dotted",
      weight: "normal",
      label: `Tp ${temperatureText(temperatures.process_K)}`,
    },
    ...(measured === null
      ? []
      : [lineOf(measured.curve, per, read, "by the measured run", "removal", "dotted", "strong")]),
    lineOf(curve, per, read, "if cooling fails now", "reaction", "solid", "strong"),
    ...(peak === null || mtsr === null
      ? []
      : [
          {
            type: "note",
            x: peak.time_s / per,
            y: celsius(mtsr),
            tone: "reaction",
            shape: "circle",
            text: `MTSR ${temperatureText(mtsr, "up")}`,
          } as const,
        ]),
  ];
}

function sentenceOf(accumulation: AccumulationFindings, findings: Findings): string {
  const { maximumFraction, at_s, usedFor } = accumulation;
  const { temperatures } = findings;
  const measured = besideKinetics(findings);
  const parts = [
    `At most ${percentText(maximumFraction, "up")} of the limiting reactant lies unreacted in the vessel, ${durationText(at_s, "nearest")} after the start of the feed.`,
  ];
  if (temperatures.mtsr_K !== null)
    parts.push(`If cooling and feed stop then, MTSR is ${temperatureText(temperatures.mtsr_K, "up")}.`);
  if (measured !== null)
    parts.push(
      `The measured run gives at most ${percentText(measured.maximumFraction, "up")} and MTSR ${temperatureText(measured.mtsr_K, "up")}; the ${usedFor === "measured" ? "measured run" : "kinetics"} gives the MTSR that is used.`,
    );
  if (findings.rate === null) parts.push("That is by the measured run alone: there are no kinetics.");
  if (temperatures.allAtOnce_K !== null)
    parts.push(
      `With everything charged at once it would be ${temperatureText(temperatures.allAtOnce_K, "up")}: MTSR relies on the feed stopping.`,
    );
  return parts.join(" ");
}

/**
 * A dosed step against time: what is fed, has reacted and lies accumulated, and where the temperature would go if
 * cooling failed at that moment.
 *
 * @returns null where there is no course to draw
 */
export function dosing(findings: Findings): Figure | null {
  const { accumulation, temperatures } = findings;
  if (accumulation === null || accumulation.curve.length < 2) return null;
  const { curve } = accumulation;
  const measured = besideKinetics(findings);
  const all = [...curve, ...(measured?.curve ?? [])];
  const last = Math.max(...all.map((point) => point.time_s));
  const unit = timeUnit(last);
  const xAxis: Axis = {
    scale: "linear",
    domain: [0, last / unit.seconds],
    label: `Time from the start of the feed, ${unit.name}`,
  };
  const highest = 100 * Math.max(1, ...all.map((point) => point.fed));
  const rows = evenly(curve, 25);
  const table = {
    columns: ["Time", "Fed", "Reacted", "Accumulated", "MTSR(t), °C"],
    rows: rows.map((point) => [
      durationText(point.time_s, "nearest"),
      percentText(point.fed),
      percentText(point.reacted),
      percentText(point.accumulated, "up"),
      temperatureNumber(point.mtsr_K, "up"),
    ]),
  };
  return {
    id: "dosing",
    title: "Feed, accumulation and MTSR",
    sentence: sentenceOf(accumulation, findings),
    panels: [
      {
        type: "plot",
        height: 180,
        xAxis,
        yAxis: {
          scale: "linear",
          domain: [0, 1.06 * highest],
          label: "Share, %",
        },
        marks: fractionMarks(accumulation, findings, unit.seconds),
      },
      {
        type: "plot",
        height: 160,
        xAxis,
        yAxis: {
          scale: "linear",
          domain: roomyDomain(
            [temperatures.process_K, temperatures.mtt_K, ...all.map((point) => point.mtsr_K)].map(celsius),
          ),
          label: "Reached, °C",
        },
        marks: mtsrMarks(accumulation, findings, unit.seconds),
      },
    ],
    captions: [
      "Shares of the limiting reactant. The lower panel assumes that the feed stops with the cooling.",
    ],
    table,
    readings: tableReadings(
      xAxis,
      rows.map((point) => point.time_s / unit.seconds),
      table,
    ),
  };
}
