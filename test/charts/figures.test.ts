import { describe, expect, test } from "vitest";
import type { Figure, LanesPanel, Line, PlotPanel } from "../../server/charts/figure.js";
import { figuresOf } from "../../server/charts/figures.js";
import { layout } from "../../server/charts/layout.js";
import type { Findings } from "../../server/screening/findings.js";
import { inventedBare, inventedBatch, zero } from "./invented.js";
import { inventedDosed } from "./inventedDosed.js";
import { inventedWhole } from "./inventedWhole.js";

function figure(findings: Findings, id: string): Figure {
  const found = figuresOf(findings).find((each) => each.id === id);
  if (found === undefined) throw new Error(`there is no figure ${id}`);
  return found;
}

function plot(of: Figure, at = 0): PlotPanel {
  const panel = of.panels[at];
  if (panel?.type !== "plot") throw new Error("not a plot");
  return panel;
}

function lanes(of: Figure, at = 0): LanesPanel {
  const panel = of.panels[at];
  if (panel?.type !== "lanes") throw new Error("not lanes");
  return panel;
}

function words(of: Figure): string[] {
  return layout(of).primitives.flatMap((each) => (each.kind === "text" ? [each.text] : []));
}

describe("which figures there are", () => {
  test("a case with everything has all of them in the order of the page", () => {
    expect(figuresOf(inventedWhole).map((each) => each.id)).toEqual([
      "window",
      "rate",
      "decomposition-rate",
      "tmrad",
      "dosing",
      "heat",
      "feed-lever",
      "failures",
      "vulnerable-2",
    ]);
  });

  test("without a window the ladder stands alone, and a fit brings its residuals", () => {
    expect(figuresOf(inventedBatch).map((each) => each.id)).toEqual([
      "ladder",
      "rate",
      "rate-residuals",
      "decomposition-rate",
      "tmrad",
    ]);
  });

  test("where hardly anything is known the ladder says what is missing", () => {
    const [only, ...others] = figuresOf(inventedBare);
    expect(others).toEqual([]);
    expect(only?.id).toBe("ladder");
    expect(words(only as Figure)).toContain("T_D24 not known: no decomposition data");
    expect(words(only as Figure)).toContain("MTSR not computed");
    expect(only?.sentence).toContain("A criticality class is not assessed.");
  });

  test("ids are unique and fit for an address", () => {
    const ids = figuresOf(inventedWhole).map((each) => each.id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const id of ids) expect(id).toMatch(/^[a-z][a-z0-9-]*$/);
  });
});

describe("the ladder", () => {
  test("stands the four temperatures from cold to hot, each rounded towards caution", () => {
    const texts = lanes(figure(inventedBatch, "ladder")).lanes.map((lane) => lane.marks[0]?.text);
    expect(texts).toEqual([
      "Tp 85.0 °C",
      "T_D24 88.1 °C (78.1 to 97.6)",
      "MTSR 158.4 °C (153.0 to 163.9)",
      "MTT 165.0 °C",
    ]);
  });

  test("draws an MTSR far beyond all else as an arrow at the edge instead of squeezing the others", () => {
    const hot: Findings = {
      ...inventedBatch,
      uncertainty: null,
      temperatures: { ...inventedBatch.temperatures, mtsr_K: 2579 },
    };
    const ladder = figure(hot, "ladder");
    const [from, to] = lanes(ladder).xAxis.domain;
    expect(to - from).toBeLessThan(300);
    expect(words(ladder)).toContain("MTSR 2305.9 °C");
  });

  test("cuts an interval that would squeeze the values, and keeps its numbers", () => {
    const wide: Findings = {
      ...inventedBatch,
      uncertainty: {
        ...(inventedBatch.uncertainty as NonNullable<Findings["uncertainty"]>),
        td24_K: { p05: 200, p50: 361, p95: 800 },
      },
    };
    const ladder = figure(wide, "ladder");
    const [from, to] = lanes(ladder).xAxis.domain;
    expect(to - from).toBeLessThan(250);
    expect(words(ladder)).toContain("T_D24 88.1 °C (−73.2 to 526.8)");
  });
});

