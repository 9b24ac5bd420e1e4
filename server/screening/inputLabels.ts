import type { CaseModel } from "./model.js";

const pairs: Readonly<Record<string, string>> = {
  "/reaction/rateConstant": "activation pair of the reaction",
  "/decomposition/rateConstant": "activation pair of the decomposition",
};

/**
 * An input as a reader names it; one that was not typed, and so has its default, by the words of its place.
 *
 * @param model parsed case
 * @param pointer of the input
 */
export function inputLabel(model: CaseModel, pointer: string): string {
  const typed = pairs[pointer] ?? model.inputs.find((note) => note.pointer === pointer)?.label;
  if (typed !== undefined) return typed;
  const [last = "", of = ""] = pointer.split("/").reverse().map(inWords);
  return of === "" ? last : `${last} of ${of.length === 1 ? of : `the ${of}`}`;
}

/** `heatCapacity` as "heat capacity"; a single letter stays as it is. */
function inWords(key: string): string {
  return key.length === 1 ? key : key.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
}
