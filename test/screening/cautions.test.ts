import { describe, expect, test } from "vitest";
import { levels } from "../../server/screening/cautions/catalogue.js";
import { screen } from "../../server/screening/screen.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

type Change = readonly [path: string, value: unknown];

const ring = documentOf("batch-ring-closure");
const acylation = documentOf("semibatch-acylation");
const hydrolysis = documentOf("batch-hydrolysis");

function cautionsOf(document: Document, changes: readonly Change[]) {
  const altered = changes.reduce<Document>((made, [path, value]) => changed(made, path, value), document);
  return screen(modelOf(altered), { digest: "", depth: "quick" }).cautions;
}

const smallFit = {
  form: "table",
  fitAs: "arrhenius",
  rows: [
    { temperature: "40 degC", rateConstant: "1.0e-5 s^-1" },
    { temperature: "50 degC", rateConstant: "3.0e-5 s^-1" },
    { temperature: "60 degC", rateConstant: "8.5e-5 s^-1" },
    { temperature: "70 degC", rateConstant: "2.3e-4 s^-1" },
  ],
};
const bent = {
  ...smallFit,
  rows: smallFit.rows
    .map((row, i) => (i === 3 ? { ...row, rateConstant: "1.0e-4 s^-1" } : row))
    .concat([
      { temperature: "80 degC", rateConstant: "1.1e-4 s^-1" },
      { temperature: "30 degC", rateConstant: "3.0e-6 s^-1" },
    ]),
};
const wholeErrors: readonly Change[] = [
  ["/vessel/heatTransferCoefficient", { value: "280 W/(m^2 K)", standardError: "20 W/(m^2 K)" }],
];

/** Each caution by a case that raises it and one that does not. */
const pairs: readonly {
  readonly code: keyof typeof levels;
  readonly from: Document;
  readonly raised: readonly Change[];
  readonly not: readonly Change[];
}[] = [
  { code: "PROCESS_ABOVE_LIMIT", from: ring, raised: [["/reaction/temperature", "90 degC"]], not: [] },
  { code: "CANNOT_HOLD", from: ring, raised: [["/vessel/heatTransferArea", "0.3 m^2"]], not: [] },
  { code: "WINDOW_EMPTY", from: ring, raised: [], not: [["/reaction/reactants/A/amount", "0.3 kmol"]] },
  { code: "OUTSIDE_WINDOW", from: acylation, raised: [["/reaction/temperature", "28 degC"]], not: [] },
  { code: "CLASS_5", from: ring, raised: [], not: [["/reaction/reactants/A/amount", "0.1 kmol"]] },
  {
    code: "CLASS_4",
    from: ring,
    raised: [["/limits/maximumTechnicalTemperature", "87 degC"]],
    not: [],
  },
  {
    code: "CLASS_3",
    from: acylation,
    raised: [["/limits/maximumTechnicalTemperature", "45 degC"]],
    not: [],
  },
  { code: "NOT_ASSESSED", from: acylation, raised: [["/decomposition", undefined]], not: [] },
  {
    code: "NOT_COMPUTED",
    from: ring,
    raised: [["/decomposition/rateConstant/activationEntropy", "900 J/(mol K)"]],
    not: [],
  },
  { code: "EXTRAPOLATED", from: acylation, raised: [], not: [["/reaction/temperature", "30 degC"]] },
  {
    code: "NO_RANGE",
    from: hydrolysis,
    raised: [["/reaction/rateConstant/fittedRange", undefined]],
    not: [],
  },
  {
    code: "NO_ERRORS",
    from: ring,
    raised: [],
    not: wholeErrors,
  },
  {
    code: "CORRELATION_DOUBTFUL",
    from: acylation,
    raised: [["/reaction/rateConstant/correlation", 0.9]],
    not: [],
  },
  {
    code: "FORMS_PART",
    from: hydrolysis,
    raised: [["/reaction/temperature", "220 degC"]],
    not: [],
  },
  {
    code: "BARRIER_ODD",
    from: hydrolysis,
    raised: [["/reaction/rateConstant/activationEnergy", "-4 kJ/mol"]],
    not: [],
  },
  {
    code: "ENTROPY_ODD",
    from: acylation,
    raised: [["/reaction/rateConstant/activationEntropy", "20 J/(mol K)"]],
    not: [],
  },
  {
    code: "DIFFUSION_LIMIT",
    from: acylation,
    raised: [
      ["/reaction/rateConstant/activationEnthalpy", "2 kJ/mol"],
      ["/reaction/rateConstant/activationEntropy", "0 J/(mol K)"],
    ],
    not: [],
  },
  {
    code: "CURVED_FIT",
    from: ring,
    raised: [["/reaction/rateConstant", bent]],
    not: [["/reaction/rateConstant", smallFit]],
  },
  {
    code: "CLOSED_FORM_UNSAFE",
    from: ring,
    raised: [],
    not: [["/decomposition/rateLaw", { model: "order", order: 1 }]],
  },
  {
    code: "NO_ACCELERATION",
    from: ring,
    raised: [
      ["/decomposition/heat", "5 J/g"],
      ["/decomposition/rateLaw", { model: "order", order: 3 }],
    ],
    not: [],
  },
  { code: "HISTORY", from: ring, raised: [], not: [["/limits/availableTime", "1 h"]] },
  { code: "INERTIA", from: ring, raised: [["/mixture/thermalInertia", 1.1]], not: [] },
  {
    code: "COOLANT_HEATS",
    from: hydrolysis,
    raised: [["/vessel/coolant/temperature", "30 degC"]],
    not: [],
  },
  { code: "UNSTABLE", from: ring, raised: [], not: [["/reaction/temperature", "75 degC"]] },
  {
    code: "MEASURED_ACCUMULATION",
    from: acylation,
    raised: [
      [
        "/reaction/measuredAccumulation",
        {
          temperature: "10 degC",
          rows: [
            { time: "1 h", releasedFraction: 0.2 },
            { time: "3 h", releasedFraction: 0.9 },
          ],
        },
      ],
    ],
    not: [],
  },
  { code: "NO_BAND", from: ring, raised: [], not: [["/limits/controlBand", "1 K"]] },
  {
    code: "ASSUMED_INPUT",
    from: ring,
    raised: [["/mixture/density", { value: "0.91 kg/L", basis: "assumed" }]],
    not: [["/mixture/density", { value: "0.91 kg/L", basis: "measured" }]],
  },
];

