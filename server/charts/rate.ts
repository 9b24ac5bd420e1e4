import type { RateFindings } from "../screening/findings.js";
import {
  differenceText,
  numberText,
  superscript,
  temperatureNumber,
  temperatureText,
} from "../words/numbers.js";
import type { Axis, Figure, Mark, Tick, Tone } from "./figure.js";
import { tableReadings } from "./readings.js";
import { celsius, evenly, roomyDomain } from "./temperatureAxis.js";

/** 1000/T, 1/K */
export function reciprocal(kelvin: number): number {
  return 1000 / kelvin;
}

/** The horizontal axis that rate and residuals share: 1000/T over all temperatures of the figure. */
export function reciprocalAxis(rate: RateFindings): Axis {
  const temperatures = [
    rate.atProcess.temperature_K,
    ...rate.table.map((row) => row.temperature_K),
    ...(rate.fit?.rows ?? []).map((row) => row.temperature_K),
  ];
  return {
    scale: "linear",
    domain: roomyDomain(temperatures.map(reciprocal), 0.05),
    label: "1000/T, K⁻¹",
  };
}

/** Round temperatures, degC, at their places on a reciprocal axis. */
function celsiusTicks(axis: Axis): Tick[] {
  const [low, high] = axis.domain;
  const [coldest, hottest] = [celsius(1000 / high), celsius(1000 / low)];
  const step = [2, 5, 10, 20, 50, 100].find((each) => (hottest - coldest) / each <= 9) ?? 200;
  const ticks: Tick[] = [];
  for (let at = Math.ceil(coldest / step) * step; at <= hottest; at += step)
    ticks.push({
      value: reciprocal(at - celsius(0)),
      text: String(at).replace("-", "−"),
    });
  return ticks;
}

interface RatePoint {
  readonly x: number;
  readonly lnK: number;
}

/** The line of ln k, with a vertex at each end of the fitted range. */
function lineOf(rate: RateFindings): RatePoint[] {
  const points = rate.table
    .filter((row) => row.k > 0)
    .map((row) => ({ x: reciprocal(row.temperature_K), lnK: Math.log(row.k) }))
    .sort((a, b) => a.x - b.x);
  for (const end of rate.fittedRange_K ?? []) {
    const x = reciprocal(end);
    const after = points.findIndex((point) => point.x > x);
    const [before, next] = [points[after - 1], points[after]];
    if (before === undefined || next === undefined || before.x === x) continue;
    const part = (x - before.x) / (next.x - before.x);
    points.splice(after, 0, {
      x,
      lnK: before.lnK + part * (next.lnK - before.lnK),
    });
  }
  return points;
}

/** Pieces inside and outside the fitted range; without a range all of it is one piece. */
function lineMarks(rate: RateFindings, tone: Tone): Mark[] {
  const points = lineOf(rate);
  const pair = ({ x, lnK }: RatePoint) => [x, lnK] as const;
  if (rate.fittedRange_K === null)
    return [
      {
        type: "line",
        tone,
        dash: "solid",
        weight: "normal",
        points: points.map(pair),
      },
    ];
  const [left, right] = [reciprocal(rate.fittedRange_K[1]), reciprocal(rate.fittedRange_K[0])];
  const piece = (outside: boolean, of: readonly RatePoint[]): Mark => ({
    type: "line",
    tone,
    dash: outside ? "dashed" : "solid",
    weight: "normal",
    points: of.map(pair),
    ...(outside ? ({ name: "extrapolated", keyed: true } as const) : {}),
  });
  const slack = 1e-12;
  return [
    piece(
      true,
      points.filter((each) => each.x <= left + slack),
    ),
    piece(
      false,
      points.filter((each) => each.x >= left - slack && each.x <= right + slack),
    ),
    piece(
      true,
      points.filter((each) => each.x >= right - slack),
    ),
  ];
}

function fitMarks(rate: RateFindings, tone: Tone): Mark[] {
  const rows = (rate.fit?.rows ?? []).filter((row) => row.k > 0);
  const place = (row: (typeof rows)[number]) => [reciprocal(row.temperature_K), Math.log(row.k)] as const;
  const used = rows.filter((row) => row.leftOut === null);
  const leftOut = rows.filter((row) => row.leftOut !== null);
  return [
    ...(used.length > 0
      ? [
          {
            type: "points",
            tone,
            shape: "ring",
            points: used.map(place),
            name: "measured",
          } as const,
        ]
      : []),
    ...(leftOut.length > 0
      ? [
          {
            type: "points",
            tone: "quiet",
            shape: "cross",
            points: leftOut.map(place),
            name: "left out",
          } as const,
        ]
      : []),
  ];
}

