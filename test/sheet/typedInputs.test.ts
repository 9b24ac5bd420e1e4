import { describe, expect, test } from "vitest";
import { typedInputs } from "../../server/sheet/typedInputs.js";
import { inventedDocument } from "./invented.js";

const { single, lists } = typedInputs(inventedDocument);
const at = (pointer: string) => single.find((input) => input.pointer === pointer);

/** Every text and number of a document, keys aside. */
function leavesOf(value: unknown): string[] {
  if (typeof value !== "object" || value === null) return [String(value)];
  return Object.values(value).flatMap(leavesOf);
}

describe("what was typed", () => {
  test("stands on the sheet in its author's own words, with error, basis and source", () => {
    expect(at("/mixture/heatCapacity")).toMatchObject({
      text: "1.95 kJ/(kg K)",
      standardError: "0.05 kJ/(kg K)",
      basis: "measured",
      source: "Notebook 14, p. 31",
      measurable: true,
    });
    expect(at("/reaction/heat")?.text).toBe("−118 kJ·mol⁻¹");
  });

  test("includes names, choices and the words on which a limit rests", () => {
    expect(at("/batch/vessel")).toMatchObject({ text: "V-000", measurable: false });
    expect(at("/limits/maximumTechnicalTemperature")?.source).toBe("boiling point at 1 atm");
    expect(at("/reaction/rateConstant/form")?.text).toMatch(/measured/i);
  });

  test("is complete: nothing in the document is left out", () => {
    const shown = JSON.stringify({ single, lists });
    const chosen = new Set([
      "thermal-window/case-1",
      "semibatch",
      "table",
      "eyring",
      "order",
      "arrhenius",
      "continue",
      "B",
    ]);
    const missing = leavesOf(inventedDocument).filter(
      (leaf) => !chosen.has(leaf) && !shown.includes(JSON.stringify(leaf).slice(1, -1)),
    );
    expect(missing).toEqual([]);
    for (const pointer of [
      "/reaction/operation",
      "/reaction/feed/reactant",
      "/decomposition/rateLaw/model",
      "/decomposition/rateConstant/form",
      "/reaction/rateConstant/fitAs",
    ]) {
      expect([pointer, at(pointer) !== undefined]).toEqual([pointer, true]);
    }
  });

  test("of a table of rate constants keeps the row that was left out and why", () => {
    const rows = lists.find((list) => list.pointer === "/reaction/rateConstant/rows");
    expect(rows?.layout).toBe("rows");
    expect(rows?.entries).toHaveLength(4);
    expect(rows?.entries[3]?.fields.map((field) => field.text)).toContain("stirrer stood still");
  });

  test("of a failure keeps its changes apart, in their order", () => {
    const [failure] = lists.find((list) => list.pointer === "/failures")?.entries ?? [];
    expect(failure?.inner.map((fields) => fields[0]?.text)).toEqual(["0 min", "30 min"]);
    expect(failure?.inner[1]?.map((field) => field.text)).toContain("300 kg");
  });
});
