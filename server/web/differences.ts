import { type FormControl, type FormSection, fieldsOf, formOf } from "../case/form.js";
import { placeAt, placesOf } from "./places.js";

/** One field in which two copies of a case differ. */
export interface Difference {
  /** JSON pointer of the field, or of a part of it such as its standard error */
  readonly pointer: string;
  readonly label: string;
  /** "" where the copy leaves the field empty */
  readonly yours: string;
  readonly theirs: string;
}

/** Every field in which two copies of a case differ, named as the form names it. */
export function differences(yours: unknown, theirs: unknown): readonly Difference[] {
  const [mine, other] = [formOf(yours), formOf(theirs)];
  const places = new Map([...placesOf(other), ...placesOf(mine)]);
  const [myTexts, otherTexts] = [textsOf(mine), textsOf(other)];
  const sections = mine.map(({ id }) => id);
  // What only the other has stands with its section, not behind everything else.
  const sectionOf = (pointer: string) => sections.indexOf(pointer.split("/")[1] ?? "");
  return [...new Set([...myTexts.keys(), ...otherTexts.keys()])]
    .sort((a, b) => sectionOf(a) - sectionOf(b))
    .map((pointer) => ({
      pointer,
      label:
        placeAt(places, (myTexts.get(pointer) ?? otherTexts.get(pointer))?.name ?? pointer)?.label ?? pointer,
      yours: myTexts.get(pointer)?.text ?? "",
      theirs: otherTexts.get(pointer)?.text ?? "",
    }))
    .filter((each) => each.yours !== each.theirs);
}

interface Typed {
  /** of the control */
  readonly name: string;
  readonly text: string;
}

/** What each field and each part of it holds, by one pointer however the field was typed: alone, or with its error. */
function textsOf(sections: readonly FormSection[]): Map<string, Typed> {
  return new Map(
    fieldsOf(sections).flatMap((field): [string, Typed][] => {
      const { pointer, detail } = field;
      if (detail === undefined) return [[pointer, typedIn(field)]];
      const { standardError, basis, source } = detail;
      const parts = Object.entries({ standardError, basis, source });
      return [
        [pointer, typedIn(field)],
        ...parts.map(([part, control]): [string, Typed] => [`${pointer}/${part}`, typedIn(control)]),
      ];
    }),
  );
}

/** A word of a choice in full. */
function typedIn({ name, value, choices = [] }: Pick<FormControl, "name" | "value" | "choices">): Typed {
  const chosen = value === "" ? undefined : choices.find((choice) => choice.value === value);
  return { name, text: chosen?.label ?? value };
}
