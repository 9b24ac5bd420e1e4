import { readFileSync } from "node:fs";

/** A JSON object. */
export type Fields = { [key: string]: unknown };

/** A demo case by its file name; a fresh copy at each call. */
export function demo(name: string): Fields {
  return JSON.parse(readFileSync(new URL(`../../scenarios/${name}.json`, import.meta.url), "utf8"));
}

/** Names of the demo cases. */
export const demos = ["ring-closure", "hydrolysis", "acylation", "published-oncb"] as const;

/**
 * A copy of a document with another value at a JSON pointer; undefined takes the field out. Groups on
 * the way are made where they are missing.
 */
export function edited(document: unknown, pointer: string, value: unknown): Fields {
  const copy: Fields = structuredClone(document) as Fields;
  const path = pointer.split("/").slice(1);
  const last = path.pop() ?? "";
  let at = copy;
  for (const key of path) {
    at[key] ??= {};
    at = at[key] as Fields;
  }
  if (value === undefined) delete at[last];
  else
    Object.defineProperty(at, last, {
      value,
      enumerable: true,
      configurable: true,
      writable: true,
    });
  return copy;
}

const noted = (value: string, standardError: string) => ({
  value,
  standardError,
  source: "Notebook 14, p. 31",
  basis: "measured",
});

const pair = {
  correlation: 0.99,
  fittedRange: ["5 degC", "30 degC"],
  points: 6,
};

/** Every form of a rate constant of overall order 2. */
const secondOrderRates: readonly Fields[] = [
  {
    form: "eyring",
    activationEnthalpy: noted("62 kJ/mol", "1.6 kJ/mol"),
    activationEntropy: noted("-95 J/(mol K)", "5.5 J/(mol K)"),
    standardConcentration: "1 mol/L",
    transmissionCoefficient: 1,
    ...pair,
    viscosity: "0.8 mPa s",
  },
  {
    form: "arrhenius",
    preExponential: noted("4.1e7 L/(mol s)", "1e7 L/(mol s)"),
    activationEnergy: noted("64 kJ/mol", "1 kJ/mol"),
    ...pair,
    viscosity: "0.8 mPa s",
  },
  {
    form: "arrhenius",
    lnPreExponential: { value: 17.5, standardError: 0.2, unit: "L/(mol s)" },
    activationEnergy: "64 kJ/mol",
  },
  {
    form: "reference",
    rateConstant: noted("3e-4 L/(mol s)", "2e-5 L/(mol s)"),
    at: noted("25 degC", "0.2 K"),
    activationEnergy: "64 kJ/mol",
    fittedRange: ["5 degC", "30 degC"],
  },
  {
    form: "table",
    fitAs: "arrhenius",
    rows: [
      {
        temperature: "5 degC",
        rateConstant: "4.0e-5 L/(mol s)",
        relativeError: 0.05,
      },
      {
        temperature: "15 degC",
        rateConstant: noted("1.0e-4 L/(mol s)", "5e-6 L/(mol s)"),
      },
      { temperature: "25 degC", rateConstant: "2.6e-4 L/(mol s)" },
      {
        temperature: "35 degC",
        rateConstant: "9.9e-3 L/(mol s)",
        leftOut: "sample warmed up on the way",
      },
    ],
    viscosity: "0.8 mPa s",
  },
];

/** What only a decomposition may state. */
export const decompositionOnlyRates: readonly Fields[] = [
  {
    form: "heatRate",
    heatReleaseRate: noted("12 W/kg", "2 W/kg"),
    at: "140 degC",
    activationEnergy: "128 kJ/mol",
  },
  {
    form: "td24",
    temperature: noted("78 degC", "3 K"),
    activationEnergy: "128 kJ/mol",
  },
];

/** Rate laws of a decomposition. */
const rateLaws: readonly Fields[] = [
  { model: "order", order: 1 },
  {
    model: "autocatalytic",
    order: {
      value: 1,
      standardError: 0.1,
      source: "Fit of run 7",
      basis: "estimated",
    },
    productOrder: 1,
    initiation: { value: 0.02, standardError: 0.005 },
  },
];

const level = {
  innerDiameter: "1.4 m",
  fillVolume: "1800 L",
  jacketLower: "0 m",
  jacketUpper: "1.5 m",
};

/** Every bottom that an area can be worked out for. */
const areas: readonly Fields[] = [
  { bottom: "flat", ...level },
  { bottom: "ellipsoidal", ...level },
  {
    bottom: "torispherical",
    ...level,
    dishRadius: "1.4 m",
    knuckleRadius: "0.14 m",
  },
  { bottom: "kloepper", ...level, wallThickness: "10 mm" },
  { bottom: "korbbogen", ...level, wallThickness: "10 mm" },
];

