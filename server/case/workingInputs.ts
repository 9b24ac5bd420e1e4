import type {
  AreaInputs,
  BoilingInputs,
  CoefficientInputs,
  WorkingsModel,
} from "../screening/workingsModel.js";
import type { CaseFigures } from "./schema.js";

type Vessel = CaseFigures["vessel"];
type AreaFigures = NonNullable<Vessel["heatTransferAreaFrom"]>;
type CoefficientFigures = NonNullable<Vessel["heatTransferCoefficientFrom"]>;
type BoilingFigures = NonNullable<CaseFigures["limits"]["maximumTechnicalTemperatureFrom"]>;

/** The inputs of the workings of an accepted case in the SI. */
export function workingsModel({ vessel, limits }: Pick<CaseFigures, "vessel" | "limits">): WorkingsModel {
  const { heatTransferAreaFrom, heatTransferCoefficientFrom } = vessel;
  const { maximumTechnicalTemperatureFrom } = limits;
  return {
    area: heatTransferAreaFrom === undefined ? null : areaInputs(heatTransferAreaFrom),
    coefficient:
      heatTransferCoefficientFrom === undefined ? null : coefficientInputs(heatTransferCoefficientFrom),
    maximumTechnicalTemperature:
      maximumTechnicalTemperatureFrom === undefined ? null : boilingInputs(maximumTechnicalTemperatureFrom),
  };
}

/** Vessel and jacket as read from a document. */
export function areaInputs(figures: AreaFigures): AreaInputs {
  const level = {
    innerDiameter: figures.innerDiameter.value,
    fillVolume: figures.fillVolume.value,
    vesselVolume: figures.vesselVolume?.value ?? null,
    jacketLower: figures.jacketLower.value,
    jacketUpper: figures.jacketUpper.value,
  };
  switch (figures.bottom) {
    case "flat":
    case "ellipsoidal":
      return { ...level, bottom: figures.bottom };
    case "torispherical":
      return {
        ...level,
        bottom: figures.bottom,
        dishRadius: figures.dishRadius.value,
        knuckleRadius: figures.knuckleRadius.value,
      };
    default:
      return { ...level, bottom: figures.bottom, wallThickness: figures.wallThickness.value };
  }
}

/** Wall and films as read from a document; a resistance that was left out is none. */
export function coefficientInputs(figures: CoefficientFigures): CoefficientInputs {
  const { liningThickness: thickness, liningConductivity: conductivity } = figures;
  return {
    insideFilm: figures.insideFilm.value,
    outsideFilm: figures.outsideFilm.value,
    wallThickness: figures.wallThickness.value,
    wallConductivity: figures.wallConductivity.value,
    lining:
      thickness === undefined || conductivity === undefined
        ? null
        : { thickness: thickness.value, conductivity: conductivity.value },
    insideFouling: figures.insideFouling?.value ?? 0,
    outsideFouling: figures.outsideFouling?.value ?? 0,
    jacketMedium: figures.jacketMedium ?? null,
    wall: figures.wall ?? null,
    contents: figures.contents ?? null,
  };
}

/** What a boiling point follows from, as read from a document; Antoine's constants keep their units. */
export function boilingInputs(figures: BoilingFigures): BoilingInputs {
  const pressure = figures.pressure.value;
  if (figures.method === "clausius-clapeyron") {
    const { method, normalBoilingPoint, heatOfVaporisation } = figures;
    return {
      method,
      normalBoilingPoint: normalBoilingPoint.value,
      heatOfVaporisation: heatOfVaporisation.value,
      pressure,
    };
  }
  const { method, a, b, c, pressureUnit, temperatureUnit, lowest, highest } = figures;
  return {
    method,
    a,
    b,
    c,
    pressureUnit,
    temperatureUnit,
    lowest: lowest.value,
    highest: highest.value,
    pressure,
  };
}
