import { readCase } from "../../server/case/read.js";
import type { Caution, FailureFindings, Findings, RateFindings } from "../../server/screening/findings.js";

// Every name and figure here is invented: it only has to have the shape of a real case.

/** A whole case document. */
export const inventedDocument = {
  format: "thermal-window/case-1",
  title: "Invented acylation of amine X-1 in a 2.5 m³ vessel",
  batch: {
    record: "INVENTED-0001",
    step: "Step 3, acylation",
    vessel: "V-000",
    preparedBy: "A. N. Author",
  },
  mixture: {
    mass: { value: "1450 kg", basis: "measured", source: "Batch sheet" },
    density: { value: "0.94 kg/L", basis: "assumed" },
    heatCapacity: {
      value: "1.95 kJ/(kg K)",
      standardError: "0.05 kJ/(kg K)",
      basis: "measured",
      source: "Notebook 14, p. 31",
    },
  },
  reaction: {
    name: "Acylation",
    operation: "semibatch",
    temperature: "35 °C",
    reactants: {
      A: { name: "amine X-1", amount: "2.9 kmol" },
      B: { name: "acylating agent", amount: "3.05 kmol" },
    },
    feed: {
      reactant: "B",
      mass: "420 kg",
      density: "1.05 kg/L",
      heatCapacity: "1.8 kJ/(kg K)",
      temperature: "20 °C",
      duration: "3 h",
    },
    heat: {
      value: "−118 kJ·mol⁻¹",
      standardError: "4 kJ/mol",
      source: "Heat flow run 7",
    },
    rateConstant: {
      form: "table",
      fitAs: "eyring",
      rows: [
        { temperature: "5 °C", rateConstant: "2.1e-4 L/(mol s)" },
        { temperature: "15 °C", rateConstant: "5.4e-4 L/(mol s)" },
        {
          temperature: "25 °C",
          rateConstant: "1.18e-3 L/(mol s)",
          relativeError: 0.05,
        },
        {
          temperature: "30 °C",
          rateConstant: "9e-3 L/(mol s)",
          leftOut: "stirrer stood still",
        },
      ],
    },
  },
  decomposition: {
    heat: { value: "420 J/g", standardError: "25 J/g" },
    rateLaw: { model: "order", order: 1 },
    rateConstant: {
      form: "arrhenius",
      preExponential: "4.0e11 s^-1",
      activationEnergy: "128 kJ/mol",
    },
  },
  vessel: {
    heatTransferCoefficient: {
      value: "320 W/(m² K)",
      basis: "estimated",
      source: "Cooling curve",
    },
    heatTransferArea: "5.6 m²",
    agitatorPower: "2 kW",
    coolant: {
      temperature: "5 °C",
      flow: "4.5 kg/s",
      heatCapacity: "3.6 kJ/(kg K)",
      holdup: "180 kg",
    },
  },
  limits: {
    maximumTechnicalTemperature: {
      value: "78 °C",
      basis: "boiling point at 1 atm",
    },
    lowestTemperature: "0 °C",
    highestTemperature: "80 °C",
    availableTime: "8 h",
    controlBand: "2 K",
  },
  failures: [
    {
      name: "Coolant pump stops, feed runs on",
      response: { detection: "2 min", decision: "5 min", action: "3 min" },
      changes: [
        { after: "0 min", coolantFlow: 0, feed: "continue" },
        {
          after: "30 min",
          quench: {
            mass: "300 kg",
            heatCapacity: "2 kJ/(kg K)",
            density: "0.87 kg/L",
            temperature: "15 °C",
          },
        },
      ],
    },
  ],
};

const read = readCase(inventedDocument);
if (!read.ok) throw new Error(JSON.stringify(read.faults));

export const inventedModel = read.model;

