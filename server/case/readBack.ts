import { printedUnit } from "../screening/workingsOutline.js";
import { plainNumberText } from "../words/numbers.js";
import type { Dimension } from "./dimensions.js";
import { readQuantity } from "./quantities.js";

/** Digits that tell 35 degC from 35.1 degC in kelvin, and 1 h from 3601 s. */
const significant = 6;

/**
 * What a typed quantity was understood as, in the SI: "= 308.15 K" for 35 degC.
 *
 * @returns undefined where it cannot be read, or where its figure is beyond doubles
 */
export function readBack(text: string, dimension: Dimension): string | undefined {
  const reading = readQuantity(text, dimension);
  if (!reading.ok) return undefined;
  const { value, ln } = reading.measured;
  if (!Number.isFinite(value) || (value === 0 && ln !== Number.NEGATIVE_INFINITY)) return undefined;
  const unit = dimension.absolute === true ? "K" : printedUnit(dimension.unit);
  return `= ${plainNumberText(value, significant)} ${unit}`;
}