describe("each caution is raised where it should be, and only there", () => {
  test.each(pairs)("$code", ({ code, from, raised, not }) => {
    const found = cautionsOf(from, raised).find((each) => each.code === code);
    expect(found?.text.length).toBeGreaterThan(20);
    if (code !== "EXTRAPOLATED") expect(found?.level).toBe(levels[code]);
    expect(cautionsOf(from, not).map((each) => each.code)).not.toContain(code);
  });

  test("PRESSURE, always", () => {
    for (const document of [ring, acylation, hydrolysis]) {
      expect(cautionsOf(document, []).map((each) => each.code)).toContain("PRESSURE");
    }
  });

  test("EXTRAPOLATED is a note within 10 K, a warning beyond, and plainer from 40 K on", () => {
    const at = (temperature: string) =>
      cautionsOf(hydrolysis, [["/reaction/temperature", temperature]]).find(
        (each) => each.code === "EXTRAPOLATED",
      );
    expect(at("44 degC")).toBeUndefined();
    expect(at("54 degC")?.level).toBe("note");
    expect(at("56 degC")?.level).toBe("warn");
    expect(at("56 degC")?.text).not.toMatch(/measure nearer/);
    expect(at("86 degC")?.text).toMatch(/measure nearer/);
    expect(at("5 degC")?.text).toMatch(/5 K below/);
  });

  test("stops come first, then warnings, then notes", () => {
    const order = cautionsOf(ring, [["/vessel/heatTransferArea", "0.3 m^2"]]).map((each) => each.level);
    expect(order).toEqual(
      [...order].sort((a, b) => ["stop", "warn", "note"].indexOf(a) - ["stop", "warn", "note"].indexOf(b)),
    );
    expect(order[0]).toBe("stop");
  });
});
