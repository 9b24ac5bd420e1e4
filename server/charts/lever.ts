import type { Findings, WindowFindings } from "../screening/findings.js";
import { durationText, temperatureNumber, temperatureText } from "../words/numbers.js";
import type { Axis, Band, Figure, Line, Mark } from "./figure.js";
import { tableReadings } from "./readings.js";
import { celsius, roomyDomain } from "./temperatureAxis.js";

type Step = NonNullable<WindowFindings["feedLever"]>[number];

function durationsAxis(steps: readonly Step[]): Axis {
  const durations = steps.map((step) => step.duration_s);
  return {
    scale: "log",
    domain: [Math.min(...durations) / 1.12, Math.max(...durations) * 1.12],
    label: "Duration of the feed (logarithmic)",
    ticks: steps.map((step) => ({
      value: step.duration_s,
      text: durationText(step.duration_s, "nearest"),
    })),
  };
}

function endLine(steps: readonly Step[], which: "lower_K" | "upper_K"): Line {
  const upper = which === "upper_K";
  return {
    type: "line",
    tone: "reaction",
    dash: upper ? "solid" : "dashed",
    weight: "strong",
    points: steps.map((step) => {
      const end = step[which];
      return end === null ? null : [step.duration_s, celsius(end)];
    }),
    name: upper ? "upper end" : "lower end",
  };
}

/** The window as an area, interrupted where there is none. */
function windowBands(steps: readonly Step[]): Band[] {
  const runs: { x: number; low: number; high: number }[][] = [[]];
  for (const { duration_s, lower_K, upper_K } of steps) {
    if (lower_K === null || upper_K === null) runs.push([]);
    else
      runs.at(-1)?.push({
        x: duration_s,
        low: celsius(lower_K),
        high: celsius(upper_K),
      });
  }
  const drawn = runs.filter((run) => run.length > 1);
  return drawn.map((points, at) => ({
    type: "band",
    tone: "reaction",
    points,
    ...(at === 0 ? { name: "window" } : {}),
  }));
}

function marksOf(steps: readonly Step[], process_K: number): Mark[] {
  const known = steps.flatMap(({ duration_s, lower_K, upper_K }) =>
    lower_K === null || upper_K === null
      ? []
      : [{ duration_s, lower: celsius(lower_K), upper: celsius(upper_K) }],
  );
  const planned = steps.find((step) => step.durationFactor === 1);
  const empty = steps.filter((step) => step.lower_K === null || step.upper_K === null);
  const points = known.flatMap(({ duration_s, lower, upper }) => [
    [duration_s, lower] as const,
    [duration_s, upper] as const,
  ]);
  return [
    ...windowBands(steps),
    {
      type: "rule",
      across: "y",
      value: celsius(process_K),
      tone: "plan",
      dash: "solid",
      weight: "normal",
      label: `Tp ${temperatureText(process_K)}`,
    },
    ...(planned === undefined
      ? []
      : [
          {
            type: "rule",
            across: "x",
            value: planned.duration_s,
            tone: "plan",
            dash: "dotted",
            weight: "normal",
            label: `as planned, ${durationText(planned.duration_s, "nearest")}`,
          } as const,
        ]),
    endLine(steps, "lower_K"),
    endLine(steps, "upper_K"),
    ...(points.length === 0 ? [] : [{ type: "points", tone: "reaction", shape: "ring", points } as const]),
    ...(empty.length === 0
      ? []
      : [
          {
            type: "points",
            tone: "ink",
            shape: "cross",
            points: empty.map((step) => [step.duration_s, celsius(process_K)] as const),
            name: "no window",
          } as const,
        ]),
  ];
}

function spanOf({ lower_K, upper_K }: Step): string {
  return lower_K === null || upper_K === null
    ? "no window"
    : `${temperatureNumber(lower_K, "up")} to ${temperatureText(upper_K, "down")}`;
}

/**
 * What a slower or a faster feed does to the ends of the window.
 *
 * @returns null for batch cases
 */
export function lever(findings: Findings): Figure | null {
  const steps = [...(findings.window?.feedLever ?? [])].sort((a, b) => a.duration_s - b.duration_s);
  const [fastest, slowest] = [steps[0], steps.at(-1)];
  if (fastest === undefined || slowest === undefined || steps.length < 2) return null;
  const { process_K } = findings.temperatures;
  const ends = steps.flatMap(({ lower_K, upper_K }) => [lower_K, upper_K].filter((each) => each !== null));
  const planned = steps.find((step) => step.durationFactor === 1);
  const now =
    planned === undefined
      ? ""
      : `As planned, in ${durationText(planned.duration_s, "nearest")}: ${spanOf(planned)}. `;
  const xAxis: Axis = durationsAxis(steps);
  const table = {
    columns: ["Duration of the feed", "Times the planned one", "Window, °C"],
    rows: steps.map((step) => [
      durationText(step.duration_s, "nearest"),
      String(step.durationFactor),
      spanOf(step),
    ]),
  };
  return {
    id: "feed-lever",
    title: "What a slower feed buys",
    sentence: `${now}Fed in ${durationText(fastest.duration_s, "nearest")}: ${spanOf(fastest)}. Fed in ${durationText(slowest.duration_s, "nearest")}: ${spanOf(slowest)}.`,
    panels: [
      {
        type: "plot",
        height: 170,
        xAxis,
        yAxis: {
          scale: "linear",
          domain: roomyDomain([process_K, ...ends].map(celsius)),
          label: "Window, °C",
        },
        marks: marksOf(steps, process_K),
      },
    ],
    captions: [],
    table,
    readings: tableReadings(
      xAxis,
      steps.map((step) => step.duration_s),
      table,
    ),
  };
}
