import {
  type Bottom,
  dinForms,
  dinRadii,
  ellipsoidalBottom,
  flatBottom,
  torisphericalBottom,
} from "../thermal/dishedHead.js";
import { levelOf, wallBelow, wettedJacket } from "../thermal/jacketArea.js";
import { caution } from "./cautions/catalogue.js";
import type { Caution } from "./findings.js";
import { moved, within } from "./workingsFollow.js";
import type { AreaInputs } from "./workingsModel.js";
import {
  figureOf,
  refusedWorking,
  roundedDown,
  stepOf,
  valueText,
  type Working,
  type WorkingFault,
  type WorkingStep,
  type WorkingValue,
  wordOf,
} from "./workingsOutline.js";

const group = "/vessel/heatTransferAreaFrom";

const about = {
  field: "/vessel/heatTransferArea",
  group,
  title: "Heat transfer area from the vessel's dimensions",
  unit: "m^2",
  basis: "estimated",
  source: "worked out from the vessel's dimensions",
  typical: null,
  reference:
    "Exact geometry of the inside; DIN 28011 and DIN 28013 give both radii as parts of the outer diameter. Level at rest, without vortex, internals or the flat disc of a flat bottom",
} as const;

const bottomNames: Readonly<Record<AreaInputs["bottom"], string>> = {
  flat: "flat",
  ellipsoidal: "ellipsoidal, 2:1",
  torispherical: "torispherical",
  kloepper: "torispherical, DIN 28011 (Klöpper)",
  korbbogen: "torispherical, DIN 28013 (Korbbogen)",
};

/** Less than this, m^2, is none: a thousandth of a square millimetre. */
const leastArea = 1e-9;

/**
 * Wetted and jacketed wall of a vessel, step by step.
 *
 * @param inputs SI
 * @param field the area that the case holds, m^2; null where it holds none that can be read
 * @param start volume with which the step starts, m^3; null where it is not known
 */
export function areaWorking(inputs: AreaInputs, field: number | null, start: number | null = null): Working {
  const given = givenOf(inputs);
  const wrong = sizeFaults(inputs);
  if (wrong.length > 0) return refusedWorking({ ...about, given }, wrong);
  const { bottom, radii } = bottomOf(inputs);
  const level = levelOf(bottom, inputs.fillVolume);
  const { jacketLower, jacketUpper } = inputs;
  const area = wettedJacket(bottom, level, jacketLower, jacketUpper);
  const faults = fillFaults(inputs, level, area);
  if (faults.length > 0) return refusedWorking({ ...about, given }, faults);
  const follows = within(field, area, 0.01 * area);
  return {
    ...about,
    given,
    steps: [...bottomSteps(inputs, bottom, radii), ...wallSteps(inputs, bottom, level)],
    result: area,
    resultText: `${roundedDown(area)} m^2`,
    follows,
    faults,
    cautions: [
      ...moved(about, "heat transfer area", field, area, follows),
      ...(follows && start !== null ? lowerAtStart(inputs, bottom, area, start) : []),
    ],
  };
}

function givenOf(inputs: AreaInputs): WorkingValue[] {
  return [
    wordOf("Bottom", bottomNames[inputs.bottom]),
    figureOf("Inner diameter D", inputs.innerDiameter, "m"),
    ...("dishRadius" in inputs
      ? [
          figureOf("Dish radius R", inputs.dishRadius, "m"),
          figureOf("Knuckle radius r", inputs.knuckleRadius, "m"),
        ]
      : []),
    ...("wallThickness" in inputs ? [figureOf("Wall thickness s", inputs.wallThickness, "m")] : []),
    figureOf("Fill volume V", inputs.fillVolume, "m^3"),
    ...(inputs.vesselVolume === null ? [] : [figureOf("Volume of the vessel", inputs.vesselVolume, "m^3")]),
    figureOf("Lower edge of the jacket", inputs.jacketLower, "m"),
    figureOf("Upper edge of the jacket", inputs.jacketUpper, "m"),
  ];
}

type Radii = { readonly dish: number; readonly knuckle: number } | null;

function bottomOf(inputs: AreaInputs): { bottom: Bottom; radii: Radii } {
  const { innerDiameter } = inputs;
  if (inputs.bottom === "flat") return { bottom: flatBottom(innerDiameter), radii: null };
  if (inputs.bottom === "ellipsoidal") return { bottom: ellipsoidalBottom(innerDiameter), radii: null };
  const radii =
    inputs.bottom === "torispherical"
      ? { dish: inputs.dishRadius, knuckle: inputs.knuckleRadius }
      : dinRadii(inputs.bottom, innerDiameter, inputs.wallThickness);
  return { bottom: torisphericalBottom(innerDiameter, radii.dish, radii.knuckle), radii };
}

