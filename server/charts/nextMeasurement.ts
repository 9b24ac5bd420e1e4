import type { NextMeasurementFindings } from "../screening/decisionFindings.js";
import type { Findings } from "../screening/findings.js";
import { numberText, percentText, temperatureNumber, temperatureText } from "../words/numbers.js";
import type { Axis, Figure, PlotPanel, Tone } from "./figure.js";
import { celsius, evenly, temperatureAxis } from "./temperatureAxis.js";

interface Named {
  readonly of: string;
  readonly place: string;
  readonly tone: Tone;
  readonly next: NextMeasurementFindings;
}

/** A measurement that helps. */
interface Advice {
  readonly at: number;
  readonly now: number;
  readonly after: number;
}

function adviceOf({ at_K, deviationNow, deviationThen }: NextMeasurementFindings): Advice | null {
  return at_K === null || deviationNow === null || deviationThen === null
    ? null
    : { at: at_K, now: deviationNow, after: deviationThen };
}

function panelOf({ place, tone, next }: Named, { at, now, after }: Advice): PlotPanel {
  const xAxis: Axis = temperatureAxis(
    next.curve.map((each) => each.temperature_K),
    "Temperature of the new measurement, °C",
  );
  return {
    type: "plot",
    height: 110,
    xAxis,
    yAxis: { scale: "linear", domain: [0, 1.15 * now], label: `± of ln k at ${place}` },
    marks: [
      {
        type: "rule",
        across: "y",
        value: now,
        tone: "quiet",
        dash: "dotted",
        weight: "normal",
        label: `now ${numberText(now, 2)}`,
      },
      {
        type: "line",
        tone,
        dash: "solid",
        weight: "normal",
        points: evenly(next.curve, 17).map((each) => [celsius(each.temperature_K), each.deviation]),
      },
      {
        type: "note",
        x: celsius(at),
        y: after,
        tone,
        shape: "circle",
        text: `${numberText(after, 2)} at ${temperatureText(at)}`,
      },
    ],
  };
}

function sentenceOf({ of, place, next }: Named): string {
  const advice = adviceOf(next);
  if (advice === null) return `For ${of} nothing is advised. ${next.why ?? ""}`.trimEnd();
  const from = next.relativeErrorFrom === "fit" ? "the scatter of the fit" : "assumed";
  const range = (next.range_K ?? []).map((each) => temperatureText(each)).join(" to ");
  const matters = next.matters_K === null ? place : `${place} (${temperatureText(next.matters_K)})`;
  return `Of ${of}, one more rate constant at ${temperatureText(advice.at)}, good to ${percentText(next.relativeError)} (${from}), would lower the standard deviation of ln k at ${matters} from ${numberText(advice.now, 2)} to ${numberText(advice.after, 2)}: the most that can be had within the fitted range, ${range}.`;
}

/**
 * What one more rate constant would tell, over the temperature at which it is measured.
 *
 * @returns null where nothing can be advised
 */
export function nextMeasurement(findings: Findings): Figure | null {
  const found = findings.uncertainty?.nextMeasurement;
  const named: Named[] = [];
  if (found?.reaction)
    named.push({ of: "the reaction", place: "Tp", tone: "reaction", next: found.reaction });
  if (found?.decomposition)
    named.push({ of: "the decomposition", place: "T_D24", tone: "decomposition", next: found.decomposition });
  const panels = named.flatMap((each) => {
    const advice = adviceOf(each.next);
    return advice === null ? [] : [panelOf(each, advice)];
  });
  if (panels.length === 0) return null;
  return {
    id: "next-measurement",
    title: "What to measure next",
    sentence: named.map(sentenceOf).join(" "),
    panels,
    captions: [],
    table: {
      columns: ["Rate constant of", "Measured at, °C", "Deviation of ln k then"],
      rows: named.flatMap(({ of, next }) =>
        evenly(next.curve, 5).map((each) => [
          of,
          temperatureNumber(each.temperature_K),
          numberText(each.deviation, 3),
        ]),
      ),
    },
  };
}
