import { z } from "zod";
import { group, list, variants } from "./groups.js";
import { choice, estimatedNumber, plain, quantity, rate, rateUnit, text } from "./leaves.js";
import { typicalRanges } from "./typicalRanges.js";

const fittedRange = z
  .tuple([
    quantity("temperature", "Fitted from", {
      short: "lowest fitted temperature",
    }),
    quantity("temperature", "Fitted up to", {
      short: "highest fitted temperature",
    }),
  ])
  .optional();

const fitted = {
  correlation: plain(
    "Correlation of the two parameters",
    { above: -1, below: 1 },
    {
      hint: "As the fit printed it, between −1 and 1",
      short: "correlation of the fit",
    },
  ).optional(),
  fittedRange,
  points: plain(
    "Number of rate constants fitted",
    { atLeast: 3, whole: true },
    { short: "number of fitted rate constants", hint: "Sets the width of the interval" },
  ).optional(),
  viscosity: quantity("viscosity", "Viscosity of the medium", {
    hint: "For the diffusion limit; that of water where empty",
    typical: typicalRanges.viscosity,
  }).optional(),
};

const activationEnergy = quantity("molarEnergy", "Activation energy", {
  sign: "any",
  typical: typicalRanges.activationEnergy,
});

const eyring = group(
  { title: "Eyring: activation enthalpy and entropy" },
  {
    form: z.literal("eyring"),
    activationEnthalpy: quantity("molarEnergy", "Activation enthalpy", {
      sign: "any",
      typical: typicalRanges.activationEnergy,
    }),
    activationEntropy: quantity("molarEntropy", "Activation entropy", {
      sign: "any",
      typical: typicalRanges.activationEntropy,
    }),
    standardConcentration: quantity("concentration", "Standard concentration of the entropy", {
      short: "standard concentration",
    }).prefault("1 mol/L"),
    transmissionCoefficient: plain("Transmission coefficient", {
      above: 0,
    }).prefault(1),
    ...fitted,
  },
);

const lnPreExponential = group(
  {
    title: "Logarithm of the factor",
    intro: "Instead of A itself, where ln A was fitted",
    adding: "Give ln A instead",
  },
  {
    value: plain("ln A", {}),
    standardError: plain("Standard error of ln A", { atLeast: 0 }).optional(),
    unit: rateUnit("Unit of A"),
  },
);

const arrhenius = group(
  { title: "Arrhenius: pre-exponential factor and activation energy" },
  {
    form: z.literal("arrhenius"),
    preExponential: rate("Pre-exponential factor A").optional(),
    lnPreExponential: lnPreExponential.optional(),
    activationEnergy,
    ...fitted,
  },
);

const reference = group(
  { title: "One rate constant and an activation energy" },
  {
    form: z.literal("reference"),
    rateConstant: rate("Rate constant"),
    at: quantity("temperature", "At the temperature", {
      short: "reference temperature",
    }),
    activationEnergy,
    fittedRange,
  },
);

const row = group(
  { title: "Row" },
  {
    temperature: quantity("temperature", "Temperature"),
    rateConstant: rate("Rate constant"),
    relativeError: plain(
      "Relative error",
      { above: 0 },
      {
        hint: "Standard error over the rate constant",
      },
    ).optional(),
    leftOut: text("Left out because", {
      hint: "A reason takes the row out of the fit",
    }).optional(),
  },
);

const table = group(
  { title: "Table of measured rate constants, fitted here" },
  {
    form: z.literal("table"),
    fitAs: choice("Fitted as", { eyring: "Eyring", arrhenius: "Arrhenius" }),
    rows: list(
      {
        title: "Measured rate constants",
        entry: "Row",
        intro: "At least three different temperatures",
        layout: "rows",
        atLeast: 1,
        atMost: 1000,
      },
      row,
    ),
    viscosity: fitted.viscosity,
  },
);

const heatRate = group(
  { title: "Heat release rate at one temperature" },
  {
    form: z.literal("heatRate"),
    heatReleaseRate: quantity("specificPower", "Heat release rate", {
      hint: "Initial rate of an order law, largest isothermal rate of an autocatalytic one",
    }),
    at: quantity("temperature", "At the temperature", {
      short: "reference temperature",
    }),
    activationEnergy,
  },
);

const td24 = group(
  { title: "Temperature from which the time to the maximum rate is 24 h" },
  {
    form: z.literal("td24"),
    temperature: quantity("temperature", "T_D24"),
    activationEnergy,
  },
);

/** Rate constant of the desired reaction. */
export const rateConstant = variants({ title: "Rate constant", choosing: "Given as" }, "form", [
  eyring,
  arrhenius,
  reference,
  table,
]);

/** Rate constant of the decomposition: two more ways to state it. */
export const decompositionRateConstant = variants({ title: "Rate constant", choosing: "Given as" }, "form", [
  eyring,
  arrhenius,
  reference,
  table,
  heatRate,
  td24,
]);

const decompositionOrder = { atLeast: 0, atMost: 3 };

/** Rate law of the decomposition. */
export const rateLaw = variants({ title: "Rate law", choosing: "Model" }, "model", [
  group(
    { title: "Order: the rate falls as material is used up" },
    {
      model: z.literal("order"),
      order: estimatedNumber("Order", decompositionOrder).prefault(1),
    },
  ),
  group(
    { title: "Autocatalytic: the products speed it up" },
    {
      model: z.literal("autocatalytic"),
      order: estimatedNumber("Order", decompositionOrder).prefault(1),
      productOrder: estimatedNumber("Order in the products", {
        above: 0,
        atMost: 3,
      }).prefault(1),
      initiation: estimatedNumber(
        "Initiation",
        { above: 0 },
        {
          hint: "The w of (1 − α)ⁿ (w + αᵐ): how much of the rate is there at the start",
        },
      ),
    },
  ),
]);
