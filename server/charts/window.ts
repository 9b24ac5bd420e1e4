import type { Findings, Spans, WindowFindings } from "../screening/findings.js";
import { differenceText, temperatureNumber, temperatureText } from "../words/numbers.js";
import type { Area, Figure, Lane, LaneSpan, Rule, Tone } from "./figure.js";
import { ladderCaptions, ladderLanes, ladderReach, ladderSentence, ladderTable } from "./ladder.js";
import { celsius, temperatureAxis } from "./temperatureAxis.js";
import { criteriaRows, meanings, spanText, verdictOf, windowSentence } from "./windowWords.js";

type Criterion = WindowFindings["criteria"][number];

function inCelsius([from, to]: readonly [number, number], style: Omit<LaneSpan, "from" | "to">): LaneSpan {
  return { from: celsius(from), to: celsius(to), ...style };
}

/** The estimate as a light bar, the cautious side as a darker and narrower one in it. */
function spansOf(allowed: Spans, cautious: Spans | null, tone: Tone): LaneSpan[] {
  return [
    ...allowed.map((each) => inCelsius(each, { fill: "tint", tone, breadth: 1, outlined: true })),
    ...(cautious ?? []).map((each) =>
      inCelsius(each, { fill: "solid", tone, breadth: 0.42, outlined: false }),
    ),
  ];
}

function criterionLane(criterion: Criterion, { lowest_K, highest_K }: WindowFindings, apart: boolean): Lane {
  const { key, label, assessed, allowed, cautious, binding } = criterion;
  const everywhere = inCelsius([lowest_K, highest_K], {
    fill: "hatched",
    tone: "quiet",
    breadth: 1,
    outlined: true,
  });
  return {
    label,
    detail: meanings[key] ?? null,
    height: "lane",
    apart,
    spans: assessed ? spansOf(allowed, cautious, binding ? "reaction" : "quiet") : [everywhere],
    marks: [],
    text: assessed ? (allowed.length === 0 ? "holds nowhere in the range studied" : null) : "not assessed",
    verdict: verdictOf(criterion),
  };
}

/** What all criteria leave, at the estimate and on the cautious side. */
export function windowLane(window: WindowFindings): Lane {
  const { lower_K, upper_K, cautious, allowed } = window;
  const left = lower_K === null || upper_K === null ? null : ([lower_K, upper_K] as const);
  const others = allowed.filter((part) => left === null || part[0] !== left[0]);
  const careful: Spans | null =
    cautious === null || cautious.lower_K === null || cautious.upper_K === null
      ? null
      : [[cautious.lower_K, cautious.upper_K]];
  return {
    label: "what all of them leave",
    detail: left === null ? "nothing" : spanText(left),
    height: "thick",
    apart: true,
    spans: [
      ...others.map((part) =>
        inCelsius(part, {
          fill: "pale",
          tone: "plan",
          breadth: 1,
          outlined: true,
        }),
      ),
      ...spansOf(left === null ? [] : [left], careful, "plan"),
    ],
    marks: [],
    text: left === null ? "nothing is left" : null,
    verdict: window.containsProcess ? "Tp inside" : "Tp OUTSIDE",
  };
}

function marksOf({ temperatures, rate }: Findings, window: WindowFindings): (Rule | Area)[] {
  const process = celsius(temperatures.process_K);
  const band = window.controlBand_K;
  const limit = (kelvin: number): Rule => ({
    type: "rule",
    across: "x",
    value: celsius(kelvin),
    tone: "quiet",
    dash: "longdash",
    weight: "thin",
  });
  const fitted = (kelvin: number): Rule => ({
    ...limit(kelvin),
    tone: "removal",
    dash: "dashdot",
    weight: "normal",
  });
  const marks: (Rule | Area)[] = [];
  if (band > 0)
    marks.push({
      type: "area",
      across: "x",
      from: process - band,
      to: process + band,
      fill: "pale",
      tone: "plan",
      name: `control band ± ${differenceText(band)}`,
    });
  marks.push(
    {
      type: "rule",
      across: "x",
      value: process,
      tone: "plan",
      dash: "solid",
      weight: "normal",
      name: `planned, ${temperatureText(temperatures.process_K)}`,
    },
    {
      ...limit(window.lowest_K),
      name: `limits of the study, ${temperatureNumber(window.lowest_K)} to ${temperatureText(window.highest_K)}`,
    },
    limit(window.highest_K),
  );
  if (rate?.fittedRange_K) {
    const [low, high] = rate.fittedRange_K;
    marks.push(
      {
        ...fitted(low),
        name: `fitted range of the rate constant, ${temperatureNumber(low)} to ${temperatureText(high)}`,
      },
      fitted(high),
    );
  }
  return marks;
}

function keyOf(window: WindowFindings): (Area & { readonly name: string })[] {
  const sample = (fill: Area["fill"], tone: Tone, name: string) =>
    ({ type: "area", across: "x", from: 0, to: 0, fill, tone, name }) as const;
  const careful = window.criteria.some((each) => each.cautious !== null);
  return [
    sample("tint", "reaction", "allowed at the estimate"),
    ...(careful ? [sample("solid", "reaction", "allowed on the cautious side (95 % of the draws)")] : []),
    ...(window.criteria.some((each) => !each.assessed) ? [sample("hatched", "quiet", "not assessed")] : []),
  ];
}

/** The main picture: the ladder and, along the same axis, a lane for each criterion of the window. */
export function windowFigure(findings: Findings, window: WindowFindings): Figure {
  const xAxis = temperatureAxis(ladderReach(findings, [window.lowest_K, window.highest_K]));
  const binding = window.criteria.filter((each) => each.binding);
  const advisory = window.criteria.filter((each) => !each.binding);
  const ladder = ladderTable(findings);
  return {
    id: "window",
    title: "Temperatures and window",
    sentence: `${windowSentence(findings, window)} ${ladderSentence(findings)}`,
    panels: [
      {
        type: "lanes",
        xAxis,
        axisShown: false,
        lanes: ladderLanes(findings),
        marks: [],
        key: [],
      },
      {
        type: "lanes",
        xAxis,
        axisShown: true,
        lanes: [
          ...binding.map((each, at) => criterionLane(each, window, at === 0)),
          ...advisory.map((each, at) => criterionLane(each, window, at === 0)),
          windowLane(window),
        ],
        marks: marksOf(findings, window),
        key: keyOf(window),
      },
    ],
    captions: ladderCaptions(findings),
    table: {
      columns: [
        "Temperature or criterion",
        "Value or allowed span, °C",
        "5 % to 95 %, or cautious side, °C",
        "At Tp",
      ],
      rows: [
        ...ladder.rows.map(([name = "", meaning = "", value = "", interval = ""]) => [
          `${name}: ${meaning}`,
          value,
          interval,
          "",
        ]),
        ...criteriaRows(window),
      ],
    },
  };
}
