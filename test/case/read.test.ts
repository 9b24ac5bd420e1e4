import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { digestOf } from "../../server/case/canonical.js";
import { readCase, readCaseText } from "../../server/case/read.js";
import { brokenDocuments } from "./brokenDocuments.js";
import { completeCase, demo, demos, edited, everyChoice, type Fields } from "./completeCases.js";

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

describe("refused", () => {
  test.each(brokenDocuments.map((each) => [each.name.slice(0, 80), each] as const))("%s", (_name, each) => {
    const read = readCase(each.document);
    expect(read).toMatchObject({ ok: false, kind: "case" });
    if (read.ok) return;
    expect(read.faults.map(({ pointer }) => pointer)).toContain(each.pointer);
    for (const { message } of read.faults) {
      expect(message).toMatch(/\S/);
      expect(message.length).toBeLessThan(700);
    }
  });

  test("there are at least 200 broken documents", () => {
    expect(brokenDocuments.length).toBeGreaterThanOrEqual(200);
  });

  test("all faults come at once, each at its field", () => {
    const document = demo("acylation");
    const wrong = (
      [
        ["/title", undefined],
        ["/mixture/mass", "1450 L"],
        ["/reaction/heat", "118 kJ/mol"],
        ["/vessel/heatTransferCoefficient", "320 W/m^2 K"],
        ["/limits/lowestTemperature", "90 degC"],
        ["/failures/0/changes/0/after", "1 min"],
        ["/failures/2/changes/0/heatTransfer", undefined],
      ] as const
    ).reduce<Fields>((changed, [pointer, value]) => edited(changed, pointer, value), document);
    const faults = faultsOf(wrong).join("\n");
    expect(faults).toMatch(/^\/title: is missing/m);
    expect(faults).toMatch(/^\/mixture\/mass: "1450 L" is a volume; expected a mass/m);
    expect(faults).toMatch(/^\/reaction\/heat: "118 kJ\/mol" is endothermic, which is out of scope/m);
    expect(faults).toMatch(/^\/vessel\/heatTransferCoefficient: .*write "W\/\(m\^2 K\)"/m);
    expect(faults).toMatch(/^\/limits\/lowestTemperature: is not below highestTemperature/m);
    expect(faults).toMatch(/^\/failures\/0\/changes\/0\/after: is not 0/m);
    expect(faults).toMatch(/^\/failures\/2\/changes\/0\/heatTransfer: is missing; with the agitator off/m);
  });

  test("an unknown key is met with the nearest one that is known", () => {
    expect(faultsOf(edited(demo("acylation"), "/vessel/heatTransferArae", "5 m^2"))[0]).toMatch(
      /did you mean "heatTransferArea"/,
    );
    expect(
      faultsOf(edited(demo("acylation"), "/reaction/rateConstant/activationEnergy", "5 kJ/mol"))[0],
    ).toMatch(/belongs to form "arrhenius", "reference"|belongs to form "arrhenius" or "reference"/);
  });

  test("a rate constant of the wrong order names the unit that belongs to the order", () => {
    const half = edited(demo("acylation"), "/reaction/reactants/B/order", 0.5);
    const typed = edited(half, "/reaction/rateConstant", {
      form: "reference",
      rateConstant: "3e-4 L/(mol s)",
      at: "25 degC",
      activationEnergy: "60 kJ/mol",
    });
    expect(faultsOf(typed)).toEqual([
      expect.stringMatching(
        /overall order 2; expected a rate constant of overall order 1\.5 in m\^1\.5 mol\^-0\.5 s\^-1/,
      ),
    ]);
    const right = edited(typed, "/reaction/rateConstant/rateConstant", "3e-4 L^0.5 mol^-0.5 s^-1");
    expect(faultsOf(right)).toEqual([]);
  });

  test("a number typed as text, or with a comma, says so", () => {
    expect(faultsOf(edited(demo("acylation"), "/limits/coolingUse", "0,8"))[0]).toMatch(
      /write a decimal point/,
    );
  });

  test("text that is not JSON, and text that is too long", () => {
    expect(readCaseText("{")).toMatchObject({ ok: false, kind: "json" });
    expect(readCaseText(`"${"x".repeat(256 * 1024)}"`)).toMatchObject({
      ok: false,
      kind: "size",
    });
    expect(readCaseText(`"${"°".repeat(200 * 1024)}"`)).toMatchObject({
      ok: false,
      kind: "size",
    });
    expect(readCaseText("null")).toMatchObject({ ok: false, kind: "case" });
  });

  test("a number beyond doubles in the JSON itself", () => {
    const text = JSON.stringify(demo("acylation")).replace('"coolingUse":0.8', '"coolingUse":1e999');
    expect(readCaseText(text)).toMatchObject({
      ok: false,
      faults: [expect.objectContaining({ pointer: "/limits/coolingUse" })],
    });
  });
});

describe("never throws", () => {
  test("whatever JSON it is given", () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 6 }), (value) => {
        expect(readCase(value)).toMatchObject({ ok: false });
      }),
      { numRuns: 500 },
    );
  });

  test("whatever stands in the place of any field", () => {
    const pointers = pointersOf(completeCase());
    fc.assert(
      fc.property(
        fc.constantFrom(...pointers),
        fc.oneof(fc.jsonValue(), fc.string(), fc.string({ unit: "binary" }), fc.double()),
        (pointer, value) => {
          const read = readCase(edited(completeCase(), pointer, value));
          if (!read.ok) expect(read.faults.length).toBeGreaterThan(0);
          else expect(JSON.stringify(read.model)).not.toMatch(/NaN|Infinity/);
        },
      ),
      { numRuns: 1000 },
    );
  });

  test("things that are no JSON", () => {
    for (const odd of [undefined, Symbol("x"), () => 1, 1n, new Date(), new Map(), Number.NaN, /x/]) {
      expect(readCase(odd)).toMatchObject({ ok: false });
      expect(
        readCase(edited(demo("hydrolysis"), "/title", typeof odd === "symbol" ? null : 1)),
      ).toMatchObject({
        ok: false,
      });
    }
  });

  test("deep documents", () => {
    const deep = JSON.parse(`${"[".repeat(5000)}${"]".repeat(5000)}`);
    expect(readCase(deep)).toMatchObject({ ok: false });
    expect(readCase(edited(demo("hydrolysis"), "/mixture/mass", deep))).toMatchObject({ ok: false });
    expect(readCase(edited(demo("hydrolysis"), "/extra", deep))).toMatchObject({
      ok: false,
    });
  });

  test("huge documents, within reason of time", () => {
    const many = edited(
      demo("hydrolysis"),
      "/failures",
      Array.from({ length: 1e5 }, () => 1),
    );
    const long = edited(demo("hydrolysis"), "/mixture/mass", "1".repeat(1e6));
    const start = performance.now();
    for (const document of [many, long]) {
      const read = readCase(document);
      expect(read.ok).toBe(false);
      if (!read.ok) expect(JSON.stringify(read.faults).length).toBeLessThan(3e5);
    }
    expect(performance.now() - start).toBeLessThan(5000);
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

/** Pointers of everything in a document. */
function pointersOf(value: unknown, at = ""): string[] {
  if (typeof value !== "object" || value === null) return [at];
  const below = Object.entries(value).flatMap(([key, member]) => pointersOf(member, `${at}/${key}`));
  return at === "" ? below : [at, ...below];
}
