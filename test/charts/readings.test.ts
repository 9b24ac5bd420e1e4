import { describe, expect, test } from "vitest";
import { failureReadings, temperatureAt } from "../../server/charts/failureReadings.js";
import type { Axis } from "../../server/charts/figure.js";
import { figuresOf } from "../../server/charts/figures.js";
import { readingsAt } from "../../server/charts/readings.js";
import { drawSvg } from "../../server/charts/svg.js";
import { temperatureText } from "../../server/words/numbers.js";
import { inventedDosed } from "./inventedDosed.js";
import { inventedWhole } from "./inventedWhole.js";

describe("the readings of a figure", () => {
  const figures = [inventedWhole, inventedDosed].flatMap((findings) => figuresOf(findings));

  test("stand along its axis and repeat its table, for every figure with a plot", () => {
    const plotted = figures.filter(({ panels }) => panels.some((panel) => panel.type === "plot"));
    expect(plotted.length).toBeGreaterThan(6);
    for (const { id, readings = [], table } of plotted) {
      expect([id, readings.length]).not.toEqual([id, 0]);
      for (const { at } of readings) expect(at === Math.min(1, Math.max(0, at))).toBe(true);
      if (id === "failures") continue;
      const rows = table.rows.map((row) => row.map((cell, i) => `${table.columns[i]}: ${cell}`).join(" · "));
      expect(readings.filter(({ text }) => !rows.includes(text))).toEqual([]);
      expect(readings.length).toBeGreaterThan(0.5 * rows.length);
    }
  });

  test("come with the frame of the plots at both widths; lanes have none, their values stand beside the marks", () => {
    for (const figure of figures) {
      const frames = [...drawSvg(figure).matchAll(/data-frame="(\S+) (\S+) (\S+) (\S+)"/g)];
      expect(frames.length).toBe(figure.panels.some((panel) => panel.type === "plot") ? 2 : 0);
      for (const [, ...sides] of frames) {
        const [left = 0, right = 0, top = 0, bottom = 0] = sides.map(Number);
        expect(right - left).toBeGreaterThan(100);
        expect(bottom - top).toBeGreaterThan(100);
      }
    }
  });

  test("are placed by the scale of the axis, and left out beyond it", () => {
    const axis: Axis = { scale: "log", domain: [1, 100], label: "" };
    const places = [0.5, 1, 10, 100, 200].map((value) => ({ value, text: String(value) }));
    expect(readingsAt(axis, places)).toEqual([
      { at: 0, text: "1" },
      { at: 0.5, text: "10" },
      { at: 1, text: "100" },
    ]);
  });
});

describe("the readings of cooling failures", () => {
  const failures = inventedWhole.failures ?? [];
  const axis: Axis = { scale: "linear", domain: [0, 10], label: "Time, h" };
  const readings = failureReadings(failures, axis, 3600);

  test("tell no temperature above MTT, where the model does not hold", () => {
    const passing = failures.findIndex(({ timeToMtt_s }) => timeToMtt_s !== null && timeToMtt_s < 9 * 3600);
    const time = failures[passing]?.timeToMtt_s ?? Number.NaN;
    const told = readings.map(({ at, text }) => ({
      time: at * 36_000,
      text: text.split(" · ")[passing + 1],
    }));
    expect(passing).toBeGreaterThanOrEqual(0);
    for (const each of told) expect(each.text?.endsWith("has passed MTT")).toBe(each.time >= time);
  });

  test("tell otherwise the temperature of the course, rounded up", () => {
    const kept = failures.findIndex(({ timeToMtt_s, trace }) => timeToMtt_s === null && trace.length > 1);
    const failure = failures[kept];
    if (failure === undefined) throw new Error("No failure stays below MTT");
    for (const { at, text } of readings) {
      const kelvin = temperatureAt(failure, at * 36_000);
      const expected = kelvin === null ? "not computed so far" : temperatureText(kelvin, "up");
      expect(text).toContain(`${kept + 1} ${failure.name}: ${expected}`);
    }
  });
});
