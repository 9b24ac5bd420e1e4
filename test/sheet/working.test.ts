import { describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { screen } from "../../server/screening/screen.js";
import { methodsOf } from "../../server/sheet/working.js";
import { checkedCases } from "../published/caseFigures.js";
import { evaluate, numberOf } from "../words/evaluate.js";
import { inventedDocument, inventedFindings, inventedModel } from "./invented.js";

function methodsFor(change: object) {
  const read = readCase({ ...inventedDocument, ...change });
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  const findings = screen(read.model, { digest: read.digest, depth: "quick" });
  return methodsOf(read.model, findings);
}

const methods = methodsOf(inventedModel, inventedFindings);
const named = (title: string) => methods.find((method) => method.title === title);

describe("the working", () => {
  test("gives each method its equation, this case's numbers and a reference", () => {
    expect(methods.length).toBeGreaterThan(9);
    for (const method of methods) {
      expect(method.equation).not.toBe("");
      expect(method.numbers).toMatch(/\d/);
      expect(method.reference).not.toBe("");
      for (const text of Object.values(method).flat())
        expect(text).not.toMatch(/NaN|undefined|null|Infinity/);
    }
  });

  test("puts numbers into the adiabatic rise from which it can be recomputed by hand", () => {
    const numbers = named("Adiabatic rise of the reaction")?.numbers ?? "";
    expect(numbers).toContain("n_{lim} = min(2 900, 3 050/1) mol");
    expect(numbers).toContain("−ΔH_{r} = 118 kJ/mol");
    expect(numbers).toContain("1 450 kg × 1.95 kJ/(kg K) + 420 kg × 1.8 kJ/(kg K)");
    // By hand: 2900 × 118 / (1450 × 1.95 + 420 × 1.8) = 95.493 K, rounded up.
    expect(numbers).toContain("= 95.5 K");
  });

  test("puts numbers into the cooling capacity from which it can be recomputed by hand", () => {
    const numbers = named("Cooling at scale")?.numbers ?? "";
    expect(numbers).toContain("UA = 320 W/(m² K) × 5.6 m², w = 4.5 kg/s × 3.6 kJ/(kg K)");
    // By hand: 1792 × 16200 / (1792 + 16200) × (35 − 5) = 48.405 kW, rounded down.
    expect(numbers).toContain("capacity 48.4 kW");
  });

  test("has lines of plain numbers that a calculator takes to what is printed behind them", () => {
    const forms = [
      { form: "heatRate", heatReleaseRate: "20 W/kg", at: "160 degC", activationEnergy: "128 kJ/mol" },
      { form: "td24", temperature: "100 degC", activationEnergy: "128 kJ/mol" },
    ].map((rateConstant) =>
      methodsFor({ decomposition: { ...inventedDocument.decomposition, rateConstant } }),
    );
    const checked = checkedCases().map(({ text }) => methodsFor(JSON.parse(text)));
    const worked = [methodsFor({}), ...forms, ...checked].flat().flatMap((method) => method.worked ?? []);
    expect(worked.length).toBeGreaterThan(80);
    for (const line of worked) {
      const [, numbers = "", result = ""] = line.split(" = ");
      const [, shown = "", unit = ""] = /^([−\d .]+(?:×10\S+)?) (.+)$/u.exec(result) ?? [];
      const printed = numberOf(shown) * (unit === "kW" ? 1000 : 1);
      expect(printed, line).not.toBe(0);
      // Results are rounded to the careful side in their last digit: three digits of rate constants, 0.1 K or 0.1 kW.
      const lastDigit =
        unit === "K" || unit === "kW" ? 0.1 * (unit === "kW" ? 1000 : 1) : 0.006 * Math.abs(printed);
      expect(Math.abs(evaluate(numbers) - printed), line).toBeLessThanOrEqual(lastDigit);
    }
  });

  test("shows the standard concentration beside the activation entropy", () => {
    const rateConstant = {
      form: "eyring",
      activationEnthalpy: "62 kJ/mol",
      activationEntropy: "-95 J/(mol K)",
    };
    const [method] = methodsFor({ reaction: { ...inventedDocument.reaction, rateConstant } });
    expect(method?.equation).toContain("c_{0}^{1−n}");
    expect(method?.numbers).toMatch(/c_\{0\} = 1 000 mol\/m³, ΔS‡ = −95 J\/\(mol K\)/);
  });

  test("names the form in which each rate constant was given", () => {
    const { decomposition } = inventedDocument;
    const equations = [
      { form: "heatRate", heatReleaseRate: "20 W/kg", at: "160 degC", activationEnergy: "128 kJ/mol" },
      { form: "td24", temperature: "100 degC", activationEnergy: "128 kJ/mol" },
      { form: "reference", rateConstant: "1e-5 1/s", at: "120 degC", activationEnergy: "128 kJ/mol" },
    ].map((rateConstant) => methodsFor({ decomposition: { ...decomposition, rateConstant } })[1]?.equation);
    expect(equations[0]).toContain("q′/(Q f_{ref})");
    expect(equations[1]).toContain("is 24 h");
    expect(equations[2]).toBe("k = k_{ref} exp(−E_{a}/R (1/T − 1/T_{ref}))");
    expect(named("Rate constant of the reaction")?.numbers).toContain("3 of 4 rows fitted");
  });

  test("leaves out what the case has no data for", () => {
    const titles = methodsFor({ decomposition: undefined }).map((method) => method.title);
    expect(titles).toContain("Adiabatic rise of the reaction");
    for (const title of ["T_D24", "Criticality class", "Adiabatic time to maximum rate"]) {
      expect(titles).not.toContain(title);
    }
  });

  test("warns where the closed form is not on the careful side", () => {
    const { timeToMaximumRate } = inventedFindings;
    if (timeToMaximumRate === null) throw new Error("the invented case has one");
    const findings = {
      ...inventedFindings,
      timeToMaximumRate: { ...timeToMaximumRate, zeroOrderCautious: false },
    };
    const closed = methodsOf(inventedModel, findings).find((method) => method.title.includes("closed form"));
    expect(closed?.numbers).toContain("NOT on the careful side");
  });
});
