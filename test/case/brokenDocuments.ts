import { completeCase, decompositionOnlyRates, demo, edited, type Fields } from "./completeCases.js";

/** A document that must be refused. */
export interface BrokenDocument {
  readonly name: string;
  readonly document: unknown;
  /** where at least one of its faults lies */
  readonly pointer: string;
}

/** Values that no field takes, whatever it is. */
const neverRight: readonly (readonly [string, unknown])[] = [
  ["null", null],
  ["a list", ["5 kg"]],
  ["true", true],
  ["a deep group", { a: { b: { c: {} } } }],
];

/** Texts that are no quantity of any kind. */
const neverQuantities: readonly (readonly [string, unknown])[] = [
  ["a bare number", 5],
  ["text without a unit", "5"],
  ["text without a number", "kg"],
  ["empty text", ""],
  ["a decimal comma", "0,5 kg"],
  ["an unknown unit", "5 flurbs"],
  ["another dimension", "5 A m^7"],
  ["too large a number", "1e400 kg"],
  ["a formula", "=2*3 kg"],
  ["a script", "<script>alert(1)</script>"],
  ["a value that is no text", { value: 5 }],
  ["no value", { standardError: "1 K" }],
  ["ten thousand characters", "9".repeat(1e4)],
];

const quantities = [
  "/mixture/mass",
  "/mixture/density",
  "/mixture/heatCapacity",
  "/reaction/temperature",
  "/reaction/feed/duration",
  "/reaction/heat",
  "/reaction/rateConstant/activationEntropy",
  "/decomposition/heat",
  "/vessel/heatTransferCoefficient",
  "/vessel/coolant/temperature",
  "/limits/maximumTechnicalTemperature",
  "/failures/0/changes/0/after",
];

const required = [
  "/format",
  "/title",
  "/mixture",
  "/mixture/mass",
  "/mixture/density",
  "/mixture/heatCapacity",
  "/reaction",
  "/reaction/operation",
  "/reaction/temperature",
  "/reaction/reactants",
  "/reaction/reactants/A",
  "/reaction/reactants/A/amount",
  "/reaction/reactants/B/amount",
  "/reaction/feed/reactant",
  "/reaction/feed/mass",
  "/reaction/feed/density",
  "/reaction/feed/heatCapacity",
  "/reaction/feed/temperature",
  "/reaction/feed/duration",
  "/reaction/heat",
  "/reaction/rateConstant/form",
  "/reaction/rateConstant/activationEnthalpy",
  "/reaction/rateConstant/activationEntropy",
  "/reaction/measuredAccumulation/temperature",
  "/reaction/measuredAccumulation/rows",
  "/decomposition/heat",
  "/decomposition/rateLaw",
  "/decomposition/rateLaw/model",
  "/decomposition/rateConstant",
  "/decomposition/rateConstant/preExponential",
  "/decomposition/rateConstant/activationEnergy",
  "/vessel",
  "/vessel/heatTransferCoefficient",
  "/vessel/heatTransferArea",
  "/vessel/heatGain/ambient",
  "/vessel/coolant",
  "/vessel/coolant/temperature",
  "/vessel/coolant/flow",
  "/vessel/coolant/holdup",
  "/vessel/heatTransferAreaFrom/knuckleRadius",
  "/vessel/heatTransferCoefficientFrom/liningConductivity",
  "/limits",
  "/limits/maximumTechnicalTemperature",
  "/limits/lowestTemperature",
  "/limits/highestTemperature",
  "/limits/availableTime",
  "/failures/0/name",
  "/failures/0/changes",
  "/failures/0/changes/0/after",
  "/failures/0/changes/0/heatTransfer",
  "/failures/0/response/action",
  "/failures/0/changes/1/quench/density",
  "/slips/0/name",
];