function marksOf(rate: RateFindings, tone: Tone): Mark[] {
  const band = rate.table.flatMap(({ temperature_K, low95, high95 }) =>
    low95 !== null && high95 !== null && low95 > 0
      ? [
          {
            x: reciprocal(temperature_K),
            low: Math.log(low95),
            high: Math.log(high95),
          },
        ]
      : [],
  );
  const { temperature_K, k, unit } = rate.atProcess;
  const marks: Mark[] = [];
  if (rate.fittedRange_K !== null) {
    const [low, high] = rate.fittedRange_K;
    marks.push({
      type: "area",
      across: "x",
      from: reciprocal(high),
      to: reciprocal(low),
      fill: "pale",
      tone: "quiet",
      name: `fitted range, ${temperatureNumber(low)} to ${temperatureText(high)}`,
    });
  }
  if (band.length > 1) {
    band.sort((a, b) => a.x - b.x);
    marks.push({ type: "band", tone, points: band, name: "95 % interval" });
  }
  marks.push(...lineMarks(rate, tone), ...fitMarks(rate, tone));
  if (k !== null && k > 0)
    marks.push({
      type: "note",
      x: reciprocal(temperature_K),
      y: Math.log(k),
      tone: "plan",
      shape: "diamond",
      text: `Tp ${temperatureText(temperature_K)}: k = ${numberText(k)} ${unit}`,
    });
  return marks;
}

/** ln k over all that the figure shows. */
function logarithmAxis(rate: RateFindings): Axis {
  const values = [
    rate.atProcess.k,
    ...rate.table.flatMap((row) => [row.k, row.low95, row.high95]),
    ...(rate.fit?.rows ?? []).map((row) => row.k),
  ].flatMap((k) => (k !== null && k > 0 ? [Math.log(k)] : []));
  return { scale: "linear", domain: roomyDomain(values, 1), label: "ln k" };
}

function decades(axis: Axis): Tick[] {
  const [low, high] = axis.domain.map((each) => each / Math.LN10) as [number, number];
  const step = Math.max(1, Math.ceil((high - low) / 8));
  const ticks: Tick[] = [];
  for (let power = Math.ceil(low / step) * step; power <= high; power += step)
    ticks.push({ value: power * Math.LN10, text: `10${superscript(power)}` });
  return ticks;
}

function sentenceOf(rate: RateFindings, of: string): string {
  const { temperature_K, k, unit, low95, high95, extrapolation_K } = rate.atProcess;
  const value =
    k === null
      ? `At ${temperatureText(temperature_K)} the rate constant of ${of} is beyond the range of numbers`
      : `At ${temperatureText(temperature_K)} the rate constant of ${of} is ${numberText(k)} ${unit}`;
  const interval =
    low95 === null || high95 === null
      ? ", without an interval because its errors are not known"
      : ` (95 % interval ${numberText(low95)} to ${numberText(high95)})`;
  const reach =
    extrapolation_K === null
      ? "No fitted range is given, so that extrapolation cannot be judged."
      : extrapolation_K === 0
        ? "That is inside the fitted range."
        : `That is ${differenceText(Math.abs(extrapolation_K), "up")} ${extrapolation_K > 0 ? "above" : "below"} the fitted range.`;
  return `${value}${interval}. ${reach}`;
}

/**
 * A rate constant against temperature, ln k over 1000/T.
 *
 * @param of whose rate constant it is, as a sentence names it: "the reaction"
 * @returns null where the table is too short to draw
 */
export function rateFigure(
  rate: RateFindings,
  id: string,
  title: string,
  of: string,
  tone: Tone,
): Figure | null {
  if (rate.table.filter((row) => row.k > 0).length < 2) return null;
  const xAxis = reciprocalAxis(rate);
  const yAxis = logarithmAxis(rate);
  const { unit } = rate.atProcess;
  const rows = evenly(rate.table, 25);
  const table = {
    columns: ["Temperature, °C", "1000/T, K⁻¹", `k, ${unit}`, "95 % low", "95 % high", "Fitted range"],
    rows: rows.map((row) => [
      temperatureNumber(row.temperature_K),
      numberText(reciprocal(row.temperature_K), 4),
      numberText(row.k),
      row.low95 === null ? "not known" : numberText(row.low95),
      row.high95 === null ? "not known" : numberText(row.high95),
      row.extrapolated === null ? "not given" : row.extrapolated ? "outside" : "inside",
    ]),
  };
  return {
    id,
    title,
    sentence: sentenceOf(rate, of),
    panels: [
      {
        type: "plot",
        height: 250,
        xAxis,
        yAxis,
        topAxis: { label: "Temperature, °C", ticks: celsiusTicks(xAxis) },
        rightAxis: { label: `k, ${unit}`, ticks: decades(yAxis) },
        marks: marksOf(rate, tone),
      },
    ],
    captions: [],
    table,
    readings: tableReadings(
      xAxis,
      rows.map((row) => reciprocal(row.temperature_K)),
      table,
    ),
  };
}