/** Both ways to work a boiling point out. */
const boilingPoints: readonly Fields[] = [
  {
    method: "clausius-clapeyron",
    normalBoilingPoint: "78 degC",
    heatOfVaporisation: "38.6 kJ/mol",
    pressure: "1.5 bar",
  },
  {
    method: "antoine",
    a: 5.2,
    b: 1600,
    c: 226,
    pressureUnit: "bar",
    temperatureUnit: "degC",
    lowest: "0 degC",
    highest: "100 degC",
    pressure: "1.5 bar",
  },
];

/** A limit in each of its shapes. */
const maximumTemperatures: readonly unknown[] = [
  "78 degC",
  {
    value: "78 degC",
    standardError: "2 K",
    source: "Note 3",
    basis: "boiling point at 1 atm",
  },
  {
    value: { value: "78 degC", standardError: "2 K", source: "Note 3" },
    basis: "boiling point at 1 atm",
  },
];

/** A semibatch case with everything that a case can hold. Invented. */
export function completeCase(): Fields {
  const document = demo("acylation");
  return {
    ...document,
    batch: {
      record: "DEMO-1",
      step: "Step 3",
      vessel: "V-1",
      preparedBy: "A. Person",
    },
    reaction: {
      ...(document.reaction as Fields),
      rateConstant: secondOrderRates[0],
      measuredAccumulation: {
        temperature: "35 degC",
        rows: [
          { time: "0 h", releasedFraction: 0 },
          { time: "1 h", releasedFraction: 0.28 },
          { time: "3 h", releasedFraction: 0.9 },
        ],
      },
    },
    vessel: {
      ...(document.vessel as Fields),
      heatTransferAreaFrom: areas[2],
      heatTransferCoefficientFrom: {
        insideFilm: "900 W/(m^2 K)",
        outsideFilm: "1200 W/(m^2 K)",
        wallThickness: "12 mm",
        wallConductivity: "15 W/(m K)",
        liningThickness: "1.5 mm",
        liningConductivity: "1.1 W/(m K)",
        insideFouling: "0.0002 m^2 K/W",
        outsideFouling: "0.0001 m^2 K/W",
        jacketMedium: "brine",
        wall: "glassLined",
        contents: "organics",
      },
    },
    limits: {
      ...(document.limits as Fields),
      maximumTechnicalTemperatureFrom: boilingPoints[0],
      decompositionAllowed: 0.05,
      controlBand: "1 K",
    },
    failures: [
      {
        name: "Everything at once",
        at: "1 h",
        startTemperature: "37 degC",
        horizon: "30 h",
        response: { detection: "2 min", decision: "5 min", action: "3 min" },
        changes: [
          {
            after: "0 min",
            coolantFlow: 0,
            heatTransfer: 0.2,
            coolantTemperature: "20 degC",
            feed: "continue",
            agitator: "off",
            mixing: 0,
          },
          {
            after: "20 min",
            feed: "stop",
            agitator: "on",
            quench: {
              mass: "300 kg",
              heatCapacity: "4.18 kJ/(kg K)",
              density: "1 kg/L",
              temperature: "15 degC",
            },
          },
        ],
      },
    ],
    slips: [
      {
        name: "All of it slips",
        chargeOfA: 1.1,
        chargeOfB: 0.9,
        fedAmount: 1.1,
        solvent: 0.8,
        rate: 2,
        feedDuration: 0.5,
        heatTransfer: 0.5,
        feedTemperature: "20 K",
        temperature: "-5 K",
        coolantTemperature: "10 K",
      },
    ],
  };
}

/** Complete cases that together make every choice there is. */
export function everyChoice(): Fields[] {
  const base = completeCase();
  const variations: [string, readonly unknown[]][] = [
    ["/reaction/rateConstant", secondOrderRates],
    ["/decomposition/rateConstant", [...firstOrderRates(), ...decompositionOnlyRates]],
    ["/decomposition/rateLaw", rateLaws],
    ["/vessel/heatTransferAreaFrom", areas],
    ["/limits/maximumTechnicalTemperatureFrom", boilingPoints],
    ["/limits/maximumTechnicalTemperature", maximumTemperatures],
  ];
  return variations.flatMap(([pointer, values]) => values.map((value) => edited(base, pointer, value)));
}

/** The same forms for a rate constant per time. */
function firstOrderRates(): Fields[] {
  const text = JSON.stringify(secondOrderRates).replaceAll("L/(mol s)", "1/s");
  return JSON.parse(text);
}
