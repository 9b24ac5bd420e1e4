import { zeroCelsius } from "../numeric/constants.js";
import {
  antoineBoilingPoint,
  clausiusClapeyron,
  pressureUnits,
  standardAtmosphere,
} from "../thermal/boilingPoint.js";
import { temperatureNumber } from "../words/numbers.js";
import { caution } from "./cautions/catalogue.js";
import type { Caution } from "./findings.js";
import { moved, within } from "./workingsFollow.js";
import type { BoilingInputs } from "./workingsModel.js";
import {
  figureOf,
  refusedWorking,
  stepOf,
  valueText,
  type Working,
  type WorkingStep,
  type WorkingValue,
  wordOf,
} from "./workingsOutline.js";

const group = "/limits/maximumTechnicalTemperatureFrom";

const about = {
  field: "/limits/maximumTechnicalTemperature",
  group,
  title: "Maximum technical temperature as a boiling point",
  unit: "K",
  typical: null,
} as const;

const pureLiquid =
  "Boiling point of the pure liquid: a more volatile part of the mixture boils lower, the vapour line may restrict earlier";
const references: Readonly<Record<BoilingInputs["method"], string>> = {
  "clausius-clapeyron": `Clausius-Clapeyron equation, heat of vaporisation constant, vapour ideal. ${pureLiquid}`,
  antoine: `Antoine 1888, C. R. Acad. Sci. 107:681. ${pureLiquid}`,
};

const sources: Readonly<Record<BoilingInputs["method"], string>> = {
  "clausius-clapeyron": "worked out from the normal boiling point",
  antoine: "worked out from Antoine constants",
};

/** From a very good vacuum to more than any vessel holds, Pa. */
const leastPressure = 1e-3;
const mostPressure = 1e9;

/** Beyond this factor from 1 atm a constant heat of vaporisation is no longer good to a kelvin; common practice. */
const farFromAtmosphere = 10;

/**
 * Boiling point at a pressure, step by step.
 *
 * @param inputs SI; Antoine constants as tabulated
 * @param field the limit that the case holds, K; null where it holds none that can be read
 */
export function boilingWorking(inputs: BoilingInputs, field: number | null): Working {
  const stated = {
    ...about,
    given: givenOf(inputs),
    basis: `boiling point at ${barText(inputs.pressure)}`,
    source: sources[inputs.method],
    reference: references[inputs.method],
  };
  if (!(inputs.pressure >= leastPressure && inputs.pressure <= mostPressure)) {
    return refusedWorking(stated, [
      {
        pointer: `${group}/pressure`,
        message: `is ${barText(inputs.pressure)}, which no vessel has; expected an absolute pressure, such as "1.5 bar"`,
      },
    ]);
  }
  const result = boilingPointOf(inputs);
  if (!Number.isFinite(result)) {
    return refusedWorking(stated, [
      {
        pointer: `${group}/pressure`,
        message: `is ${barText(inputs.pressure)}, at which the equation has no boiling point; expected a lower pressure, or other constants`,
      },
    ]);
  }
  if (!(result >= 1 && result <= 5000)) {
    return refusedWorking(stated, [
      {
        pointer: inputs.method === "antoine" ? `${group}/c` : `${group}/heatOfVaporisation`,
        message:
          "leads to no boiling point between 1 and 5000 K; check the figures of this group and their units",
      },
    ]);
  }
  const follows = within(field, result, 0.5);
  return {
    ...stated,
    steps: inputs.method === "antoine" ? antoineSteps(inputs, result) : clapeyronSteps(inputs, result),
    result,
    resultText: `${temperatureNumber(result, "down").replace("−", "-")} degC`,
    follows,
    faults: [],
    cautions: [
      ...moved(about, "maximum technical temperature", field, result, follows),
      ...outsideRange(inputs, result),
    ],
  };
}

