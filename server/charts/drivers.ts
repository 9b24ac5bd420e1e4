import type { DriverFindings } from "../screening/decisionFindings.js";
import type { Findings } from "../screening/findings.js";
import { percentText } from "../words/numbers.js";
import type { Axis, Figure, Lane } from "./figure.js";

const names: Readonly<Record<DriverFindings["output"], string>> = {
  td24_K: "T_D24",
  mtsr_K: "MTSR",
  upper_K: "Upper end of the window",
};

interface Weighed {
  readonly label: string;
  readonly share: number;
}

function weighedIn({ shares }: DriverFindings): Weighed[] {
  return shares.flatMap(({ label, share }) => (share === null ? [] : [{ label, share }]));
}

/** Shares that are drawn as bars; the table holds all of them. */
const leastDrawn = 0.005;

const lane = { detail: null, marks: [], apart: false, text: null, verdict: null, spans: [] } as const;

function lanesOf(driver: DriverFindings, at: number): Lane[] {
  const bars = weighedIn(driver).filter(({ share }) => share >= leastDrawn);
  return [
    {
      ...lane,
      label: names[driver.output],
      height: "thick",
      apart: at > 0,
      text: bars.length > 0 ? null : driver.why === null ? "not moved by any error" : "shares not told",
    },
    ...bars.map(
      ({ label, share }): Lane => ({
        ...lane,
        label,
        height: "rung",
        spans: [{ from: 0, to: share * 100, fill: "solid", tone: "quiet", breadth: 0.7, outlined: false }],
        verdict: percentText(share),
      }),
    ),
  ];
}

function sentenceOf(drivers: readonly DriverFindings[]): string {
  const each = drivers.map((driver) => {
    const name = names[driver.output];
    if (driver.why !== null) return `${name}: ${lowered(driver.why)}`;
    const [first] = weighedIn(driver);
    return first === undefined || first.share === 0
      ? `${name} is not moved by any error.`
      : `${name} is moved most by the ${first.label} (${percentText(first.share)} of its squared spread).`;
  });
  const bare = new Set(
    drivers.flatMap(({ shares }) => shares.flatMap(({ label, share }) => (share === null ? [label] : []))),
  );
  const unweighed =
    bare.size === 0
      ? ""
      : ` Not weighed, although something here depends on them, because no usable error is typed: ${[...bare].join(", ")}.`;
  return `${each.join(" ")}${unweighed}`;
}

function lowered(sentence: string): string {
  return sentence.charAt(0).toLowerCase() + sentence.slice(1);
}

/**
 * What moves the figures that decide, as bars.
 *
 * @returns null where no input carries an error that moves any of them
 */
export function drivers(findings: Findings): Figure | null {
  const found = findings.uncertainty?.drivers ?? [];
  if (found.every((each) => each.why === null && weighedIn(each).every(({ share }) => share === 0)))
    return null;
  const xAxis: Axis = { scale: "linear", domain: [0, 100], label: "Share of the squared spread, %" };
  return {
    id: "drivers",
    title: "What drives the result",
    sentence: sentenceOf(found),
    panels: [{ type: "lanes", xAxis, axisShown: true, lanes: found.flatMap(lanesOf), marks: [], key: [] }],
    captions: [],
    table: {
      columns: ["Figure", "Input", "Share"],
      rows: found.flatMap(({ output, shares }) =>
        shares
          .filter(({ share }) => share !== 0)
          .map(({ label, share }) => [
            names[output],
            label,
            share === null ? "no error, not weighed" : percentText(share),
          ]),
      ),
    },
  };
}
