import { pointerOf } from "../case/faults.js";
import { inputNotes, labelOf } from "../case/inputs.js";
import type { Leaf } from "../case/leaves.js";
import { type Place, valueAt } from "../case/outline.js";
import { visitLeaves } from "../case/typed.js";
import type { InputNote } from "../screening/model.js";

/** Something typed, as the sheet shows it. */
export interface TypedInput {
  readonly pointer: string;
  readonly label: string;
  readonly text: string;
  readonly standardError: string | null;
  readonly basis: string | null;
  readonly source: string | null;
  /** a quantity or number, of which error, basis and source can be asked */
  readonly measurable: boolean;
}

/** A list of the case: measured rate constants, failures ... */
export interface TypedList {
  readonly pointer: string;
  readonly title: string;
  /** what one of them is called */
  readonly entry: string;
  readonly layout: "rows" | "groups";
  readonly entries: readonly TypedEntry[];
}

export interface TypedEntry {
  /** its own fields, by the label of the field */
  readonly fields: readonly TypedField[];
  /** entries of a list within it: the changes of a failure */
  readonly inner: readonly (readonly TypedField[])[];
}

export interface TypedField {
  readonly key: string;
  readonly label: string;
  readonly text: string;
}

export interface TypedInputs {
  readonly single: readonly TypedInput[];
  readonly lists: readonly TypedList[];
}

interface OpenList extends TypedList {
  readonly entries: {
    readonly fields: TypedField[];
    readonly inner: TypedField[][];
  }[];
}

/** Everything that stands in a case document, in the order of its schema and in its author's own words. */
export function typedInputs(document: unknown): TypedInputs {
  const notes = new Map(inputNotes(document).map((note) => [note.pointer, note]));
  const single: TypedInput[] = [];
  const lists = new Map<string, OpenList>();
  const chosen = new Set<string>();
  visitLeaves(document, (leaf, value, path, groups) => {
    const depth = groups.findIndex((place) => place.kind === "list");
    if (depth < 0) {
      single.push(...choicesAbove(document, path, groups, chosen));
      single.push(inputOf(leaf, value, path, groups, notes));
      return;
    }
    const field = fieldOf(leaf, value, path, groups, notes);
    const pointer = pointerOf(path.slice(0, depth));
    const list = lists.get(pointer) ?? openList(pointer, groups[depth]);
    lists.set(pointer, list);
    const entry = at(list.entries, path[depth], () => ({
      fields: [],
      inner: [],
    }));
    const innerDepth = groups.findIndex((place, index) => index > depth && place.kind === "list");
    if (innerDepth < 0) entry.fields.push(field);
    else at<TypedField[]>(entry.inner, path[innerDepth], () => []).push(field);
  });
  return { single, lists: [...lists.values()] };
}

/** The entry at an index that is a key of a path; it is made where it is not there yet. */
function at<T>(entries: T[], key: string | undefined, make: () => T): T {
  const index = Number(key);
  const entry = entries[index] ?? make();
  entries[index] = entry;
  return entry;
}

/** Which of several forms was chosen, told once before its first field. */
function choicesAbove(
  document: unknown,
  path: readonly string[],
  groups: readonly Place[],
  told: Set<string>,
): TypedInput[] {
  return groups.flatMap((place, depth) => {
    if (place.kind !== "variants") return [];
    const word = valueAt(document, ...path.slice(0, depth), place.teller);
    const option = typeof word === "string" ? place.options.get(word) : undefined;
    const pointer = pointerOf([...path.slice(0, depth), place.teller]);
    if (option?.kind !== "group" || told.has(pointer)) return [];
    told.add(pointer);
    const name = lowered(
      `${place.about.title} ${(place.about.choosing ?? place.teller).toLowerCase()}`.trim(),
    );
    return [{ ...unmeasured(pointer, name), text: option.about.title }];
  });
}

function unmeasured(pointer: string, label: string): Omit<TypedInput, "text"> {
  return {
    pointer,
    label,
    standardError: null,
    basis: null,
    source: null,
    measurable: false,
  };
}

function inputOf(
  leaf: Leaf,
  value: unknown,
  path: readonly string[],
  groups: readonly Place[],
  notes: ReadonlyMap<string, InputNote>,
): TypedInput {
  const pointer = pointerOf(path);
  const note = notes.get(pointer);
  if (note === undefined) {
    return {
      ...unmeasured(pointer, labelOf(leaf, path, groups)),
      text: plainText(leaf, value),
    };
  }
  return {
    pointer,
    label: note.label,
    text: note.text,
    standardError: note.standardErrorText,
    basis: note.basis,
    source: note.source,
    measurable: true,
  };
}

function fieldOf(
  leaf: Leaf,
  value: unknown,
  path: readonly string[],
  groups: readonly Place[],
  notes: ReadonlyMap<string, InputNote>,
): TypedField {
  const note = notes.get(pointerOf(path));
  const beside = [
    note?.standardErrorText ? `± ${note.standardErrorText}` : null,
    note?.basis ?? null,
    note?.source ?? null,
  ].filter((part) => part !== null);
  const about = groups.at(-1);
  const of = about?.kind === "group" && about.about.of !== undefined ? ` ${about.about.of}` : "";
  const text = note?.text ?? plainText(leaf, value);
  return {
    key: path.at(-1) ?? "",
    label: `${leaf.label}${of}`,
    text: beside.length === 0 ? text : `${text} (${beside.join(", ")})`,
  };
}

function plainText(leaf: Leaf, value: unknown): string {
  const word = String(value);
  return leaf.kind === "choice" ? lowered(leaf.choices[word] ?? word) : word;
}

/** A choice inside a sentence: "Runs on" as "runs on", but B as B. */
function lowered(text: string): string {
  return /^[A-Z][a-z]/.test(text) ? text.charAt(0).toLowerCase() + text.slice(1) : text;
}

function openList(pointer: string, place: Place | undefined): OpenList {
  const about =
    place?.kind === "list" ? place.about : { title: pointer, entry: "Entry", layout: "groups" as const };
  return {
    pointer,
    title: about.title,
    entry: about.entry,
    layout: about.layout,
    entries: [],
  };
}
