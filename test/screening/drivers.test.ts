import { describe, expect, test } from "vitest";
import type { DriverFindings } from "../../server/screening/decisionFindings.js";
import { driverFindings } from "../../server/screening/drivers.js";
import { knownRates } from "../../server/screening/known.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { td24 } from "../../server/thermal/td24.js";
import { studyOf } from "../../server/window/study.js";
import { temperatureWindow } from "../../server/window/window.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

function driversOf(document: unknown, seed?: number): readonly DriverFindings[] {
  const model = modelOf(document);
  const known = knownRates(model);
  const study = studyOf(realise(model, known, estimates), "draws");
  const nominal = {
    study,
    window: temperatureWindow(study),
    td24: study.runaway === null ? null : td24(study.runaway),
  };
  return driverFindings(model, known, nominal, seed === undefined ? {} : { seed });
}

function sharesOf(drivers: readonly DriverFindings[], output: DriverFindings["output"]) {
  const found = drivers.find((each) => each.output === output);
  if (found === undefined) throw new Error(`No drivers of ${output}`);
  return new Map(found.shares.map(({ pointer, share }) => [pointer, share]));
}

/** The same case with no error but those that a test sets. */
function exact(document: unknown): Document {
  const plain = (value: unknown): unknown => {
    if (Array.isArray(value)) return value.map(plain);
    if (typeof value !== "object" || value === null) return value;
    const entries = Object.entries(value).filter(([key]) => key !== "standardError");
    return Object.fromEntries(entries.map(([key, each]) => [key, plain(each)]));
  };
  return plain(document) as Document;
}

const batch = exact(documentOf("batch-ring-closure"));

const estimatesOf = (document: unknown) => {
  const model = modelOf(document);
  return studyOf(realise(model, knownRates(model), estimates), "draws");
};

/** The batch with normal errors of temperature and heat that move MTSR by `first` and `second` kelvin. */
function twoErrors(first: number, second: number): Document {
  const study = estimatesOf(batch);
  const { temperature, heat } = study.step.reaction;
  const rise = (study.mtsrAt(temperature) ?? Number.NaN) - temperature;
  return changed(
    changed(batch, "/reaction/temperature", { value: `${temperature} K`, standardError: `${first} K` }),
    "/reaction/heat",
    { value: `${heat} J/mol`, standardError: `${(second / rise) * -heat} J/mol` },
  );
}

describe("drivers of MTSR in a batch, MTSR = Tp + nA (-dH)/(m c)", () => {
  test("have the shares that two normal inputs have by hand, s^2 over the sum", () => {
    for (const [first, second] of [
      [2, 1],
      [1, 1],
      [0.5, 1.5],
    ] as const) {
      const shares = sharesOf(driversOf(twoErrors(first, second)), "mtsr_K");
      const byHand = first ** 2 / (first ** 2 + second ** 2);
      expect(Math.abs((shares.get("/reaction/temperature") ?? Number.NaN) - byHand)).toBeLessThan(0.01);
      expect(Math.abs((shares.get("/reaction/heat") ?? Number.NaN) - (1 - byHand))).toBeLessThan(0.01);
    }
  });

  test("add up to one and stand in falling order behind the inputs without an error", () => {
    for (const name of ["batch-ring-closure", "semibatch-acylation"]) {
      for (const { shares, why } of driversOf(documentOf(name))) {
        const told = shares.flatMap(({ share }) => (share === null ? [] : [share]));
        expect(shares.slice(shares.length - told.length).map(({ share }) => share)).toEqual(told);
        expect(told).toEqual([...told].sort((a, b) => b - a));
        if (why === null) expect(told.reduce((sum, each) => sum + each, 0)).toBeCloseTo(1, 12);
        else expect(told).toEqual([]);
      }
    }
  });
});

describe("an input without an error", () => {
  test("stands first by name where the figure depends on it, and is left out where it does not", () => {
    const [first] = driversOf(twoErrors(1, 1)).filter(({ output }) => output === "mtsr_K");
    const bare = first?.shares.filter(({ share }) => share === null);
    expect(bare?.map(({ pointer }) => pointer)).toEqual([
      "/mixture/mass",
      "/mixture/heatCapacity",
      "/reaction/reactants/A/amount",
    ]);
    expect(bare?.map(({ label }) => label)).toEqual([
      "mass of the mixture",
      "specific heat capacity of the mixture",
      "amount of A",
    ]);
  });

  test("is not one whose error was typed as zero", () => {
    const document = changed(twoErrors(1, 1), "/mixture/mass", { value: "1900 kg", standardError: "0 kg" });
    expect(sharesOf(driversOf(document), "mtsr_K").has("/mixture/mass")).toBe(false);
  });
});

describe("T_D24", () => {
  test("typed as such is driven by its own error alone, not by the energy that goes with it", () => {
    const document = changed(batch, "/decomposition/rateConstant", {
      form: "td24",
      temperature: { value: "95 degC", standardError: "3 K" },
      activationEnergy: { value: "120 kJ/mol", standardError: "6 kJ/mol" },
    });
    const shares = sharesOf(driversOf(document), "td24_K");
    expect(shares.get("/decomposition/rateConstant/temperature")).toBeGreaterThan(0.9999);
    expect(shares.get("/decomposition/rateConstant/activationEnergy")).toBeLessThan(1e-4);
  });

  test("counts the activation pair as one input", () => {
    const pointers = [...sharesOf(driversOf(documentOf("batch-ring-closure")), "td24_K").keys()];
    expect(pointers.filter((each) => each.startsWith("/decomposition/rateConstant"))).toEqual([
      "/decomposition/rateConstant",
    ]);
  });
});

test("an error that alone leaves nothing of the window is named, and no shares are told", () => {
  const { heat } = estimatesOf(documentOf("batch-hydrolysis")).step.reaction;
  const document = changed(documentOf("batch-hydrolysis"), "/reaction/heat", {
    value: `${heat} J/mol`,
    standardError: `${-heat} J/mol`,
  });
  const upper = driversOf(document).find(({ output }) => output === "upper_K");
  expect(upper?.why).toContain("nothing is left of the window");
  expect(upper?.why).toContain("heat of reaction");
  expect(upper?.shares.every(({ share }) => share === null)).toBe(true);
});

test("a window that is empty at the estimates has no upper end to be moved", () => {
  expect(driversOf(documentOf("batch-ring-closure")).map(({ output }) => output)).toEqual([
    "td24_K",
    "mtsr_K",
  ]);
});

test("the same case has the same drivers to the last digit", () => {
  const document = documentOf("semibatch-acylation");
  expect(driversOf(document)).toEqual(driversOf(document));
});
