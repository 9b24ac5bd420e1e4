import { printedUnit, valueText, type Working } from "../screening/workingsOutline.js";
import { pathOf } from "./faults.js";
import { replaced, without } from "./formEdit.js";
import { textOf } from "./formFields.js";
import type { FormWorking } from "./formShape.js";
import { memberOf, valueAt } from "./outline.js";
import { isGroup } from "./typedParts.js";
import { type WorkedField, workingGroups, workingsIn } from "./workings.js";

/** What fields held before a working filled them, each as JSON; "" for a field that was empty. */
export type Before = Readonly<Partial<Record<WorkedField, string>>>;

const fields = Object.keys(workingGroups).filter(isWorkedField);

const buttons: Readonly<Record<WorkedField, string>> = {
  "/vessel/heatTransferCoefficient": "Work out U",
  "/vessel/heatTransferArea": "Work out the area",
  "/limits/maximumTechnicalTemperature": "Work out MTT",
};

function isWorkedField(pointer: string): pointer is WorkedField {
  return Object.hasOwn(workingGroups, pointer);
}

/** Name of the hidden control; no control of the case document starts without a slash. */
function controlOf(field: WorkedField): string {
  return `before:${field}`;
}

/** Whether a button fills a field from its working, or takes that back: `work:/vessel/heatTransferArea`. */
export function isWorking(action: string): boolean {
  const [verb, pointer = ""] = action.split(":");
  return (verb === "work" || verb === "undo") && isWorkedField(pointer);
}

/** What the hidden controls of a form kept. */
export function beforeOf(body: Readonly<Record<string, unknown>>): Before {
  const kept = fields.map((field) => [field, body[controlOf(field)]] as const);
  return Object.fromEntries(kept.filter(([, text]) => typeof text === "string"));
}

/** The workings of a form, by the pointer of the group that holds what each is given. */
export function formWorkings(document: unknown, before: Before): ReadonlyMap<string, FormWorking> {
  const workings = workingsIn(document);
  return new Map(
    fields.map((field) => {
      const working = workings.find((each) => each.field === field);
      return [workingGroups[field], formWorkingOf(field, working, document, before[field])];
    }),
  );
}

function formWorkingOf(
  field: WorkedField,
  working: Working | undefined,
  document: unknown,
  before: string | undefined,
): FormWorking {
  const { result = null, resultText = null } = working ?? {};
  const undo = before === undefined ? {} : { undo: undoOf(field, before) };
  const button = { value: `work:${field}`, label: buttons[field] };
  const shared = { field, title: working?.title ?? "", button, ...undo };
  if (working === undefined || result === null || resultText === null)
    return { ...shared, rows: [], notes: [] };
  return {
    ...shared,
    rows: [
      ...working.steps.map(({ label, equation, text }) => ({ label, equation, text })),
      { label: "Result", equation: `typed as ${resultText}`, text: valueText(result, working.unit) },
    ],
    notes: notesOf(working, typedText(valueAt(document, ...pathOf(field)))),
  };
}

function notesOf({ follows, cautions, typical, unit }: Working, typed: string): string[] {
  const notes = cautions.map((caution) => caution.text);
  if (follows) notes.unshift(`The field holds ${typed}, which follows from this.`);
  else if (typed === "") notes.unshift("The field is still empty: the button fills it.");
  if (typical !== null && !cautions.some(({ code }) => code === "OUTSIDE_HELPER_RANGE")) {
    const [low, high] = typical;
    notes.push(
      `Inside the range that a handbook holds typical, ${low} to ${high} ${printedUnit(unit)} (Perry, Table 11-7).`,
    );
  }
  return notes;
}

function undoOf(field: WorkedField, before: string): NonNullable<FormWorking["undo"]> {
  const text = typedText(parsed(before));
  const label = text === "" ? "Undo: empty the field again" : `Undo: back to ${text}`;
  return { button: { value: `undo:${field}`, label }, name: controlOf(field), value: before };
}

/** The value of a field in whichever shape it was typed. */
function typedText(typed: unknown): string {
  const value = isGroup(typed) ? memberOf(typed, "value") : typed;
  return textOf(isGroup(value) ? memberOf(value, "value") : value);
}

/** The value that a hidden control kept; undefined for an empty field, and for what no form of ours sent. */
function parsed(text: string): unknown {
  try {
    return text === "" ? undefined : JSON.parse(text);
  } catch {
    return undefined;
  }
}

/**
 * Fills a field from its working, or gives it back what it held before. A working that cannot be done
 * changes nothing.
 *
 * @param action one that `isWorking`
 * @param before what the form kept
 * @returns the document, what is to be kept from now on, and where the working's faults stand
 */
export function workField(
  document: unknown,
  action: string,
  before: Before,
): { readonly document: unknown; readonly before: Before; readonly group: string } {
  const [verb, field = ""] = action.split(":");
  if (!isWorkedField(field)) return { document, before, group: "" };
  const group = workingGroups[field];
  const path = pathOf(field);
  const there = valueAt(document, ...path);
  if (verb === "undo") {
    const { [field]: text, ...others } = before;
    const value = parsed(text ?? "");
    if (text === undefined) return { document, before, group };
    const given = value === undefined ? without(document, path) : replaced(document, path, value);
    return { document: given, before: others, group };
  }
  const working = workingsIn(document).find((each) => each.field === field);
  if (working === undefined || working.resultText === null) return { document, before, group };
  const { resultText: value, basis, source } = working;
  const filled = replaced(document, path, { value, basis, source });
  const isSame = typedText(there) === value && before[field] !== undefined;
  const kept = isSame ? before[field] : there === undefined ? "" : JSON.stringify(there);
  return { document: filled, before: { ...before, [field]: kept }, group };
}
