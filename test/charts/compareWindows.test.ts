import { describe, expect, test } from "vitest";
import { compareWindows } from "../../server/charts/compareWindows.js";
import type { LanesPanel } from "../../server/charts/figure.js";
import { layout } from "../../server/charts/layout.js";
import { drawSvg } from "../../server/charts/svg.js";
import type { Findings } from "../../server/screening/findings.js";
import { inventedBatch } from "./invented.js";
import { inventedWhole } from "./inventedWhole.js";
import { screened } from "./screened.js";

const whole = { title: "Whole", findings: inventedWhole };
const batch = { title: "Batch", findings: inventedBatch };

function lanes(first: Findings, second: Findings) {
  const figure = compareWindows({ title: "One", findings: first }, { title: "Other", findings: second });
  return { figure, panels: figure.panels as readonly LanesPanel[] };
}

/** A case with another window. */
function leaving(lower_K: number | null, upper_K: number | null): Findings {
  const { window } = inventedWhole;
  if (window === null) throw new Error("no window");
  return { ...inventedWhole, window: { ...window, lower_K, upper_K, allowed: [], cautious: null } };
}

describe("two windows on one axis", () => {
  test("all panels share it, and it reaches over everything that either case studied", () => {
    const { panels } = lanes(inventedWhole, inventedBatch);
    expect(new Set(panels.map(({ xAxis }) => xAxis)).size).toBe(1);
    const [low = 0, high = 0] = panels[0]?.xAxis.domain ?? [];
    for (const { window, temperatures } of [inventedWhole, inventedBatch]) {
      for (const kelvin of [window?.lowest_K, window?.highest_K, temperatures.process_K]) {
        if (kelvin === undefined) continue;
        expect(kelvin - 273.15).toBeGreaterThan(low);
        expect(kelvin - 273.15).toBeLessThan(high);
      }
    }
  });

  test("a temperature that both cases share has one lane, others one for each case", () => {
    const same = lanes(inventedWhole, inventedWhole).panels[0]?.lanes.map(({ label }) => label);
    expect(same).toEqual(["Tp, both", "MTSR, both", "MTT, both", "T_D24, both"]);
    const warmer = {
      ...inventedWhole,
      temperatures: { ...inventedWhole.temperatures, process_K: inventedWhole.temperatures.process_K + 5 },
    };
    const apart = lanes(inventedWhole, warmer);
    expect(apart.panels[0]?.lanes.map(({ label }) => label).slice(0, 2)).toEqual(["Tp, first", "Tp, second"]);
    expect(apart.panels[1]?.marks.map((mark) => mark.type === "rule" && mark.dash)).toEqual([
      "solid",
      "dashed",
    ]);
  });

  test("what lies in both is said with its ends rounded inwards", () => {
    const { figure } = lanes(leaving(300.01, 330.09), leaving(310.01, 350));
    expect(figure.sentence).toContain("The first window is 26.9 to 56.9 °C, 30.0 K wide");
    expect(figure.sentence).toContain("36.9 to 56.9 °C lies in both.");
    expect(lanes(leaving(300, 310), leaving(310, 320)).figure.sentence).toContain(
      "No temperature lies in both.",
    );
    expect(lanes(leaving(300, 310), leaving(null, null)).figure.sentence).toContain(
      "The second window is empty",
    );
  });

  test("a window that is missing or empty is said in its lane", () => {
    const none = lanes({ ...inventedWhole, window: null }, leaving(null, null));
    expect(none.panels[1]?.lanes.map(({ text }) => text)).toEqual(["not assessed", "nothing is left"]);
    expect(none.figure.table.rows.at(-1)).toEqual([
      "Window",
      "not assessed",
      expect.stringMatching(/^nothing/),
    ]);
  });
});

const all = Object.entries(screened());

test.each(all.flatMap(([one, first]) => all.map(([other, second]) => [one, other, first, second] as const)))(
  "%s and %s are drawn without words on each other's place, and with their numbers",
  (one, other, first, second) => {
    const figure = compareWindows({ title: one, findings: first }, { title: other, findings: second });
    for (const row of figure.table.rows) expect(row).toHaveLength(figure.table.columns.length);
    const svg = drawSvg(figure);
    expect(svg).not.toMatch(/NaN|Infinity|undefined|null/);
    for (const width of ["wide", "narrow"] as const) {
      const places = layout(figure, width).primitives.flatMap((each) =>
        each.kind === "text" ? [`${each.x} ${each.y} ${each.anchor}`] : [],
      );
      expect(new Set(places).size).toBe(places.length);
    }
  },
);

test("its captions name both cases", () => {
  expect(compareWindows(whole, batch).captions.slice(0, 2)).toEqual(["First: Whole", "Second: Batch"]);
});