const rate: RateFindings = {
  atProcess: {
    temperature_K: 308.15,
    k: 2.167e-6,
    unit: "m³/(mol s)",
    low95: 1.81e-6,
    high95: 2.59e-6,
    extrapolation_K: 5,
    apparentActivationEnergy_J_mol: 64562,
  },
  table: [278.15, 288.15, 298.15, 308.15, 318.15].map((temperature_K) => {
    const k = 2.167e-6 * Math.exp(7765 * (1 / 308.15 - 1 / temperature_K));
    return {
      temperature_K,
      k,
      low95: 0.84 * k,
      high95: 1.19 * k,
      extrapolated: temperature_K > 303.15,
    };
  }),
  eyring: {
    activationEnthalpy_J_mol: 62000,
    activationEntropy_J_molK: -95,
    activationEnthalpyError_J_mol: 1600,
    activationEntropyError_J_molK: 5.5,
    correlation: 0.998,
    standardConcentration_mol_m3: 1000,
    transmissionCoefficient: 1,
    equivalentAt_K: null,
  },
  arrhenius: {
    lnPreExponential: 12.17,
    activationEnergy_J_mol: 64562,
    lnPreExponentialError: null,
    activationEnergyError_J_mol: null,
    correlation: null,
    equivalentAt_K: 308.15,
  },
  fittedRange_K: [278.15, 303.15],
  fit: null,
};

const failure: FailureFindings = {
  name: "Coolant pump stops, feed runs on",
  startedAt_s: 0,
  peak_K: 420,
  peakAt_s: 9000,
  timeToMtt_s: 4752.2,
  timeToTd24_s: 7666.9,
  maximumRate_K_s: 0.02,
  timeToMaximumRate_s: 5000,
  conversion: 0.99,
  decomposed: 0.1,
  beyondModel: true,
  mixingAssumed: null,
  verdict: "act",
  timeToAct_s: 4748.07,
  margin_s: 3548.07,
  alarm_K: 318,
  trace: [0, 1200, 2400, 3600, 4752, 6000].map((time_s) => {
    const temperature_K = 308.15 + 43 * (time_s / 4752) ** 2;
    return { time_s, temperature_K, jacket_K: temperature_K - 5 };
  }),
};

const cautions: readonly Caution[] = [
  {
    code: "EXTRAPOLATED",
    level: "note",
    text: "The rate constant is used 5.0 K above its fitted range of 5.0 to 30.0 °C.",
    about: "/reaction/rateConstant",
  },
  {
    code: "FEED_RUNS_ON",
    level: "warn",
    text: "“Coolant pump stops, feed runs on” lets the feed run on: MTSR does not cover it.",
    about: "/failures/0",
  },
  {
    code: "PRESSURE",
    level: "note",
    text: "Gas, vapour pressure and relief are not assessed.",
    about: "",
  },
];

export const inventedStop: Caution = {
  code: "ACT_TOO_LATE",
  level: "stop",
  text: "“Coolant pump stops, feed runs on”: the time to act is shorter than the response.",
  about: "/failures/0",
};

