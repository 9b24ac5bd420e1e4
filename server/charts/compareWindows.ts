import type { Findings } from "../screening/findings.js";
import { temperatureText } from "../words/numbers.js";
import { compareSentence, windowCell } from "./compareWords.js";
import type { Area, Figure, Lane, LaneMark, LanesPanel, Rule } from "./figure.js";
import { inWords, ladderCaptions, ladderReach, type Rung, rungLane, rungsOf } from "./ladder.js";
import { celsius, temperatureAxis } from "./temperatureAxis.js";
import { windowLane } from "./window.js";

/** A case that is held against another one. */
export interface ComparedCase {
  readonly title: string;
  readonly findings: Findings;
}

const sides = ["first", "second"] as const;

/** One temperature of both cases: a lane for each, or one where they agree. */
function pairOfLanes(first: Rung, second: Rung): Lane[] {
  const same = inWords(first) === inWords(second) && first.missing === second.missing;
  const pair = same ? [first] : [first, second];
  return pair.map((rung, side) => ({
    ...laneOf(rung, `${rung.name}, ${same ? "both" : sides[side]}`),
    apart: side === 0 && rung.name !== "Tp",
  }));
}

function laneOf(rung: Rung, label: string): Lane {
  if (rung.value_K === null) return rungLane(label, [], rung.missing);
  const mark: LaneMark = {
    value: celsius(rung.value_K),
    interval: rung.interval_K === null ? null : [celsius(rung.interval_K[0]), celsius(rung.interval_K[1])],
    tone: rung.tone,
    shape: rung.shape,
    text: inWords(rung),
    dropped: false,
  };
  return rungLane(label, [mark], null);
}

function laneOfWindow({ window }: Findings, side: 0 | 1): Lane {
  const label = `window, ${sides[side]}`;
  if (window === null) {
    return { ...rungLane(label, [], "not assessed"), height: "thick", apart: side === 0 };
  }
  return { ...windowLane(window), label, apart: side === 0 };
}

/** The planned temperatures, across both windows. */
function plans(cases: readonly [ComparedCase, ComparedCase]): Rule[] {
  const [first, second] = cases.map(({ findings }) => findings.temperatures.process_K) as [number, number];
  const rule = (kelvin: number, side: 0 | 1, whose: string): Rule => ({
    type: "rule",
    across: "x",
    value: celsius(kelvin),
    tone: "plan",
    dash: side === 0 ? "solid" : "dashed",
    weight: "normal",
    name: `planned, ${whose}: ${temperatureText(kelvin)}`,
  });
  return first === second ? [rule(first, 0, "both")] : [rule(first, 0, sides[0]), rule(second, 1, sides[1])];
}

function keyOf(cases: readonly [ComparedCase, ComparedCase]): LanesPanel["key"] {
  const sample = (fill: Area["fill"], name: string) =>
    ({ type: "area", across: "x", from: 0, to: 0, fill, tone: "plan", name }) as const;
  const careful = cases.some(({ findings }) => findings.window?.cautious != null);
  return [
    sample("tint", "left at the estimate"),
    ...(careful ? [sample("solid", "left on the cautious side (95 % of the draws)")] : []),
  ];
}

/** What the bars mean, once where it is the same for both. */
function barsOf(first: ComparedCase, second: ComparedCase): string[] {
  return [...new Set([...ladderCaptions(first.findings), ...ladderCaptions(second.findings)])];
}

/** The temperatures and the windows of two cases on one axis. */
export function compareWindows(first: ComparedCase, second: ComparedCase): Figure {
  const cases = [first, second] as const;
  const [ones, others] = [rungsOf(first.findings), rungsOf(second.findings)];
  const reach = cases.flatMap(({ findings }) => {
    const { window } = findings;
    return ladderReach(findings, window === null ? [] : [window.lowest_K, window.highest_K]);
  });
  const xAxis = temperatureAxis(reach);
  const pairs = ones.map((rung, at) => [rung, others[at] ?? rung] as const);
  return {
    id: "compare-windows",
    title: "Both windows on one axis",
    sentence: compareSentence(first.findings, second.findings),
    panels: [
      {
        type: "lanes",
        xAxis,
        axisShown: false,
        lanes: pairs.flatMap(([one, other]) => pairOfLanes(one, other)),
        marks: [],
        key: [],
      },
      {
        type: "lanes",
        xAxis,
        axisShown: true,
        lanes: [laneOfWindow(first.findings, 0), laneOfWindow(second.findings, 1)],
        marks: plans(cases),
        key: keyOf(cases),
      },
    ],
    captions: [`First: ${first.title}`, `Second: ${second.title}`, ...barsOf(first, second)],
    table: {
      columns: ["Temperature", "First", "Second"],
      rows: [
        ...pairs.map(([one, other]) => [
          `${one.name}: ${one.meaning}`,
          inWords(one) || one.missing,
          inWords(other) || other.missing,
        ]),
        ["Window", windowCell(first.findings), windowCell(second.findings)],
      ],
    },
  };
}
