import { caution } from "./cautions/catalogue.js";
import type { Caution } from "./findings.js";
import { valueText } from "./workingsOutline.js";

/** Whether the figure in a field agrees with its working; a field that cannot be read does not. */
export function within(field: number | null, result: number, tolerance: number): boolean {
  return field !== null && Math.abs(field - result) <= tolerance;
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
