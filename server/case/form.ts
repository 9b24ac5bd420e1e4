import { faultBook } from "./faultBook.js";
import type { Fault } from "./faults.js";
import { insideOf, listOf, unusedGroup } from "./formBlocks.js";
import { type FormContext, fieldOf, optional } from "./formFields.js";
import type { Pasted } from "./formPaste.js";
import type { FormBlock, FormGroup, FormSection } from "./formShape.js";
import { failureStarts } from "./formStarts.js";
import { unusedOf } from "./formUnused.js";
import { type Before, formWorkings } from "./formWorkings.js";
import { memberOf, outline, type Place } from "./outline.js";
import { caseFormat } from "./schema.js";
import { overallOrder } from "./typed.js";

export { documentFromForm } from "./formDocument.js";
export { editForm } from "./formEdit.js";
export { isPasting, type Pasted, pastedIn, pasteRows, stillWaiting } from "./formPaste.js";
export * from "./formShape.js";
export { type Before, beforeOf, isWorking, workField } from "./formWorkings.js";

/** What the form starts from: nothing typed, the first choices made. */
export function blankCase(): unknown {
  return {
    format: caseFormat,
    reaction: { operation: "batch", rateConstant: { form: "arrhenius" } },
  };
}

/**
 * The form of a case document as data, in the order in which a person thinks: what the step is, then
 * mixture, reaction, decomposition, vessel, limits, failures. Shows every text of the document, sound or
 * not, and each fault beside its field.
 *
 * @param document as typed so far
 * @param before what fields held before they were worked out, to be given back
 * @param pasted what waits in the text areas of tables
 */
export function formOf(
  document: unknown,
  faults: readonly Fault[] = [],
  before: Before = {},
  pasted: Pasted = new Map(),
): FormSection[] {
  const context: FormContext = {
    faults: faultBook(faults),
    order: overallOrder(document),
    workings: formWorkings(document, before),
    pasted,
    starts: failureStarts(document),
  };
  const unused = unusedOf(document);
  const unusedIn = (section: string) =>
    unusedGroup(
      section,
      unused.filter(([key]) => key === section),
      document,
      context,
    );
  const members = outline.kind === "group" ? [...outline.members] : [];
  const ofCase = members.filter(([key, place]) => place.kind === "leaf" || key === "batch");
  const ofSections = members.filter(
    ([key, place]) => place.kind !== "word" && !ofCase.some(([other]) => other === key),
  );
  const elsewhere = new Set(ofSections.map(([key]) => key));
  // Faults of what is not used are given out first, before a group takes all that is left below it.
  const stray = [...new Set(unused.map(([key]) => key))]
    .filter((key) => !elsewhere.has(key))
    .flatMap(unusedIn);
  const first = caseSection(ofCase, document, context);
  const rest = ofSections.map(([key, place]) => sectionOf(key, place, document, unusedIn(key), context));
  return [
    {
      ...first,
      blocks: [...first.blocks, ...stray],
      faults: [...first.faults, ...context.faults.takeBelow("")],
    },
    ...rest,
  ];
}

/** The section that says which step this is. */
function caseSection(
  members: readonly (readonly [string, Place])[],
  document: unknown,
  context: FormContext,
): FormSection {
  const blocks = members.flatMap(([key, place]): FormBlock[] => {
    const value = memberOf(document, key);
    if (place.kind === "leaf") return [fieldOf(place, value, [key], context)];
    return place.kind === "group" ? insideOf(place, value, [key], context) : [];
  });
  return {
    id: "case",
    title: "The step",
    blocks,
    faults: context.faults.takeBelow("/batch"),
  };
}

function sectionOf(
  key: string,
  place: Place,
  document: unknown,
  extra: readonly FormGroup[],
  context: FormContext,
): FormSection {
  const value = memberOf(document, key);
  if (place.kind === "list") {
    const list = listOf(place, value, [key], context);
    return { id: key, title: list.title, blocks: [list, ...extra], faults: [] };
  }
  if (place.kind !== "group") return { id: key, title: key, blocks: extra, faults: [] };
  const { title, intro, adding } = place.about;
  const isThere = adding === undefined || value !== undefined;
  const blocks = isThere ? insideOf(place, value, [key], context) : [];
  const button =
    adding === undefined
      ? undefined
      : isThere
        ? { value: `remove:/${key}`, label: `Remove: ${title}` }
        : { value: `add:/${key}`, label: adding };
  return {
    id: key,
    title,
    ...optional("intro", intro),
    blocks: [...blocks, ...extra],
    faults: context.faults.takeBelow(`/${key}`),
    ...optional("button", button),
  };
}
