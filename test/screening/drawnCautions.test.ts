import { describe, expect, test } from "vitest";
import type { levels } from "../../server/screening/cautions/catalogue.js";
import { screen } from "../../server/screening/screen.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

const acylation = documentOf("semibatch-acylation");
const ring = documentOf("batch-ring-closure");

function raised(document: Document, code: keyof typeof levels) {
  return screen(modelOf(document), { digest: "", depth: "full" }).cautions.filter(
    (caution) => caution.code === code,
  );
}

/** Without failures, which these cautions do not ask about. */
const calm = (document: Document) => changed(document, "/failures", []);

describe("an error larger than its value", () => {
  const wide = changed(calm(ring), "/decomposition/heat", { value: "610 J/g", standardError: "700 J/g" });

  test("is allowed and named with both figures as typed", () => {
    const [caution] = raised(wide, "LARGE_ERROR");
    expect(caution?.level).toBe("warn");
    expect(caution?.about).toBe("/decomposition/heat");
    expect(caution?.text).toContain("700 J/g");
    expect(caution?.text).toContain("610 J/g");
  });

  test("is not raised for smaller ones, nor for a value below zero", () => {
    expect(raised(calm(ring), "LARGE_ERROR")).toEqual([]);
    const reaction = changed(calm(ring), "/reaction/heat", {
      value: "-84 kJ/mol",
      standardError: "90 kJ/mol",
    });
    expect(raised(reaction, "LARGE_ERROR")).toEqual([]);
  });
});

describe("errors of some rows of a table only", () => {
  const rows = [50, 57, 64, 71, 78].map((degrees, i) => ({
    temperature: `${degrees} degC`,
    rateConstant: `${["2.05e-6", "4.9e-6", "1.09e-5", "2.42e-5", "5.2e-5"][i]} s^-1`,
  }));

  test("are said to be unused", () => {
    const mixed = rows.map((row, i) => (i === 2 ? { ...row, relativeError: 0.05 } : row));
    const [caution] = raised(changed(calm(ring), "/reaction/rateConstant/rows", mixed), "ERRORS_UNUSED");
    expect(caution?.level).toBe("warn");
    expect(caution?.about).toBe("/reaction/rateConstant");
  });

  test("are no matter where all rows carry one, or none does", () => {
    const all = rows.map((row) => ({ ...row, relativeError: 0.05 }));
    expect(raised(changed(calm(ring), "/reaction/rateConstant/rows", all), "ERRORS_UNUSED")).toEqual([]);
    expect(raised(calm(ring), "ERRORS_UNUSED")).toEqual([]);
  });
});

describe("a plan inside the window but off its cautious side", () => {
  test("is a caution with the cautious side and what fails how often", () => {
    const edge = changed(calm(acylation), "/reaction/temperature", "31 degC");
    const [caution] = raised(edge, "OUTSIDE_CAUTIOUS_SIDE");
    expect(caution?.level).toBe("warn");
    expect(caution?.about).toBe("/reaction/temperature");
    expect(caution?.text).toMatch(/only from 31\.9 °C to 74\.3 °C/);
    expect(caution?.text).toMatch(/In \d+ of 100 draws “cooling suffices” fails at 31\.0 °C\./);
    expect(raised(edge, "OUTSIDE_WINDOW")).toEqual([]);
  });

  test("is not raised on the cautious side, nor outside the window, where there is a stop", () => {
    expect(raised(calm(acylation), "OUTSIDE_CAUTIOUS_SIDE")).toEqual([]);
    const outside = changed(calm(acylation), "/reaction/temperature", "28 degC");
    expect(raised(outside, "OUTSIDE_CAUTIOUS_SIDE")).toEqual([]);
    expect(raised(outside, "OUTSIDE_WINDOW")).toHaveLength(1);
  });

  test("is not raised by a quick screening, which draws nothing", () => {
    const edge = changed(calm(acylation), "/reaction/temperature", "31 degC");
    const quick = screen(modelOf(edge), { digest: "", depth: "quick" });
    expect(quick.uncertainty).toBeNull();
    expect(quick.cautions.some((caution) => caution.code === "OUTSIDE_CAUTIOUS_SIDE")).toBe(false);
  });
});
