import type { Findings, Percentiles } from "../screening/findings.js";
import { type Rounding, temperatureNumber, temperatureText } from "../words/numbers.js";
import type { Figure, Lane, LaneMark, Shape, Tone } from "./figure.js";
import { celsius, temperatureAxis } from "./temperatureAxis.js";

/** One of the four temperatures that a case is judged by. */
export interface Rung {
  readonly name: string;
  readonly meaning: string;
  readonly value_K: number | null;
  readonly interval_K: readonly [number, number] | null;
  /** the direction in which a shown figure errs on the safe side */
  readonly rounding: Rounding;
  readonly tone: Tone;
  readonly shape: Shape;
  /** why there is no value */
  readonly missing: string;
}

function intervalOf(percentiles: Percentiles | null | undefined): readonly [number, number] | null {
  if (percentiles === null || percentiles === undefined) return null;
  const { p05, p95 } = percentiles;
  return p05 === null || p95 === null ? null : [p05, p95];
}

/** The four of a case: planned, MTSR, MTT and T_D24. */
export function rungsOf({ temperatures, uncertainty, heat }: Findings): Rung[] {
  return [
    {
      name: "Tp",
      meaning: "planned process temperature",
      value_K: temperatures.process_K,
      interval_K: null,
      rounding: "nearest",
      tone: "plan",
      shape: "diamond",
      missing: "",
    },
    {
      name: "MTSR",
      meaning: "reached when cooling fails",
      value_K: temperatures.mtsr_K,
      interval_K: intervalOf(uncertainty?.mtsr_K),
      rounding: "up",
      tone: "reaction",
      shape: "circle",
      missing: "not computed",
    },
    {
      name: "MTT",
      meaning: "technical limit",
      value_K: temperatures.mtt_K,
      interval_K: null,
      rounding: "down",
      tone: "limit",
      shape: "square",
      missing: "",
    },
    {
      name: "T_D24",
      meaning: "decomposition in 24 h",
      value_K: temperatures.td24_K,
      interval_K: intervalOf(uncertainty?.td24_K),
      rounding: "down",
      tone: "decomposition",
      shape: "triangle",
      missing:
        heat.decompositionRise_K === null ? "not known: no decomposition data" : "none in the range computed",
    },
  ];
}

/** A rung with its value and its interval; nothing where it has no value. */
export function inWords({ name, value_K, interval_K, rounding }: Rung): string {
  if (value_K === null) return "";
  const interval =
    interval_K === null
      ? ""
      : ` (${temperatureNumber(interval_K[0], rounding)} to ${temperatureNumber(interval_K[1], rounding)})`;
  return `${name} ${temperatureText(value_K, rounding)}${interval}`;
}

/** The rungs as rows of a figure, the coldest first; those without a value last, in words. */
export function ladderLanes(findings: Findings): Lane[] {
  const rungs = rungsOf(findings);
  const known = rungs.flatMap((rung) => (rung.value_K === null ? [] : [{ ...rung, value_K: rung.value_K }]));
  known.sort((a, b) => a.value_K - b.value_K);
  const missing = rungs.filter((rung) => rung.value_K === null);
  return [
    ...known.map((rung) => {
      const mark: LaneMark = {
        value: celsius(rung.value_K),
        interval:
          rung.interval_K === null ? null : [celsius(rung.interval_K[0]), celsius(rung.interval_K[1])],
        tone: rung.tone,
        shape: rung.shape,
        text: inWords(rung),
        dropped: true,
      };
      return rungLane(rung.meaning, [mark], null);
    }),
    ...missing.map((rung) => rungLane(rung.meaning, [], `${rung.name} ${rung.missing}`)),
  ];
}

/** A thin lane for one rung. */
export function rungLane(label: string, marks: readonly LaneMark[], text: string | null): Lane {
  return {
    label,
    detail: null,
    height: "rung",
    apart: false,
    spans: [],
    marks,
    text,
    verdict: null,
  };
}

/**
 * The temperatures that a ladder's axis must show, K: the values, and their intervals as far as these do not
 * squeeze the values together. An MTSR far beyond all else, or the end of an interval, is an arrow at the edge.
 *
 * @param more what else lies on the axis, K
 */
export function ladderReach(findings: Findings, more: readonly number[] = []): number[] {
  const rungs = rungsOf(findings);
  const { mtsr_K } = findings.temperatures;
  const others = rungs.flatMap(({ value_K }) => (value_K === null || value_K === mtsr_K ? [] : [value_K]));
  others.push(...more);
  const span = Math.max(40, Math.max(...others) - Math.min(...others));
  const values = mtsr_K === null ? others : [...others, Math.min(mtsr_K, Math.max(...others) + 1.5 * span)];
  const low = Math.min(...values);
  const high = Math.max(...values);
  const beyond = Math.max(20, 0.5 * (high - low));
  const intervals = rungs.flatMap((rung) => rung.interval_K ?? []);
  return [...values, ...intervals.map((each) => Math.min(high + beyond, Math.max(low - beyond, each)))];
}

/** Which of the four there are and in what order, in one sentence with the class that follows from it. */
export function ladderSentence(findings: Findings): string {
  const rungs = rungsOf(findings);
  const known = rungs.filter((rung) => rung.value_K !== null);
  known.sort((a, b) => (a.value_K ?? 0) - (b.value_K ?? 0));
  const missing = rungs.filter((rung) => rung.value_K === null);
  const { class: criticality } = findings.criticality;
  const verdict =
    criticality === null
      ? "A criticality class is not assessed."
      : criticality === "none"
        ? "The planned temperature is not below both limits, so that no criticality class applies: stop."
        : `This order is criticality class ${criticality}.`;
  const absent = missing.map((rung) => ` ${rung.name} ${rung.missing}.`).join("");
  return `From cold to hot: ${known.map((rung) => inWords(rung)).join(", ")}.${absent} ${verdict}`;
}

/** The same as a table, as far as the four go. */
export function ladderTable(findings: Findings): Figure["table"] {
  return {
    columns: ["Temperature", "Meaning", "Value, °C", "5 % to 95 % of the draws, °C"],
    rows: rungsOf(findings).map(({ name, meaning, value_K, interval_K, rounding, missing }) => [
      name,
      meaning,
      value_K === null ? missing : temperatureNumber(value_K, rounding),
      interval_K === null
        ? "none"
        : `${temperatureNumber(interval_K[0], rounding)} to ${temperatureNumber(interval_K[1], rounding)}`,
    ]),
  };
}

/** What the bars on the rungs mean; nothing where there are none. */
export function ladderCaptions(findings: Findings): string[] {
  return rungsOf(findings).some((rung) => rung.interval_K !== null)
    ? [
        `Bars: 5th to 95th percentile of ${findings.uncertainty?.draws ?? 0} draws from the given standard errors.`,
      ]
    : [];
}

/** The case's four temperatures on one axis. */
export function ladder(findings: Findings): Figure {
  return {
    id: "ladder",
    title: "Temperature ladder",
    sentence: ladderSentence(findings),
    panels: [
      {
        type: "lanes",
        xAxis: temperatureAxis(ladderReach(findings)),
        axisShown: true,
        lanes: ladderLanes(findings),
        marks: [],
        key: [],
      },
    ],
    captions: ladderCaptions(findings),
    table: ladderTable(findings),
  };
}
