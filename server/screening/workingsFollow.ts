import { caution } from "./cautions/catalogue.js";
import type { Caution } from "./findings.js";
import { valueText } from "./workingsOutline.js";

/**
 * Whether the figure in a field agrees with its working as a person rounds it: to the careful side, down, twice as
 * far as up.
 *
 * @param field SI; null where it cannot be read, which agrees with nothing
 * @param tolerance upwards, SI
 */
export function within(field: number | null, result: number, tolerance: number): boolean {
  return field !== null && field <= result + tolerance && field >= result - 2 * tolerance;
}

/** INPUT_MOVED, where a field holds another figure than its working gives. */
export function moved(
  about: { readonly field: string; readonly unit: string },
  name: string,
  field: number | null,
  result: number,
  follows: boolean,
): Caution[] {
  if (field === null || follows) return [];
  const side = field > result ? " The field is the higher of the two, which is not the careful side." : "";
  return [
    caution(
      "INPUT_MOVED",
      about.field,
      `The ${name} is ${valueText(field, about.unit)}, but its working gives ${valueText(result, about.unit)}: one of the two has changed since.${side}`,
    ),
  ];
}