function bottomSteps(inputs: AreaInputs, bottom: Bottom, radii: Radii): WorkingStep[] {
  if (inputs.bottom === "flat") return [];
  const volume = bottom.volumeBelow(bottom.height);
  if (radii === null) {
    return [
      stepOf("Height of the bottom h", "D/4", bottom.height, "m"),
      stepOf("Volume of the bottom Vb", "π D³/24", volume, "m^3"),
    ];
  }
  const form = "wallThickness" in inputs ? dinForms[inputs.bottom] : null;
  return [
    ...(form === null
      ? []
      : [
          stepOf("Dish radius R", form.dish === 1 ? "D + 2 s" : `${form.dish} (D + 2 s)`, radii.dish, "m"),
          stepOf("Knuckle radius r", `${form.knuckle} (D + 2 s)`, radii.knuckle, "m"),
        ]),
    stepOf("Height of the bottom h", "R − √((R − r)² − (D/2 − r)²)", bottom.height, "m"),
    stepOf("Volume of the bottom Vb", "spherical cap + part of a torus", volume, "m^3"),
  ];
}

function wallSteps(inputs: AreaInputs, bottom: Bottom, level: number): WorkingStep[] {
  const { fillVolume, jacketLower, jacketUpper } = inputs;
  const { height, diameter } = bottom;
  const inShell = fillVolume >= bottom.volumeBelow(height);
  const levelBy = inShell
    ? bottom.height === 0
      ? "V/(π D²/4)"
      : "h + (V − Vb)/(π D²/4)"
    : "height below which the bottom holds V";
  const upper = Math.min(level, jacketUpper);
  const split = Math.min(Math.max(height, jacketLower), upper);
  const ofBottom = wallBelow(bottom, split) - wallBelow(bottom, Math.min(jacketLower, split));
  const ofShell = Math.PI * diameter * (upper - split);
  return [
    stepOf("Level of the contents", levelBy, level, "m"),
    stepOf("Wetted jacket ends at", "the lower of level and upper edge", upper, "m"),
    ...(ofBottom > 0
      ? [
          stepOf(
            "Wall of the bottom",
            "between the jacket's lower edge and the shell or the level",
            ofBottom,
            "m^2",
          ),
        ]
      : []),
    ...(ofShell > 0
      ? [stepOf("Wall of the shell", `π D × ${valueText(upper - split, "m")}`, ofShell, "m^2")]
      : []),
  ];
}

/** Sizes that no vessel has, and that the equations are not asked about. */
function sizeFaults(inputs: AreaInputs): WorkingFault[] {
  const { innerDiameter, fillVolume } = inputs;
  const fault = (key: string, message: string) => [{ pointer: `${group}/${key}`, message }];
  if (!(innerDiameter >= 1e-3 && innerDiameter <= 100)) {
    return fault("innerDiameter", "is not the diameter of a vessel; expected 1 mm to 100 m");
  }
  if ("wallThickness" in inputs && !(inputs.wallThickness < innerDiameter / 4)) {
    return fault("wallThickness", "is a quarter of the inner diameter or more; expected a wall's thickness");
  }
  if ("dishRadius" in inputs) {
    const { dishRadius, knuckleRadius } = inputs;
    if (!(knuckleRadius <= innerDiameter / 2)) {
      return fault("knuckleRadius", "is more than half the inner diameter, which no knuckle can be");
    }
    if (!(dishRadius >= innerDiameter / 2)) {
      return fault("dishRadius", "is less than half the inner diameter, which no dish can be");
    }
    if (!(dishRadius <= 100 * innerDiameter)) {
      return fault("dishRadius", "is more than 100 diameters; take a flat bottom, or correct the radius");
    }
  }
  const height = fillVolume / innerDiameter ** 2;
  if (!(height < 1000)) {
    return fault("fillVolume", "would stand higher than any vessel of that diameter; expected its contents");
  }
  return [];
}

function fillFaults(inputs: AreaInputs, level: number, area: number): WorkingFault[] {
  const { fillVolume, vesselVolume, jacketLower } = inputs;
  const faults: WorkingFault[] = [];
  if (vesselVolume !== null && fillVolume > vesselVolume) {
    faults.push({
      pointer: `${group}/fillVolume`,
      message: `is ${valueText(fillVolume, "m^3")}, more than the ${valueText(vesselVolume, "m^3")} that the vessel holds; expected a fill volume up to that`,
    });
  }
  if (!(area >= leastArea)) {
    faults.push({
      pointer: `${group}/jacketLower`,
      message: `is ${valueText(jacketLower, "m")}, but the contents stand only ${valueText(level, "m")} high: no jacketed wall is wetted and the area is 0; expected an edge below the level, or a larger fill volume`,
    });
  }
  return faults;
}

/** The area was worked out for more contents than the step starts with. */
function lowerAtStart(inputs: AreaInputs, bottom: Bottom, area: number, start: number): Caution[] {
  const atStart = wettedJacket(bottom, levelOf(bottom, start), inputs.jacketLower, inputs.jacketUpper);
  if (!(atStart < 0.99 * area)) return [];
  return [
    caution(
      "INPUT_MOVED",
      `${group}/fillVolume`,
      `The heat transfer area was worked out for a fill of ${valueText(inputs.fillVolume, "m^3")}, but the step starts with ${valueText(start, "m^3")}, which wets ${valueText(atStart, "m^2")} instead of ${valueText(area, "m^2")}: until the vessel is filled up, the cooling is overestimated.`,
    ),
  ];
}