const notAboveZero = [
  ["/mixture/mass", "0 kg"],
  ["/mixture/density", "-1 kg/L"],
  ["/mixture/heatCapacity", "0 J/(kg K)"],
  ["/reaction/reactants/A/amount", "0 mol"],
  ["/reaction/feed/mass", "-420 kg"],
  ["/reaction/feed/duration", "0 h"],
  ["/decomposition/heat", "-420 J/g"],
  ["/decomposition/rateConstant/preExponential", "0 1/s"],
  ["/vessel/heatTransferArea", "0 m^2"],
  ["/vessel/heatTransferCoefficient", "-1 W/(m^2 K)"],
  ["/vessel/heatGain/coefficient", "0 W/K"],
  ["/vessel/coolant/flow", "0 kg/s"],
  ["/vessel/agitatorPower", "-1 W"],
  ["/limits/availableTime", "0 h"],
  ["/limits/controlBand", "-1 K"],
  ["/reaction/temperature", "0 K"],
  ["/reaction/temperature", "-300 degC"],
] as const;

const numbers = [
  ["/mixture/thermalInertia", 0.9],
  ["/reaction/reactants/A/order", 0],
  ["/reaction/reactants/A/order", 3.01],
  ["/reaction/reactants/B/order", -1],
  ["/reaction/reactants/B/perA", 0],
  ["/reaction/rateConstant/correlation", 1],
  ["/reaction/rateConstant/correlation", -1],
  ["/reaction/rateConstant/points", 2.5],
  ["/reaction/rateConstant/transmissionCoefficient", 0],
  ["/decomposition/rateLaw/order", -0.1],
  ["/limits/targetConversion", 0],
  ["/limits/targetConversion", 1.01],
  ["/limits/coolingUse", 1.2],
  ["/limits/coolingUse", "0.8"],
  ["/limits/decompositionAllowed", 0],
  ["/failures/0/changes/0/coolantFlow", 1.01],
  ["/failures/0/changes/0/heatTransfer", -0.1],
  ["/failures/0/changes/0/mixing", "none"],
  ["/slips/0/rate", 0],
  ["/reaction/measuredAccumulation/rows/1/releasedFraction", 1.5],
] as const;

const rows = (...typed: readonly (readonly [string, string])[]) => ({
  form: "table",
  fitAs: "eyring",
  rows: typed.map(([temperature, rateConstant]) => ({
    temperature,
    rateConstant,
  })),
});

