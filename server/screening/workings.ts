import type { CaseModel } from "./model.js";
import { areaWorking } from "./workingsArea.js";
import { boilingWorking } from "./workingsBoiling.js";
import { coefficientWorking } from "./workingsCoefficient.js";
import type { Working } from "./workingsOutline.js";

/**
 * The workings that a case keeps behind its heat transfer area, its heat transfer coefficient and its maximum
 * technical temperature, each with whether its field still follows from it.
 *
 * @param model parsed case
 */
export function workingsOf(model: CaseModel): Working[] {
  const { workings, vessel, limits, mixture } = model;
  const { area, coefficient, maximumTechnicalTemperature } = workings;
  return [
    ...(coefficient === null ? [] : [coefficientWorking(coefficient, vessel.heatTransferCoefficient.value)]),
    ...(area === null
      ? []
      : [areaWorking(area, vessel.heatTransferArea.value, mixture.mass.value / mixture.density.value)]),
    ...(maximumTechnicalTemperature === null
      ? []
      : [boilingWorking(maximumTechnicalTemperature, limits.maximumTechnicalTemperature.value)]),
  ];
}
