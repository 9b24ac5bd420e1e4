import type { FailureFindings, Findings } from "../screening/findings.js";
import { temperatureText } from "../words/numbers.js";
import { durationAxis, timeUnit } from "./durationAxis.js";
import { failureReadings, temperatureAt } from "./failureReadings.js";
import { byTimeToAct, failureColumns, failureRow, failuresSentence, verdictWords } from "./failuresWords.js";
import type { Area, Axis, Dash, Figure, Line, Points, Rule, Tone } from "./figure.js";
import { celsius } from "./temperatureAxis.js";

const looks: readonly { readonly tone: Tone; readonly dash: Dash }[] = [
  { tone: "decomposition", dash: "solid" },
  { tone: "reaction", dash: "dashed" },
  { tone: "removal", dash: "dashdot" },
  { tone: "plan", dash: "longdash" },
  { tone: "ink", dash: "dotted" },
];

/** The moment until which a failure's course is worth showing, s: a little after what it is told by. */
function shownUntil({ timeToMtt_s, timeToAct_s, peakAt_s, timeToTd24_s }: FailureFindings): number {
  return Math.max(
    60,
    timeToMtt_s ?? peakAt_s,
    timeToAct_s ?? 0,
    timeToMtt_s === null ? (timeToTd24_s ?? 0) : 0,
  );
}

/** Linear where one scale shows all failures, logarithmic from a minute on where their times differ widely. */
function timeAxis(failures: readonly FailureFindings[]): {
  readonly axis: Axis;
  readonly per: number;
} {
  const ends = failures.map(shownUntil);
  const longest = Math.max(...ends) * 1.15;
  if (longest / Math.min(...ends) > 6) {
    const axis = durationAxis([60, longest], "Time since the failure (logarithmic)");
    return { axis: { ...axis, domain: [60, longest] }, per: 1 };
  }
  const unit = timeUnit(longest);
  const axis: Axis = {
    scale: "linear",
    domain: [0, longest / unit.seconds],
    label: `Time since the failure, ${unit.name}`,
  };
  return { axis, per: unit.seconds };
}

type Course = readonly (readonly [number, number])[];

/** A course up to MTT, and what the model would say beyond it; the two meet in the moment that was computed. */
function coursesOf(
  { timeToMtt_s, trace }: FailureFindings,
  mtt_K: number,
): { readonly within: Course; readonly beyond: Course } {
  const points = trace.map((point) => [point.time_s, point.temperature_K] as const);
  if (timeToMtt_s === null) return { within: points, beyond: [] };
  const passing = [timeToMtt_s, mtt_K] as const;
  return {
    within: [...points.filter(([time]) => time < timeToMtt_s), passing],
    beyond: [passing, ...points.filter(([time]) => time > timeToMtt_s)],
  };
}

function lineMarks(
  failures: readonly FailureFindings[],
  mtt_K: number,
  per: number,
  earliest: number,
): Line[] {
  const placed = (course: Course) =>
    course.map(([time, kelvin]) => [Math.max(earliest, time) / per, celsius(kelvin)] as const);
  return failures.flatMap((failure, at): Line[] => {
    const { tone, dash } = looks[at % looks.length] as (typeof looks)[number];
    const { within, beyond } = coursesOf(failure, mtt_K);
    return [
      {
        type: "line",
        tone,
        dash: "dotted",
        weight: "thin",
        points: placed(beyond),
      },
      {
        type: "line",
        tone,
        dash,
        weight: at < looks.length ? "strong" : "normal",
        points: placed(within),
        tag: String(at + 1),
        name: `${failure.name}: ${verdictWords(failure)}`,
        keyed: true,
      },
    ];
  });
}

function pointMarks(
  failures: readonly FailureFindings[],
  mtt_K: number,
  per: number,
  earliest: number,
): Points[] {
  const acts = failures.flatMap((failure): (readonly [number, number])[] => {
    const time = failure.timeToAct_s;
    const kelvin = time === null || time < earliest || time === 0 ? null : temperatureAt(failure, time);
    return kelvin === null || time === null ? [] : [[time / per, celsius(kelvin)]];
  });
  const passed = failures.flatMap(({ timeToMtt_s }) =>
    timeToMtt_s === null ? [] : [[timeToMtt_s / per, celsius(mtt_K)] as const],
  );
  return [
    ...(passed.length === 0
      ? []
      : [
          {
            type: "points",
            tone: "ink",
            shape: "cross",
            points: passed,
            name: "passes MTT: beyond the model",
          } as const,
        ]),
    ...(acts.length === 0
      ? []
      : [
          {
            type: "points",
            tone: "ink",
            shape: "triangle",
            points: acts,
            name: "last moment at which restored cooling still helps",
          } as const,
        ]),
  ];
}

function limitMarks({ temperatures }: Findings, top: number): (Rule | Area)[] {
  const rule = (kelvin: number, name: string, tone: Tone, dash: Dash): Rule => ({
    type: "rule",
    across: "y",
    value: celsius(kelvin),
    tone,
    dash,
    weight: "normal",
    label: `${name} ${temperatureText(kelvin, "down")}`,
  });
  const beyond: Area = {
    type: "area",
    across: "y",
    from: celsius(temperatures.mtt_K),
    to: top,
    fill: "hatched",
    tone: "faint",
  };
  return [
    beyond,
    rule(temperatures.mtt_K, "MTT", "limit", "solid"),
    ...(temperatures.td24_K === null
      ? []
      : [rule(temperatures.td24_K, "T_D24", "decomposition", "longdash")]),
  ];
}

/**
 * Temperature against time of all failures on one plot, cut a little above MTT.
 *
 * @returns null where no failure was simulated
 */
export function failures(findings: Findings): Figure | null {
  const sorted = byTimeToAct(findings.failures ?? []);
  if (!sorted.some((failure) => failure.trace.length > 1)) return null;
  const { mtt_K, td24_K, process_K } = findings.temperatures;
  const { axis, per } = timeAxis(sorted);
  const earliest = axis.scale === "log" ? axis.domain[0] : 0;
  const lowest = Math.min(
    process_K,
    ...sorted.flatMap((failure) => failure.trace.map((point) => point.temperature_K)),
  );
  const span = Math.max(10, mtt_K - lowest);
  const top = celsius(
    Math.min(mtt_K + 0.6 * span, Math.max(mtt_K + 0.12 * span, (td24_K ?? 0) + 0.06 * span)),
  );
  return {
    id: "failures",
    title: "Cooling failures",
    sentence: failuresSentence(sorted),
    panels: [
      {
        type: "plot",
        height: 280,
        xAxis: axis,
        yAxis: {
          scale: "linear",
          domain: [celsius(lowest) - 0.05 * span, top],
          label: "Temperature, °C",
        },
        marks: [
          ...limitMarks(findings, top),
          ...lineMarks(sorted, mtt_K, per, earliest),
          ...pointMarks(sorted, mtt_K, per, earliest),
        ],
      },
    ],
    captions: [
      "Hatched, thin and dotted: above MTT a course is beyond the model (boiling, venting, failure of the vessel).",
    ],
    table: {
      columns: failureColumns,
      rows: sorted.map(failureRow),
    },
    readings: failureReadings(sorted, axis, per),
  };
}
