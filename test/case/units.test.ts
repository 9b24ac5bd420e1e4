import { execFileSync } from "node:child_process";
import { unit } from "mathjs";
import { describe, expect, test } from "vitest";
import { unitFactor } from "../../server/case/units.js";

/** A unit's factor, or a failure of the test. */
function factorOf(text: string): number {
  const factor = unitFactor(text);
  if (typeof factor === "string") throw new Error(factor);
  return factor.over / factor.under;
}

describe("the unit file on its own", () => {
  test.each([
    ["kg/L", "kg/m^3"],
    ["kJ/(kg K)", "J/(kg K)"],
    ["BTU/(lbm degR)", "J/(kg K)"],
    ["psi", "Pa"],
    ["mmHg", "Pa"],
    ["atm", "Pa"],
    ["hp", "W"],
    ["gal/min", "m^3/s"],
    ["lbm/ft^3", "kg/m^3"],
    ["W/(cm^2 K)", "W/(m^2 K)"],
    ["mol/dm^3", "mol/m^3"],
    ["ft^2", "m^2"],
    ["week", "s"],
    ["t/h", "kg/s"],
    ["mPa s", "Pa s"],
    ["in", "m"],
    ["eV", "J"],
    ["L^0.5 mol^-0.5 s^-1", "m^1.5 mol^-0.5 s^-1"],
  ])("%s is as large as the whole of mathjs says", (text, si) => {
    expect(factorOf(text) / unit(1, text).toNumber(si)).toBeCloseTo(1, 13);
  });

  test("a factor and its logarithm belong together", () => {
    for (const text of ["kJ/(kg K)", "L/(mol min)", "1/h", "mmHg", "kcal/mol"]) {
      const factor = unitFactor(text);
      if (typeof factor === "string") throw new Error(factor);
      expect(Math.exp(factor.ln)).toBeCloseTo(factor.over / factor.under, 8);
    }
  });

  test("an unknown unit, a power out of all reason and a lost parenthesis are words, not errors", () => {
    for (const text of ["flurb", "kg^99", "kg^1e400", "kg/(m", "kg)", "", "^2", "kg//m", "m".repeat(90)]) {
      expect(typeof unitFactor(text)).toBe("string");
    }
  });
});

test("reading quantities loads within 200 ms, and no expression evaluator with it", () => {
  const module = new URL("../../.build/server/case/quantities.js", import.meta.url).href;
  const script = `
    const start = performance.now();
    await import(${JSON.stringify(module)});
    const taken = performance.now() - start;
    const { createRequire } = await import("node:module");
    const loaded = Object.keys(createRequire(${JSON.stringify(module)}).cache);
    console.log(JSON.stringify({ taken, loaded }));`;
  const runs = Array.from({ length: 3 }, (): { taken: number; loaded: string[] } =>
    JSON.parse(execFileSync(process.execPath, ["--input-type=module", "-e", script], { encoding: "utf8" })),
  );
  // Other work on the machine only adds to the time.
  expect(Math.min(...runs.map(({ taken }) => taken))).toBeLessThan(200);
  const [{ loaded }] = runs;
  expect(loaded.some((file) => file.endsWith("type/unit/Unit.js"))).toBe(true);
  expect(loaded.filter((file) => /mathjs.*(expression|parse|evaluate)/.test(file))).toEqual([]);
});