export const inventedFindings: Findings = {
  format: "thermal-window/findings-1",
  notice:
    "Screening estimate, not a basis of safety. It must be reviewed by a qualified process-safety professional before any use in a plant. Local codes, site rules and licensed practice take precedence. Perfect mixing, a closed recipe and the stated kinetics are assumed; gas, pressure and relief are not assessed.",
  program: { name: "thermal-window", version: "0.0.0" },
  digest: "0123456789abcdef".repeat(4),
  rate,
  decompositionRate: null,
  heat: {
    adiabaticRise_K: 95.49,
    severity: "medium",
    decompositionRise_K: 219.17,
    decompositionSeverity: "high",
  },
  accumulation: {
    maximumFraction: 0.13646,
    at_s: 10268.9,
    curve: [],
    measured: null,
    usedFor: "kinetics",
  },
  temperatures: {
    process_K: 308.15,
    mtsr_K: 321.31782,
    mtt_K: 351.15,
    td24_K: 373.99656,
    allAtOnce_K: 401.2,
  },
  timeToMaximumRate: {
    atProcess_s: 377062206,
    atMtsr_s: 53185353,
    zeroOrderAtProcess_s: 350119979,
    zeroOrderCautious: true,
    likelihood: "low",
    curve: [300, 320, 340, 360, 380, 400].map((temperature_K) => {
      const time_s = 86400 * Math.exp(15395 * (1 / temperature_K - 1 / 373.99656));
      return { temperature_K, time_s, zeroOrder_s: 0.93 * time_s };
    }),
  },
  criticality: { class: 1, probability: null },
  cooling: {
    duty_W: 33052.9,
    capacity_W: 48405.5,
    use: 0.6828,
    stabilityRatio: 1.627,
    noReturn_K: null,
    tangency_K: null,
    criticalCoolant_K: null,
    curve: [],
  },
  window: {
    lower_K: 303.51487,
    upper_K: 348.03124,
    lowerSetBy: "cooling",
    upperSetBy: "mtsr-mtt",
    incomplete: false,
    containsProcess: true,
    controlBand_K: 2,
    lowest_K: 273.15,
    highest_K: 353.15,
    allowed: [[303.51487, 348.03124]],
    conflict: null,
    cautious: { lower_K: 305.2, upper_K: 344.8 },
    criteria: [
      {
        key: "completion",
        label: "done in time",
        binding: true,
        assessed: true,
        allowed: [[295.728, 353.15]],
        cautious: [[297, 353.15]],
        metAtProcess: true,
        probability: 1,
      },
      {
        key: "cooling",
        label: "cooling suffices",
        binding: true,
        assessed: true,
        allowed: [[303.51487, 353.15]],
        cautious: [[305.2, 353.15]],
        metAtProcess: true,
        probability: 0.99,
      },
      {
        key: "stability",
        label: "steadies itself",
        binding: false,
        assessed: true,
        allowed: [],
        cautious: [],
        metAtProcess: false,
        probability: 0,
      },
      {
        key: "mtsr-mtt",
        label: "MTSR below MTT",
        binding: true,
        assessed: true,
        allowed: [[273.15, 348.03124]],
        cautious: [[273.15, 344.8]],
        metAtProcess: true,
        probability: 1,
      },
      {
        key: "mtsr-tmr",
        label: "TMRad from MTSR",
        binding: true,
        assessed: true,
        allowed: [[273.15, 353.15]],
        cautious: null,
        metAtProcess: true,
        probability: null,
      },
      {
        key: "hold",
        label: "TMRad from Tp",
        binding: true,
        assessed: false,
        allowed: [],
        cautious: null,
        metAtProcess: null,
        probability: null,
      },
    ],
    feedLever: null,
  },
  failures: [
    {
      ...failure,
      name: "Agitator stops, restarts after 40 min",
      verdict: "holds",
      timeToAct_s: null,
      margin_s: null,
      peak_K: 325.76,
      beyondModel: false,
      timeToMtt_s: null,
      timeToTd24_s: null,
    },
    failure,
  ],
  uncertainty: {
    draws: 2000,
    seed: 1,
    td24_K: { p05: 370.1, p50: 374, p95: 378.2 },
    mtsr_K: { p05: 318, p50: 321.3, p95: 325.01 },
    upper_K: { p05: 344.8, p50: 348, p95: 350.9 },
    timeToMaximumRateAtProcess_s: null,
    timeToMaximumRateAtMtsr_s: null,
    coolingUse: null,
    timeToAct_s: { p05: 4100, p50: 4748, p95: 5300 },
    drivers: null,
    nextMeasurement: null,
  },
  workings: [],
  cautions,
};

/** The same case with a stop. */
export const stoppedFindings: Findings = {
  ...inventedFindings,
  cautions: [inventedStop, ...cautions],
};