describe("the window", () => {
  const window = figure(inventedDosed, "window");
  const lane = (label: string) => lanes(window, 1).lanes.find((each) => each.label === label);

  test("shares one axis with the ladder above it", () => {
    expect(lanes(window, 0).xAxis).toBe(lanes(window, 1).xAxis);
    expect(lanes(window, 0).axisShown).toBe(false);
  });

  test("has a lane for each criterion, the advisory one apart, and last what all of them leave", () => {
    const found = lanes(window, 1).lanes;
    expect(found.map((each) => each.label)).toEqual([
      "done in time",
      "cooling suffices",
      "MTSR below MTT",
      "TMRad from MTSR",
      "TMRad from Tp",
      "steadies itself",
      "what all of them leave",
    ]);
    expect(found.filter((each) => each.apart).map((each) => each.label)).toEqual([
      "done in time",
      "steadies itself",
      "what all of them leave",
    ]);
  });

  test("draws the allowed span and, inside it and darker, the cautious one", () => {
    const [estimate, cautious] = lane("cooling suffices")?.spans ?? [];
    expect(estimate).toMatchObject({ fill: "tint" });
    expect(cautious).toMatchObject({ fill: "solid" });
    expect(estimate?.from).toBeCloseTo(30.4, 9);
    expect(cautious?.from).toBeCloseTo(33.4, 9);
    expect(cautious?.breadth ?? 1).toBeLessThan(estimate?.breadth ?? 0);
  });

  test("hatches a lane that was not assessed and says so", () => {
    const open = lane("TMRad from MTSR");
    expect(open?.spans.map((span) => span.fill)).toEqual(["hatched"]);
    expect(open?.text).toBe("not assessed");
    expect(open?.verdict).toBe("not assessed");
    expect(window.sentence).toContain(
      "Not assessed for want of data: TMRad from MTSR; the window is incomplete.",
    );
  });

  test("says the ends rounded inwards, what lies beyond them, and where the plan stands", () => {
    expect(window.sentence).toMatch(
      /^Between 30\.4 and 74\.9 °C every assessed criterion holds; below, the duty exceeds what the cooling may give; above, MTSR passes MTT\. The planned 35\.0 °C ± 2\.0 K is inside\./,
    );
  });

  test("marks the plan, its band, the fitted range and the limits of the study across all lanes", () => {
    const marks = lanes(window, 1).marks;
    const rules = marks.flatMap((mark) => (mark.type === "rule" ? [mark.value] : []));
    expect(rules.map((value) => Math.round(value * 1e6) / 1e6)).toEqual([35, 0, 80, 5, 30]);
    expect(marks.find((mark) => mark.type === "area")).toMatchObject({ name: "control band ± 2.0 K" });
  });

  test("an empty window says why, and a criterion it has no words for is named by its label", () => {
    const base = inventedDosed.window as NonNullable<Findings["window"]>;
    const empty = { ...base, lower_K: null, upper_K: null, lowerSetBy: null, upperSetBy: null, allowed: [] };
    const why = "“MTSR below MTT” holds nowhere.";
    const nothing = figure(
      { ...inventedDosed, window: { ...empty, conflict: why, containsProcess: false } },
      "window",
    );
    expect(nothing.sentence).toMatch(
      /^Nothing is left between 0\.0 and 80\.0 °C\. “MTSR below MTT” holds nowhere\./,
    );
    expect(words(nothing)).toContain("nothing is left");
    const other = {
      ...base.criteria[0],
      key: "crystals",
      label: "no crystals",
    } as (typeof base.criteria)[number];
    const named = figure(
      { ...inventedDosed, window: { ...base, lowerSetBy: "crystals", criteria: [...base.criteria, other] } },
      "window",
    );
    expect(named.sentence).toContain("below, “no crystals” does not hold;");
    expect(words(named)).toContain("no crystals");
  });
});

describe("the rate constant", () => {
  test("is a straight line over 1000/T for Arrhenius's equation, through k at Tp", () => {
    const rate = plot(figure(inventedBatch, "rate"));
    const lines = rate.marks.filter((mark): mark is Line => mark.type === "line");
    for (const [x, y] of lines.flatMap((line) => line.points).filter((point) => point !== null))
      expect(y).toBeCloseTo(27 - (107e3 / 8.314462618 / 1000) * x, 9);
    const note = rate.marks.find((mark) => mark.type === "note");
    expect(note).toMatchObject({ x: 1000 / 358.15 });
    expect(note?.type === "note" ? note.y : 0).toBeCloseTo(27 - 107e3 / (8.314462618 * 358.15), 9);
  });

  test("is dashed outside the fitted range and solid inside, changing exactly at its ends", () => {
    const lines = plot(figure(inventedBatch, "rate")).marks.filter(
      (mark): mark is Line => mark.type === "line",
    );
    const reach = (dash: Line["dash"]) =>
      lines
        .filter((line) => line.dash === dash)
        .flatMap((line) => line.points.map((point) => point?.[0] ?? 0));
    const solid = reach("solid");
    expect(Math.min(...solid)).toBeCloseTo(1000 / (78 + zero), 9);
    expect(Math.max(...solid)).toBeCloseTo(1000 / (50 + zero), 9);
    expect(Math.min(...reach("dashed"))).toBeLessThan(Math.min(...solid));
  });

  test("without a range is one solid line and the sentence says what cannot be judged", () => {
    const rate = figure(inventedDosed, "decomposition-rate");
    const lines = plot(rate).marks.filter((mark) => mark.type === "line");
    expect(lines.map((line) => (line as Line).dash)).toEqual(["solid"]);
    expect(rate.sentence).toContain("No fitted range is given");
  });

  test("shows rows left out of the fit with another mark, and their reason in the table", () => {
    const points = plot(figure(inventedBatch, "rate")).marks.filter((mark) => mark.type === "points");
    expect(points.map((mark) => mark.type === "points" && [mark.shape, mark.points.length])).toEqual([
      ["ring", 5],
      ["cross", 1],
    ]);
    expect(figure(inventedBatch, "rate-residuals").table.rows.at(-1)?.at(-1)).toBe("sample warmed");
  });
});