function boilingPointOf(inputs: BoilingInputs): number {
  if (inputs.method === "clausius-clapeyron") {
    return clausiusClapeyron(inputs.normalBoilingPoint, inputs.heatOfVaporisation, inputs.pressure);
  }
  const constants = {
    ...inputs,
    pressureUnit: pressureUnits[inputs.pressureUnit],
    temperatureZero: inputs.temperatureUnit === "degC" ? zeroCelsius : 0,
  };
  return antoineBoilingPoint(constants, inputs.pressure);
}

function givenOf(inputs: BoilingInputs): WorkingValue[] {
  const pressure = {
    label: "Pressure p",
    value: inputs.pressure,
    unit: "Pa",
    text: barText(inputs.pressure),
  };
  if (inputs.method === "clausius-clapeyron") {
    const { heatOfVaporisation } = inputs;
    return [
      wordOf("Method", "Clausius-Clapeyron"),
      figureOf("Normal boiling point Tb", inputs.normalBoilingPoint, "K"),
      figureOf("Heat of vaporisation ΔHv", heatOfVaporisation, "J/mol"),
      pressure,
    ];
  }
  const { a, b, c } = inputs;
  return [
    wordOf("Method", "Antoine, log₁₀ p = a − b/(T + c)"),
    ...Object.entries({ a, b, c }).map(([label, value]) => ({
      label,
      value,
      unit: "",
      text: String(value).replace("-", "−"),
    })),
    wordOf("Units of p and T", `${inputs.pressureUnit}, ${inputs.temperatureUnit.replace("degC", "°C")}`),
    figureOf("Lowest valid temperature", inputs.lowest, "K"),
    figureOf("Highest valid temperature", inputs.highest, "K"),
    pressure,
  ];
}

function barText(pressure: number): string {
  return valueText(pressure / 1e5, "bar");
}

function clapeyronSteps(
  inputs: BoilingInputs & { readonly method: "clausius-clapeyron" },
  result: number,
): WorkingStep[] {
  const ratio = Math.log(inputs.pressure / standardAtmosphere);
  return [
    stepOf("Logarithm of the pressure", "ln(p/1.01325 bar)", ratio, ""),
    stepOf("Boiling point", "1/T = 1/Tb − R ln(p/1.01325 bar)/ΔHv", result, "K"),
  ];
}

function antoineSteps(inputs: BoilingInputs & { readonly method: "antoine" }, result: number): WorkingStep[] {
  const { pressureUnit, temperatureUnit } = inputs;
  const exponent = Math.log10(inputs.pressure / pressureUnits[pressureUnit]);
  const shown = temperatureUnit === "degC" ? "°C" : "K";
  return [
    stepOf("Logarithm of the pressure", `log₁₀(p/${pressureUnit})`, exponent, ""),
    stepOf("Boiling point", `T = b/(a − log₁₀ p) − c, in ${shown}`, result, "K"),
  ];
}

function outsideRange(inputs: BoilingInputs, result: number): Caution[] {
  if (inputs.method === "antoine") {
    if (result >= inputs.lowest && result <= inputs.highest) return [];
    const side = result < inputs.lowest ? "below" : "above";
    const text = `The boiling point worked out, ${valueText(result, "K")}, lies ${side} the range of its Antoine constants, ${valueText(inputs.lowest, "K")} to ${valueText(inputs.highest, "K")}: take constants that hold there.`;
    return [caution("OUTSIDE_HELPER_RANGE", group, text)];
  }
  const factor = inputs.pressure / standardAtmosphere;
  if (factor <= farFromAtmosphere && factor >= 1 / farFromAtmosphere) return [];
  const text = `The boiling point worked out, ${valueText(result, "K")}, is for ${barText(inputs.pressure)}, far from the 1 atm of the normal boiling point: a constant heat of vaporisation no longer holds there; take Antoine constants.`;
  return [caution("OUTSIDE_HELPER_RANGE", group, text)];
}
