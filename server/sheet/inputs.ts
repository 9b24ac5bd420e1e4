import type { InputNote } from "../screening/model.js";
import { type Cursor, heading, paragraph, styles, subheading } from "./page.js";
import { type Column, table } from "./table.js";
import {
  type TypedEntry,
  type TypedField,
  type TypedInput,
  type TypedList,
  typedInputs,
} from "./typedInputs.js";

const columns: readonly Column[] = [
  { heading: "Quantity", share: 33 },
  { heading: "As typed", share: 22 },
  { heading: "Standard error", share: 15 },
  { heading: "Basis", share: 13 },
  { heading: "Source", share: 20 },
];

/** Parts of a case in the order in which its document has them. */
const parts: readonly (readonly [string, readonly string[]])[] = [
  ["Mixture", ["mixture"]],
  ["Reaction", ["reaction"]],
  ["Decomposition", ["decomposition"]],
  ["Vessel", ["vessel"]],
  ["Limits", ["limits"]],
];

/** Every input in its author's own words and units, those that were only assumed before all others. */
export function writeInputs(cursor: Cursor, document: unknown, notes: readonly InputNote[]): void {
  heading(cursor, "Inputs as typed");
  const assumed = notes.filter((note) => note.basis === "assumed");
  subheading(cursor, `Assumed inputs (${assumed.length})`);
  if (assumed.length === 0) paragraph(cursor, "No input is marked as assumed.", styles.body);
  else table(cursor, columns, assumed.map(rowOfNote));
  const { single, lists } = typedInputs(document);
  const rest = single.filter((input) => input.basis !== "assumed");
  writeSingle(
    cursor,
    "Case and batch record",
    rest.filter((input) => !parts.some(([, keys]) => isUnder(input, keys))),
  );
  for (const [title, keys] of parts) {
    writeSingle(
      cursor,
      title,
      rest.filter((input) => isUnder(input, keys)),
    );
    for (const list of lists.filter((each) => isUnder(each, keys))) writeList(cursor, list);
  }
  for (const list of lists.filter((each) => !parts.some(([, keys]) => isUnder(each, keys)))) {
    writeList(cursor, list);
  }
}

function isUnder(typed: { readonly pointer: string }, keys: readonly string[]): boolean {
  return keys.includes(typed.pointer.split("/")[1] ?? "");
}

function writeSingle(cursor: Cursor, title: string, inputs: readonly TypedInput[]): void {
  if (inputs.length === 0) return;
  subheading(cursor, title);
  if (inputs.some((input) => input.measurable)) table(cursor, columns, inputs.map(rowOfInput));
  else {
    table(
      cursor,
      [
        { heading: "Field", share: 33 },
        { heading: "As typed", share: 70 },
      ],
      inputs.map((input) => [input.label, input.text]),
    );
  }
}

function rowOfNote(note: InputNote): string[] {
  return [
    note.label,
    note.text,
    note.standardErrorText ?? "not given",
    note.basis ?? "not said",
    note.source ?? "not given",
  ];
}

function rowOfInput(input: TypedInput): string[] {
  if (!input.measurable) return [input.label, input.text, "", "", ""];
  return [
    input.label,
    input.text,
    input.standardError ?? "not given",
    input.basis ?? "not said",
    input.source ?? "not given",
  ];
}

function writeList(cursor: Cursor, list: TypedList): void {
  subheading(cursor, list.title);
  if (list.layout === "rows") writeRows(cursor, list);
  else writeEntries(cursor, list);
}

/** One row per entry, one column per field that any of them has. */
function writeRows(cursor: Cursor, list: TypedList): void {
  const labels = new Map(
    list.entries.flatMap((entry) => entry.fields.map((field) => [field.key, field.label])),
  );
  table(
    cursor,
    [{ heading: list.entry, share: 1 }, ...[...labels.values()].map((heading) => ({ heading, share: 2 }))],
    list.entries.map((entry, index) => [
      String(index + 1),
      ...[...labels.keys()].map((key) => entry.fields.find((field) => field.key === key)?.text ?? "–"),
    ]),
  );
}

/** One row per entry, what it says as a sentence, each entry of a list within it on a line of its own. */
function writeEntries(cursor: Cursor, list: TypedList): void {
  table(
    cursor,
    [
      { heading: list.entry, share: 30 },
      { heading: "As typed", share: 70 },
    ],
    list.entries.map((entry, index) => [
      entry.fields.find((field) => field.key === "name")?.text ?? `${list.entry} ${index + 1}`,
      linesOf(entry).join("\n"),
    ]),
  );
}

function linesOf(entry: TypedEntry): string[] {
  const own = entry.fields.filter((field) => field.key !== "name");
  return [...(own.length === 0 ? [] : [fieldsText(own)]), ...entry.inner.map(fieldsText)];
}

function fieldsText(fields: readonly TypedField[]): string {
  const text = fields.map((field) => `${field.label.toLowerCase()} ${field.text}`).join(", ");
  return text.charAt(0).toUpperCase() + text.slice(1);
}
