import { describe, expect, test } from "vitest";
import { digestOf } from "../../server/case/canonical.js";
import { readCase, readCaseText } from "../../server/case/read.js";
import { completeCase, demo, demos, edited, everyChoice } from "./completeCases.js";

/** The model of a document that must be accepted. */
function modelOf(document: unknown) {
  const read = readCase(document);
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  return read.model;
}

/** Faults of a document, as `pointer: message`. */
function faultsOf(document: unknown): string[] {
  const read = readCase(document);
  return read.ok ? [] : read.faults.map(({ pointer, message }) => `${pointer}: ${message}`);
}

describe("accepted", () => {
  test.each(demos)("the demo case %s", (name) => {
    const document = demo(name);
    const read = readCase(document);
    expect(read).toMatchObject({ ok: true });
    if (read.ok) expect(read.digest).toBe(digestOf(document));
  });

  test("a case with everything that a case can hold, in each of its choices", () => {
    const cases = everyChoice();
    expect(cases.length).toBeGreaterThan(20);
    for (const document of cases) expect(faultsOf(document)).toEqual([]);
  });

  test("text with a byte order mark, and a title in any script", () => {
    const text = `\ufeff${JSON.stringify({ ...demo("hydrolysis"), title: "加水分解 😀 Größe" })}`;
    expect(readCaseText(text)).toMatchObject({ ok: true });
  });
});

