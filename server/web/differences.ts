import { formOf } from "../case/form.js";
import { formValues } from "../case/formShape.js";
import { placeAt, placesOf } from "./places.js";

/** One field in which two copies of a case differ. */
export interface Difference {
  readonly label: string;
  /** "" where the copy leaves the field empty */
  readonly yours: string;
  readonly theirs: string;
}

/** Every field in which two copies of a case differ, named as the form names it. */
export function differences(yours: unknown, theirs: unknown): readonly Difference[] {
  const [mine, other] = [formOf(yours), formOf(theirs)];
  const places = new Map([...placesOf(other), ...placesOf(mine)]);
  const [myValues, otherValues] = [new Map(formValues(mine)), new Map(formValues(other))];
  return [...new Set([...myValues.keys(), ...otherValues.keys()])]
    .map((name) => ({
      label: placeAt(places, name)?.label ?? name,
      yours: myValues.get(name) ?? "",
      theirs: otherValues.get(name) ?? "",
    }))
    .filter((each) => each.yours !== each.theirs);
}
