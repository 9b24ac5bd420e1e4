import { describe, expect, test } from "vitest";
import { drivers } from "../../server/charts/drivers.js";
import type { Figure } from "../../server/charts/figure.js";
import { layout } from "../../server/charts/layout.js";
import { nextMeasurement } from "../../server/charts/nextMeasurement.js";
import type { NextMeasurementFindings } from "../../server/screening/decisionFindings.js";
import type { Findings } from "../../server/screening/findings.js";
import { inventedWhole } from "./inventedWhole.js";

type Uncertainty = NonNullable<Findings["uncertainty"]>;

function withUncertainty(part: Partial<Uncertainty>): Findings {
  const { uncertainty } = inventedWhole;
  if (uncertainty === null) throw new Error("the invented case is drawn");
  return { ...inventedWhole, uncertainty: { ...uncertainty, ...part } };
}

function words(figure: Figure | null): string[] {
  if (figure === null) throw new Error("there is no figure");
  return layout(figure).primitives.flatMap((each) => (each.kind === "text" ? [each.text] : []));
}

const share = (label: string, value: number | null) => ({ pointer: `/${label}`, label, share: value });

describe("the bars of the drivers", () => {
  const figure = drivers(
    withUncertainty({
      drivers: [
        {
          output: "td24_K",
          shares: [share("mass", null), share("pair", 0.9), share("heat", 0.1), share("order", 0)],
          why: null,
        },
        { output: "upper_K", shares: [], why: "The error alone is too large: heat. No shares are told." },
      ],
    }),
  );

  test("are as long as the shares, and say them", () => {
    const [panel] = figure?.panels ?? [];
    if (panel?.type !== "lanes") throw new Error("not lanes");
    expect(panel.lanes.flatMap((lane) => lane.spans.map((span) => span.to))).toEqual([90, 10]);
    expect(words(figure)).toEqual(expect.arrayContaining(["T_D24", "pair", "90 %", "heat", "10 %"]));
  });

  test("come with what could not be weighed, in the sentence and first in the table", () => {
    expect(figure?.sentence).toContain("moved most by the pair (90 %");
    expect(figure?.sentence).toContain("no usable error is typed: mass.");
    expect(figure?.sentence).toContain("Upper end of the window: the error alone is too large");
    expect(figure?.table.rows[0]).toEqual(["T_D24", "mass", "no error, not weighed"]);
  });

  test("are left out where no error moves anything", () => {
    const shares = [share("mass", null), share("heat", 0)];
    expect(drivers(withUncertainty({ drivers: [{ output: "td24_K", shares, why: null }] }))).toBeNull();
    expect(drivers(withUncertainty({ drivers: null }))).toBeNull();
  });
});

describe("the figure of the next measurement", () => {
  const advised: NextMeasurementFindings = {
    at_K: 413.15,
    relativeError: 0.05,
    relativeErrorFrom: "assumed",
    range_K: [413.15, 463.15],
    matters_K: 361.15,
    deviationNow: 0.22,
    deviationThen: 0.17,
    curve: [
      { temperature_K: 413.15, deviation: 0.17 },
      { temperature_K: 438.15, deviation: 0.21 },
      { temperature_K: 463.15, deviation: 0.19 },
    ],
    why: null,
  };
  const untold: NextMeasurementFindings = {
    ...advised,
    at_K: null,
    deviationNow: null,
    deviationThen: null,
    curve: [],
    why: "The correlation is not known.",
  };

  test("names the place, what it brings, and what was assumed", () => {
    const figure = nextMeasurement(
      withUncertainty({ nextMeasurement: { reaction: untold, decomposition: advised } }),
    );
    expect(figure?.panels).toHaveLength(1);
    expect(words(figure)).toEqual(expect.arrayContaining(["0.17 at 140.0 °C", "now 0.22"]));
    expect(figure?.sentence).toContain("at 140.0 °C, good to 5.0 % (assumed)");
    expect(figure?.sentence).toContain("T_D24 (88.0 °C) from 0.22 to 0.17");
    expect(figure?.sentence).toContain("For the reaction nothing is advised. The correlation is not known.");
  });

  test("is left out where nothing can be advised", () => {
    const neither = { reaction: untold, decomposition: null };
    expect(nextMeasurement(withUncertainty({ nextMeasurement: neither }))).toBeNull();
    expect(nextMeasurement(withUncertainty({ nextMeasurement: null }))).toBeNull();
  });
});