describe("time to maximum rate", () => {
  test("marks 8 h and 24 h, and flags the temperatures with their times rounded down", () => {
    const tmrad = figure(inventedBatch, "tmrad");
    const texts = words(tmrad);
    expect(texts).toEqual(expect.arrayContaining(["8 h", "24 h", "T_D24 88.1 °C: 24.0 h"]));
    expect(tmrad.sentence).toContain("It is 24 h from T_D24 88.1 °C.");
  });

  test("crosses out the closed form where it promises more time than there is, and only there", () => {
    const crosses = plot(figure(inventedBatch, "tmrad")).marks.find(
      (mark) => mark.type === "points" && mark.shape === "cross",
    );
    const places = crosses?.type === "points" ? crosses.points.map(([celsius]) => celsius) : [];
    expect(Math.min(...places)).toBeGreaterThan(75);
    const careful = plot(figure(inventedDosed, "tmrad")).marks;
    expect(careful.some((mark) => mark.type === "points" && mark.shape === "cross")).toBe(false);
  });
});

describe("dosing, heat and the feed lever", () => {
  test("dosing shows the measured run beside the kinetics and names which gives the MTSR", () => {
    const dosing = figure(inventedWhole, "dosing");
    const names = plot(dosing).marks.flatMap((mark) => ("name" in mark ? [mark.name] : []));
    expect(names).toEqual(["fed", "reacted", "accumulated, measured run", "accumulated"]);
    expect(dosing.sentence).toContain("the measured run gives the MTSR that is used");
  });

  test("a measured run without kinetics is drawn once and says that it stands alone", () => {
    const accumulation = inventedWhole.accumulation as NonNullable<Findings["accumulation"]>;
    const curve = accumulation.measured?.curve ?? [];
    const alone = figure(
      { ...inventedWhole, rate: null, accumulation: { ...accumulation, curve } },
      "dosing",
    );
    const names = plot(alone).marks.flatMap((mark) => ("name" in mark ? [mark.name] : []));
    expect(names).toEqual(["fed", "reacted", "accumulated"]);
    expect(alone.sentence).toContain("by the measured run alone");
  });

  test("heat names its crossings, and the tangent has the slope of the cooling line", () => {
    const heat = plot(figure(inventedWhole, "heat"));
    const notes = heat.marks.flatMap((mark) => (mark.type === "note" ? [mark.text] : []));
    expect(notes).toEqual(["Tp 35.0 °C", "no return 57.6 °C", "tangency 40.4 °C"]);
    const tangent = heat.marks.find((mark): mark is Line => mark.type === "line" && mark.dash === "dashdot");
    const [[x0, y0], [x1, y1]] = (tangent as Line).points as [[number, number], [number, number]];
    expect((y1 - y0) / (x1 - x0)).toBeCloseTo(1.614, 9);
    expect([x0, y0]).toEqual([expect.closeTo(13.7, 9), 0]);
  });

  test("the lever interrupts the window where there is none and says so", () => {
    const lever = figure(inventedWhole, "feed-lever");
    expect(lever.sentence).toBe(
      "As planned, in 3.0 h: 32.0 to 75.0 °C. Fed in 45.0 min: no window. Fed in 12.0 h: 26.5 to 76.3 °C.",
    );
    expect(words(lever)).toContain("no window");
  });
});

describe("failures", () => {
  const failures = figure(inventedWhole, "failures");

  test("stand lost first, then by time to act, those that hold last", () => {
    expect(failures.table.rows.map((row) => row[2])).toEqual([
      "lost: no delay is short enough",
      expect.stringMatching(/^act within .* min$/),
      expect.stringMatching(/^act within .* h$/),
      "holds by itself",
    ]);
    expect(failures.sentence).toContain("“Jacket steams” is lost: no delay is short enough.");
  });

  test("are drawn firmly up to MTT and no higher; what the model says beyond is thin and dotted", () => {
    const lines = plot(failures).marks.filter((mark): mark is Line => mark.type === "line");
    for (const line of lines) {
      const heights = line.points.map((point) => point?.[1] ?? 0);
      if (line.tag !== undefined) expect(Math.max(...heights)).toBeLessThanOrEqual(78 + 1e-9);
      else expect(line).toMatchObject({ dash: "dotted", weight: "thin" });
    }
  });

  test("carry numbers on their lines and their whole names in the key", () => {
    const texts = words(failures);
    for (const number of ["1", "2", "3", "4"])
      expect(texts.filter((each) => each === number)).toHaveLength(2);
    expect(texts).toContain("Agitator stops at half dosing, restarts after 40 min: holds by itself");
  });

  test("the vulnerable moment is the one that leaves least", () => {
    const moments = figure(inventedWhole, "vulnerable-2");
    expect(moments.sentence).toContain("is worst when it begins at 0 s: lost");
    expect(moments.table.rows).toHaveLength(13);
  });
});