/** What fields must have to do with each other: name, pointer changed, its value, pointer of the fault. */
const together: readonly (readonly [string, string, unknown, string])[] = [
  ["a feed in a batch", "/reaction/operation", "batch", "/reaction/feed"],
  ["semibatch without a feed", "/reaction/feed", undefined, "/reaction/feed"],
  ["B is fed, but there is none", "/reaction/reactants/B", undefined, "/reaction/feed/reactant"],
  ["an endothermic reaction", "/reaction/heat", "20 kJ/mol", "/reaction/heat"],
  ["no heat of reaction", "/reaction/heat", "0 kJ/mol", "/reaction/heat"],
  [
    "a standard error below zero",
    "/mixture/mass",
    { value: "5 kg", standardError: "-1 kg" },
    "/mixture/mass/standardError",
  ],
  [
    "a standard error of another dimension",
    "/mixture/mass",
    { value: "5 kg", standardError: "1 L" },
    "/mixture/mass/standardError",
  ],
  [
    "a basis that is none of the words",
    "/mixture/mass",
    { value: "5 kg", basis: "guessed" },
    "/mixture/mass/basis",
  ],
  ["an unknown key in a quantity", "/mixture/mass", { value: "5 kg", error: "1 kg" }, "/mixture/mass/error"],
  [
    "a rate constant of another order",
    "/reaction/rateConstant",
    {
      form: "arrhenius",
      preExponential: "1e7 1/s",
      activationEnergy: "60 kJ/mol",
    },
    "/reaction/rateConstant/preExponential",
  ],
  [
    "a rate constant of the order before B's changed",
    "/reaction/reactants/B/order",
    0.5,
    "/reaction/rateConstant/x",
  ],
  [
    "a decomposition counted per volume",
    "/decomposition/rateConstant/preExponential",
    "1e7 L/(mol s)",
    "/decomposition/rateConstant/preExponential",
  ],
  [
    "both A and ln A",
    "/decomposition/rateConstant/lnPreExponential",
    { value: 26, unit: "1/s" },
    "/decomposition/rateConstant/lnPreExponential",
  ],
  [
    "ln A in another unit",
    "/decomposition/rateConstant/lnPreExponential",
    { value: 26, unit: "L/(mol s)" },
    "/decomposition/rateConstant/lnPreExponential/unit",
  ],
  ["td24 for a reaction", "/reaction/rateConstant", decompositionOnlyRates[1], "/reaction/rateConstant/form"],
  ["an unknown form", "/reaction/rateConstant/form", "power law", "/reaction/rateConstant/form"],
  [
    "a field of another form",
    "/reaction/rateConstant/activationEnergy",
    "60 kJ/mol",
    "/reaction/rateConstant/activationEnergy",
  ],
  [
    "initiation of an order law",
    "/decomposition/rateLaw/initiation",
    0.01,
    "/decomposition/rateLaw/initiation",
  ],
  [
    "an autocatalytic law without initiation",
    "/decomposition/rateLaw",
    { model: "autocatalytic" },
    "/decomposition/rateLaw/initiation",
  ],
  [
    "no initiation",
    "/decomposition/rateLaw",
    { model: "autocatalytic", initiation: 0 },
    "/decomposition/rateLaw/initiation",
  ],
  [
    "a fitted range upside down",
    "/reaction/rateConstant/fittedRange",
    ["30 degC", "5 degC"],
    "/reaction/rateConstant/fittedRange",
  ],
  [
    "half a fitted range",
    "/reaction/rateConstant/fittedRange",
    ["30 degC"],
    "/reaction/rateConstant/fittedRange",
  ],
  [
    "a fitted range of three",
    "/reaction/rateConstant/fittedRange",
    ["1 degC", "2 degC", "3 degC"],
    "/reaction/rateConstant/fittedRange",
  ],
  [
    "two temperatures in a table",
    "/reaction/rateConstant",
    rows(["5 degC", "1e-4 L/(mol s)"], ["15 degC", "2e-4 L/(mol s)"], ["15 degC", "2.1e-4 L/(mol s)"]),
    "/reaction/rateConstant/rows",
  ],
  [
    "the same row twice",
    "/reaction/rateConstant",
    rows(
      ["5 degC", "1e-4 L/(mol s)"],
      ["15 degC", "2e-4 L/(mol s)"],
      ["25 degC", "4e-4 L/(mol s)"],
      ["298.15 K", "0.4 mL/(mol s)"],
    ),
    "/reaction/rateConstant/rows/3",
  ],
  [
    "a rate constant of zero in a table",
    "/reaction/rateConstant",
    rows(["5 degC", "1e-4 L/(mol s)"], ["15 degC", "0 L/(mol s)"], ["25 degC", "4e-4 L/(mol s)"]),
    "/reaction/rateConstant/rows/1/rateConstant",
  ],
  ["no rows", "/reaction/rateConstant", rows(), "/reaction/rateConstant/rows"],
  [
    "over 1,000 rows",
    "/reaction/rateConstant",
    rows(...Array.from({ length: 1001 }, (_, i): [string, string] => [`${i + 1} K`, "1 L/(mol s)"])),
    "/reaction/rateConstant/rows",
  ],
  [
    "released fractions out of order",
    "/reaction/measuredAccumulation/rows/2/time",
    "30 min",
    "/reaction/measuredAccumulation/rows/2/time",
  ],
  ["study limits upside down", "/limits/lowestTemperature", "90 degC", "/limits/lowestTemperature"],
  ["the first change not at 0", "/failures/0/changes/0/after", "1 min", "/failures/0/changes/0/after"],
  ["changes out of order", "/failures/0/changes/1/after", "0 min", "/failures/0/changes/1/after"],
  ["a failure without changes", "/failures/0/changes", [], "/failures/0/changes"],
  ["a failure before the start", "/failures/0/at", "-1 h", "/failures/0/at"],
  ["a failure at no moment", "/failures/0/at", "best", "/failures/0/at"],
  [
    "over 20 failures",
    "/failures",
    Array.from({ length: 21 }, () => (completeCase().failures as Fields[])[0]),
    "/failures",
  ],
  [
    "over 50 changes",
    "/failures/0/changes",
    Array.from({ length: 51 }, (_, i) => ({ after: `${i} min` })),
    "/failures/0/changes",
  ],
  ["failures that are no list", "/failures", { name: "x" }, "/failures"],
  ["a slip that changes nothing", "/slips/0", { name: "x" }, "/slips/0"],
  [
    "a dish flatter than its vessel",
    "/vessel/heatTransferAreaFrom/dishRadius",
    "0.3 m",
    "/vessel/heatTransferAreaFrom/dishRadius",
  ],
  [
    "a jacket upside down",
    "/vessel/heatTransferAreaFrom/jacketLower",
    "2 m",
    "/vessel/heatTransferAreaFrom/jacketLower",
  ],
  [
    "an unknown bottom",
    "/vessel/heatTransferAreaFrom/bottom",
    "round",
    "/vessel/heatTransferAreaFrom/bottom",
  ],
  ["an unknown key at the top", "/mixtur", {}, "/mixtur"],
  ["an unknown key in a group", "/vessel/heatTransferArae", "5 m^2", "/vessel/heatTransferArae"],
  ["a key of the prototype", "/mixture/__proto__", { mass: "5 kg" }, "/mixture/__proto__"],
  ["a key named constructor", "/vessel/constructor", "x", "/vessel/constructor"],
  ["a key with signs in it", "/limits/a~1b~0c", 1, "/limits/a~01b~00c"],
  ["half a surrogate pair", "/title", "\ud800", "/title"],
  ["too long a title", "/title", "x".repeat(3000), "/title"],
  ["a blank title", "/title", "  ", "/title"],
  ["another format", "/format", "thermal-window/case-2", "/format"],
];

