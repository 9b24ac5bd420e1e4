import { overallCoefficient, type Resistances, resistancesOf } from "../thermal/overallTransfer.js";
import { typicalTransfer } from "../thermal/typicalTransfer.js";
import { percentText } from "../words/numbers.js";
import { caution } from "./cautions/catalogue.js";
import type { Caution } from "./findings.js";
import { moved, within } from "./workingsFollow.js";
import type { CoefficientInputs } from "./workingsModel.js";
import {
  figureOf,
  refusedWorking,
  roundedDown,
  stepOf,
  valueText,
  type Working,
  type WorkingValue,
  wordOf,
} from "./workingsOutline.js";

const unit = "W/(m^2 K)";

const about = {
  field: "/vessel/heatTransferCoefficient",
  group: "/vessel/heatTransferCoefficientFrom",
  title: "Heat transfer coefficient from resistances in series",
  unit,
  basis: "estimated",
  source: "worked out from resistances in series",
  reference:
    "1/U = Σ R, all on one area (common practice). Typical range: Perry's Chemical Engineers' Handbook, Table 11-7, a mark of what is plausible only",
} as const;

const layers: Readonly<Record<keyof Resistances, readonly [string, string]>> = {
  insideFilm: ["Film of the contents", "1/h"],
  insideFouling: ["Fouling inside", "as given"],
  lining: ["Lining", "s/k"],
  wall: ["Wall", "s/k"],
  outsideFouling: ["Fouling in the jacket", "as given"],
  outsideFilm: ["Film in the jacket", "1/h"],
};

const mediumNames = { steam: "steam", brine: "water or brine", heatTransferOil: "heat transfer oil" };
const wallNames = { stainless: "stainless steel", glassLined: "glass-lined steel" };
const contentsNames = {
  water: "water",
  aqueous: "aqueous solution",
  organics: "organics",
  lightOil: "light oil",
  heavyOil: "heavy oil",
};

/**
 * Overall heat transfer coefficient of a wall, step by step.
 *
 * @param inputs SI
 * @param field the coefficient that the case holds, W/(m^2 K); null where it holds none that can be read
 */
export function coefficientWorking(inputs: CoefficientInputs, field: number | null): Working {
  const { wall, jacketMedium, contents } = inputs;
  const typical =
    wall === null || jacketMedium === null || contents === null
      ? null
      : typicalTransfer(wall, jacketMedium, contents);
  const stated = { ...about, given: givenOf(inputs), typical };
  const resistances = resistancesOf({ ...inputs });
  const result = overallCoefficient(resistances);
  if (!(result >= 1e-9 && result <= 1e9)) {
    return refusedWorking(stated, [
      {
        pointer: about.group,
        message: "holds figures too large or too small to calculate with; check their units",
      },
    ]);
  }
  const follows = within(field, result, 0.01 * result);
  return {
    ...stated,
    steps: stepsOf(resistances, result),
    result,
    resultText: `${roundedDown(result)} ${unit}`,
    follows,
    faults: [],
    cautions: [
      ...moved(about, "heat transfer coefficient", field, result, follows),
      ...(typical === null ? [] : outsideTypical(result, typical, describe(inputs))),
    ],
  };
}

function givenOf(inputs: CoefficientInputs): WorkingValue[] {
  const { lining, jacketMedium, wall, contents } = inputs;
  return [
    figureOf("Film coefficient inside", inputs.insideFilm, unit),
    figureOf("Film coefficient in the jacket", inputs.outsideFilm, unit),
    figureOf("Wall thickness", inputs.wallThickness, "m"),
    figureOf("Conductivity of the wall", inputs.wallConductivity, "W/(m K)"),
    ...(lining === null
      ? []
      : [
          figureOf("Lining thickness", lining.thickness, "m"),
          figureOf("Conductivity of the lining", lining.conductivity, "W/(m K)"),
        ]),
    figureOf("Fouling inside", inputs.insideFouling, "m^2 K/W"),
    figureOf("Fouling in the jacket", inputs.outsideFouling, "m^2 K/W"),
    ...(jacketMedium === null ? [] : [wordOf("Jacket medium", mediumNames[jacketMedium])]),
    ...(wall === null ? [] : [wordOf("Wall", wallNames[wall])]),
    ...(contents === null ? [] : [wordOf("Contents", contentsNames[contents])]),
  ];
}

function stepsOf(resistances: Resistances, result: number) {
  const sum = 1 / result;
  const names: readonly (keyof Resistances)[] = [
    "insideFilm",
    "insideFouling",
    "lining",
    "wall",
    "outsideFouling",
    "outsideFilm",
  ];
  return [
    ...names
      .filter((name) => resistances[name] > 0)
      .map((name) => {
        const [label, equation] = layers[name];
        const step = stepOf(label, equation, resistances[name], "m^2 K/W");
        return { ...step, text: `${step.text} (${percentText(resistances[name] / sum)})` };
      }),
    stepOf("All resistances", "1/U = Σ R", sum, "m^2 K/W"),
  ];
}

function describe({ wall, jacketMedium, contents }: CoefficientInputs): string {
  if (wall === null || jacketMedium === null || contents === null) return "";
  return `${contentsNames[contents]} in ${wallNames[wall]} with ${mediumNames[jacketMedium]} in the jacket`;
}

/** Above the range the cooling may be overestimated; below it only the plausibility is in doubt. */
function outsideTypical(result: number, [low, high]: readonly [number, number], of: string): Caution[] {
  if (result >= low && result <= high) return [];
  const above = result > high;
  const range = `${valueText(low, "")} to ${valueText(high, unit)}`;
  const text = `The heat transfer coefficient worked out, ${valueText(result, unit)}, lies ${above ? "above" : "below"} what a handbook holds typical for ${of}, ${range}: check the film coefficients${above ? " and the fouling" : ""}.`;
  return [caution("OUTSIDE_HELPER_RANGE", about.field, text, above ? "warn" : "note")];
}