describe("the model", () => {
  test("is in SI and keeps standard errors as differences", () => {
    const model = modelOf(demo("acylation"));
    expect(model.mixture.heatCapacity).toEqual({
      value: 1950,
      standardError: 50,
    });
    expect(model.reaction.temperature).toEqual({
      value: 308.15,
      standardError: null,
    });
    expect(model.vessel.coolant.flowing?.heatCapacity.value).toBe(3600);
    const warm = edited(demo("acylation"), "/reaction/temperature", {
      value: "35 degC",
      standardError: "0.5 degC",
    });
    expect(modelOf(warm).reaction.temperature).toEqual({
      value: 308.15,
      standardError: 0.5,
    });
  });

  test("fills in every default of the format", () => {
    const model = modelOf(demo("hydrolysis"));
    expect(model.mixture.thermalInertia.value).toBe(1);
    expect(model.vessel.agitatorPower.value).toBe(0);
    expect(model.vessel.coolant.flowing).toBeNull();
    expect(model.limits).toMatchObject({
      coolingUse: 0.8,
      minimumTimeToMaximumRate: 86400,
      decompositionAllowed: 0.05,
      controlBand: 0,
      controlBandGiven: false,
    });
    expect(model.failures[0]).toMatchObject({
      at: 0,
      startTemperature: null,
      horizon: null,
      response: null,
    });
    const least = edited(demo("acylation"), "/failures/0/at", undefined);
    expect(modelOf(least).failures[0].at).toBe("worst");
    const bare = edited(demo("acylation"), "/limits/targetConversion", undefined);
    expect(modelOf(bare).limits.targetConversion).toBe(0.98);
    expect(modelOf(edited(bare, "/limits/controlBand", "0 K")).limits.controlBandGiven).toBe(true);
  });

  test("a rate constant has the overall order of its law; that of a decomposition is per time", () => {
    const model = modelOf(demo("acylation"));
    expect(model.reaction.rateConstant).toMatchObject({
      form: "eyring",
      order: 2,
    });
    expect(model.decomposition?.rateConstant).toMatchObject({
      form: "arrhenius",
      order: 1,
    });
    const second = edited(demo("acylation"), "/decomposition/rateLaw/order", 2);
    expect(modelOf(second).decomposition?.rateConstant).toMatchObject({
      order: 1,
    });
  });

  test("1e84 1/h keeps every digit of its logarithm", () => {
    const huge = edited(demo("acylation"), "/decomposition/rateConstant/preExponential", "1e84 1/h");
    const rate = modelOf(huge).decomposition?.rateConstant;
    const ln = rate?.form === "arrhenius" ? rate.lnPreExponential.value : Number.NaN;
    expect(Math.abs(ln / (84 * Math.LN10 - Math.log(3600)) - 1)).toBeLessThan(1e-15);
  });

  test("the standard error of A becomes that of ln A, s/A", () => {
    const typed = { value: "4e11 1/s", standardError: "1e11 1/s" };
    const rate = modelOf(edited(demo("acylation"), "/decomposition/rateConstant/preExponential", typed))
      .decomposition?.rateConstant;
    expect(rate?.form === "arrhenius" ? rate.lnPreExponential.standardError : null).toBeCloseTo(0.25, 14);
  });

  test("ln A is taken to SI by the logarithm of its unit alone", () => {
    const typed = edited(demo("acylation"), "/decomposition/rateConstant", {
      form: "arrhenius",
      lnPreExponential: { value: 193.4, standardError: 0.3, unit: "1/h" },
      activationEnergy: "800 kJ/mol",
    });
    const rate = modelOf(typed).decomposition?.rateConstant;
    expect(rate).toMatchObject({
      lnPreExponential: { value: 193.4 - Math.log(3600), standardError: 0.3 },
    });
  });

  test("a row's standard error over its rate constant is its relative error", () => {
    const table = edited(demo("ring-closure"), "/reaction/rateConstant/rows/0/rateConstant", {
      value: "2e-6 s^-1",
      standardError: "1e-7 s^-1",
    });
    const rate = modelOf(table).reaction.rateConstant;
    expect(rate?.form === "table" ? rate.rows[0].relativeError : null).toBeCloseTo(0.05, 14);
  });

  test("the unit a value is typed in changes nothing", () => {
    const document = demo("acylation");
    const other = [
      ["/mixture/mass", "1.45 t"],
      ["/mixture/density", "940 g/L"],
      ["/reaction/temperature", "308.15 K"],
      ["/reaction/feed/duration", "180 min"],
      ["/vessel/coolant/flow", "16.2 t/h"],
    ].reduce((changed, [pointer, text]) => edited(changed, pointer, text), document);
    const { inputs: _, ...model } = modelOf(other);
    const { inputs: __, ...original } = modelOf(document);
    expect(model).toEqual(original);
  });

  test("notes say how each quantity is known, as typed", () => {
    const { inputs } = modelOf(completeCase());
    const enthalpy = inputs.find(({ pointer }) => pointer === "/reaction/rateConstant/activationEnthalpy");
    expect(enthalpy).toEqual({
      pointer: "/reaction/rateConstant/activationEnthalpy",
      label: "activation enthalpy of the reaction",
      text: "62 kJ/mol",
      standardErrorText: "1.6 kJ/mol",
      basis: "measured",
      source: "Notebook 14, p. 31",
    });
    const labels = inputs.map(({ label }) => label);
    expect(labels).toContain("mass of the feed");
    expect(labels).toContain("mass of the quench, failure 1, change 2");
    expect(new Set(inputs.map(({ pointer }) => pointer)).size).toBe(inputs.length);
  });

  test("the limit's basis is free text, its value a quantity of its own", () => {
    const limit = {
      value: { value: "78 degC", standardError: "2 K" },
      basis: "boiling point at 1 atm",
    };
    for (const typed of [
      limit,
      {
        value: "78 degC",
        standardError: "2 K",
        basis: "boiling point at 1 atm",
      },
    ]) {
      const { limits } = modelOf(edited(demo("acylation"), "/limits/maximumTechnicalTemperature", typed));
      expect(limits.maximumTechnicalTemperature).toEqual({
        value: 351.15,
        standardError: 2,
      });
      expect(limits.maximumTechnicalTemperatureBasis).toBe("boiling point at 1 atm");
    }
    const bare = modelOf(edited(demo("acylation"), "/limits/maximumTechnicalTemperature", "78 degC"));
    expect(bare.limits.maximumTechnicalTemperatureBasis).toBeNull();
  });

  test("a measured accumulation takes the place of the rate constant", () => {
    const measured = edited(completeCase(), "/reaction/rateConstant", undefined);
    const { reaction } = modelOf(measured);
    expect(reaction.rateConstant).toBeNull();
    expect(reaction.measuredAccumulation?.rows[1]).toEqual({
      time: 3600,
      releasedFraction: 0.28,
    });
  });

  test("a change holds what it names and nothing else", () => {
    expect(modelOf(demo("acylation")).failures[2].changes[1]).toEqual({
      after: 2400,
      heatTransfer: 1,
      agitator: "on",
    });
  });
});

test("a demo case is read in less than 3 ms once warm", () => {
  const document = demo("acylation");
  for (let i = 0; i < 50; i++) readCase(document);
  const times = Array.from({ length: 51 }, () => {
    const start = performance.now();
    readCase(document);
    return performance.now() - start;
  });
  // Other work on the machine only adds to the time.
  expect(Math.min(...times)).toBeLessThan(3);
});