function broken(): BrokenDocument[] {
  const base = completeCase();
  const documents: BrokenDocument[] = [];
  const add = (name: string, pointer: string, value: unknown, faultAt = pointer, from: unknown = base) =>
    documents.push({
      name: `${name}: ${pointer}`,
      document: edited(from, pointer, value),
      pointer: faultAt,
    });
  for (const pointer of quantities) {
    for (const [name, value] of [...neverRight, ...neverQuantities]) {
      const isGroup = typeof value === "object" && value !== null && !Array.isArray(value);
      add(name, pointer, value, isGroup ? `${pointer}/value` : pointer);
    }
  }
  for (const pointer of required) add("missing", pointer, undefined);
  for (const [pointer, value] of notAboveZero) add(`"${value}"`, pointer, value);
  for (const [pointer, value] of numbers) add(String(value), pointer, value);
  for (const [name, pointer, value, faultAt] of together) {
    const from = faultAt.endsWith("/x") ? edited(base, "/reaction/rateConstant", tableOfSecondOrder) : base;
    add(name, pointer, value, faultAt.replace(/\/x$/, "/rows/0/rateConstant"), from);
  }
  const batch = demo("ring-closure");
  add("a feed setting in a batch", "/failures/0/changes/0/feed", "stop", "/failures/0/changes/0/feed", batch);
  add("no rate constant at all", "/reaction/rateConstant", undefined, "/reaction/rateConstant", batch);
  for (const [name, document] of [
    ["nothing", null],
    ["a list", []],
    ["a number", 5],
    ["text", "case"],
    ["an empty object", {}],
    ["a list in a list", [[[]]]],
  ] as const) {
    documents.push({
      name,
      document,
      pointer: name === "an empty object" ? "/mixture" : "",
    });
  }
  return documents;
}

const tableOfSecondOrder = rows(
  ["5 degC", "1e-4 L/(mol s)"],
  ["15 degC", "2e-4 L/(mol s)"],
  ["25 degC", "4e-4 L/(mol s)"],
);

/** Well over 200 documents, each broken in one way. Every one is JSON. */
export const brokenDocuments: readonly BrokenDocument[] = broken();
