import { pathOf, pointerOf } from "./faults.js";
import { blankOf, choicesOf, type FormContext, fieldOf, optional, textOf } from "./formFields.js";
import { formPaste } from "./formPaste.js";
import type { FormBlock, FormButton, FormField, FormGroup, FormList } from "./formShape.js";
import { memberOf, type Place } from "./outline.js";

type GroupPlace = Place & { readonly kind: "group" | "variants" };
type ListPlace = Place & { readonly kind: "list" };

/** Rows that a table shows at least, so that a few can be typed before the next one is asked for. */
const rowsAtLeast = 4;

/**
 * The members of a group as blocks of the form: those that the choices made so far call for, and those
 * that hold something.
 */
function blocksOf(
  members: ReadonlyMap<string, Place>,
  parent: unknown,
  path: readonly string[],
  context: FormContext,
): FormBlock[] {
  return [...members].flatMap(([key, place]): FormBlock[] => {
    const value = memberOf(parent, key);
    const at = [...path, key];
    if (place.kind === "leaf") return [fieldOf(place, value, at, context)];
    if (place.kind === "pair") {
      return place.entries.flatMap((entry, i) =>
        entry.kind === "leaf"
          ? [fieldOf({ ...entry, required: false }, memberOf(value, i), [...at, String(i)], context)]
          : [],
      );
    }
    if (place.kind === "list") return [listOf(place, value, at, context)];
    if (place.kind === "word") return [];
    const { onlyWith } = place.about;
    const called = onlyWith === undefined || memberOf(parent, onlyWith[0]) === onlyWith[1];
    return called || value !== undefined ? [groupOf(place, value, at, context)] : [];
  });
}

function groupOf(
  place: GroupPlace,
  value: unknown,
  path: readonly string[],
  context: FormContext,
): FormGroup {
  const pointer = pointerOf(path);
  const { title, intro, adding } = place.about;
  const isThere = adding === undefined || value !== undefined;
  const blocks = isThere ? insideOf(place, value, path, context) : [];
  const button: FormButton | undefined =
    adding === undefined
      ? undefined
      : isThere
        ? { value: `remove:${pointer}`, label: `Remove: ${title}` }
        : { value: `add:${pointer}`, label: adding };
  return {
    type: "group",
    pointer,
    title,
    ...optional("intro", intro),
    blocks,
    faults: context.faults.takeBelow(pointer),
    ...optional("button", button),
    ...optional("working", isThere ? context.workings.get(pointer) : undefined),
  };
}

/** The fields of a group; of variants, the choice between them and the fields of the chosen one. */
export function insideOf(
  place: GroupPlace,
  value: unknown,
  path: readonly string[],
  context: FormContext,
): FormBlock[] {
  if (place.kind === "group") return blocksOf(place.members, value, path, context);
  const { teller } = place;
  const typed = textOf(memberOf(value, teller));
  const choices = Object.fromEntries([...place.options].map(([word, option]) => [word, option.about.title]));
  const pointer = pointerOf([...path, teller]);
  const choice: FormField = {
    type: "field",
    name: pointer,
    pointer,
    label: place.about.choosing ?? teller,
    kind: "choice",
    value: typed,
    choices: choicesOf(choices, typed, blankOf(true)),
    required: place.required,
    ...optional("fault", context.faults.take(pointer)),
  };
  const chosen = place.options.get(typed);
  return chosen === undefined ? [choice] : [choice, ...blocksOf(chosen.members, value, path, context)];
}

/** A list with one entry for each in the document; a table has a blank row to spare. */
export function listOf(
  place: ListPlace,
  value: unknown,
  path: readonly string[],
  context: FormContext,
): FormList {
  const { title, intro, entry: name, layout, atMost } = place.about;
  const pointer = pointerOf(path);
  const typed: readonly unknown[] = Array.isArray(value) ? value : [];
  const shown = layout === "rows" ? Math.min(Math.max(typed.length + 1, rowsAtLeast), atMost) : 0;
  const entries = Array.from({ length: Math.max(typed.length, shown) }, (_, i): FormGroup => {
    const at = [...path, String(i)];
    const inside = place.entry.kind === "group" ? insideOf(place.entry, typed[i], at, context) : [];
    return {
      type: "group",
      pointer: pointerOf(at),
      title: `${name} ${i + 1}`,
      blocks: inside,
      faults: context.faults.takeBelow(pointerOf(at)),
      ...(layout === "groups"
        ? {
            button: {
              value: `remove:${pointerOf(at)}`,
              label: `Remove: ${name} ${i + 1}`,
            },
          }
        : {}),
    };
  });
  return {
    type: "list",
    pointer,
    title,
    ...optional("intro", intro),
    layout,
    entries,
    faults: context.faults.takeBelow(pointer),
    ...(typed.length >= atMost ? {} : { button: { value: `add:${pointer}`, label: `Add: ${name}` } }),
    ...(layout === "rows" ? { paste: formPaste(place, path, typed.length, context.pasted) } : {}),
    ...(pointer === "/failures" && typed.length < atMost ? { starts: context.starts } : {}),
  };
}

/** What stands in the document and has no field of its own, as fields that can be seen and cleared. */
export function unusedGroup(
  section: string,
  unused: readonly (readonly string[])[],
  document: unknown,
  context: FormContext,
): FormGroup[] {
  if (unused.length === 0) return [];
  const blocks = unused.map((path): FormField => {
    const pointer = pointerOf(path);
    const value = path.reduce<unknown>(memberOf, document);
    return {
      type: "field",
      name: pointer,
      pointer,
      label: path.slice(1).join(", ") || section,
      kind: "text",
      value: textOf(value),
      required: false,
      ...optional("fault", context.faults.take(pointer)),
    };
  });
  return [
    {
      type: "group",
      pointer: pointerOf(pathOf(`/${section}`)),
      title: "Typed, but not used",
      intro: "Left from another choice, or not known here. Clear these fields, or change the choice back",
      blocks,
      faults: [],
      button: {
        value: `remove:unused:/${section}`,
        label: "Clear all that is not used",
      },
    },
  ];
}
