import { type Dimension, rateConstantDimension } from "./dimensions.js";
import type { FaultBook } from "./faultBook.js";
import { pointerOf } from "./faults.js";
import type { Pasted } from "./formPaste.js";
import type { FormChoice, FormControl, FormField, FormStart, FormWorking } from "./formShape.js";
import type { Leaf } from "./leaves.js";
import { memberOf, type Place } from "./outline.js";
import { readBack } from "./readBack.js";
import { bases, isGroup } from "./typedParts.js";
import { typicalText } from "./typicalRanges.js";

/** What every part of the form is built with. */
export interface FormContext {
  readonly faults: FaultBook;
  /** overall order of the reaction, where it can be read */
  readonly order: number | null;
  /** workings by the pointer of the group that holds what they are given */
  readonly workings: ReadonlyMap<string, FormWorking>;
  /** what waits in the text areas of tables */
  readonly pasted: Pasted;
  /** failures to begin with */
  readonly starts: readonly FormStart[];
}

/** The field of a leaf. */
export function fieldOf(
  place: Place & { readonly kind: "leaf" },
  value: unknown,
  path: readonly string[],
  context: FormContext,
): FormField {
  const { leaf } = place;
  const detailed = isDetailed(leaf);
  const holder = detailed ? holderOf(value, path) : { path, value: undefined };
  const inner = holder.value === undefined ? value : memberOf(holder.value, "value");
  const namePath = holder.value === undefined ? path : [...holder.path, "value"];
  const text = textOf(inner);
  const fault = context.faults.take(pointerOf(path), pointerOf(namePath));
  const hint = [leaf.hint, place.fallback === undefined ? undefined : `${String(place.fallback)} where empty`]
    .filter((part) => part !== undefined)
    .join(". ");
  return {
    type: "field",
    name: pointerOf(namePath),
    pointer: pointerOf(path),
    label: leaf.label,
    kind: leaf.kind === "rate" ? "quantity" : leaf.kind === "rateUnit" ? "text" : leaf.kind,
    value: text,
    ...(leaf.kind === "choice"
      ? {
          choices: choicesOf(leaf.choices, text, leaf.blank ?? blankOf(place.required)),
        }
      : {}),
    ...optional("unitHint", unitHintOf(leaf, path, context)),
    ...optional("hint", hint === "" ? undefined : hint),
    ...optional("typical", leaf.typical === undefined ? undefined : typicalText(leaf.typical)),
    ...optional("readBack", readBackOf(leaf, text, path, context)),
    required: place.required,
    ...optional("fault", fault),
    ...(detailed ? { detail: detailOf(leaf, value, path, holder, context) } : {}),
  };
}

function isDetailed(leaf: Leaf): boolean {
  return leaf.kind === "quantity" || leaf.kind === "rate" || (leaf.kind === "number" && leaf.estimated);
}

/** The object that holds a value beside its error: the field's own, or one inside it. */
function holderOf(value: unknown, path: readonly string[]): { path: readonly string[]; value: unknown } {
  if (!isGroup(value)) return { path, value: undefined };
  return isGroup(value.value) ? { path: [...path, "value"], value: value.value } : { path, value };
}

function detailOf(
  leaf: Leaf,
  value: unknown,
  path: readonly string[],
  holder: { path: readonly string[]; value: unknown },
  { faults }: FormContext,
): NonNullable<FormField["detail"]> {
  const free = leaf.kind === "quantity" && leaf.freeBasis === true;
  const control = (key: string, label: string, at: readonly string[], from: unknown): FormControl => {
    const name = pointerOf([...at, key]);
    const text = textOf(memberOf(from, key));
    const isChoice = key === "basis" && !free;
    return {
      name,
      label: `${label}: ${leaf.label}`,
      value: text,
      kind: isChoice ? "choice" : "text",
      ...(isChoice ? { choices: choicesOf(bases, text, blankOf(false)) } : {}),
      ...optional("fault", faults.take(name)),
    };
  };
  const standardError = control("standardError", "Standard error", holder.path, holder.value);
  const basis = free
    ? control("basis", "Basis", path, value)
    : control("basis", "Basis", holder.path, holder.value);
  const source = control("source", "Source", holder.path, holder.value);
  const used = [standardError, basis, source].some((each) => each.value !== "" || each.fault !== undefined);
  return { standardError, basis, source, used };
}

/** What the words of a choice say where none was chosen. */
export function blankOf(required: boolean): string {
  return required ? "Choose" : "Not said";
}

/** The words of a choice; one that was typed but is not among them stays, so that it can be seen. */
export function choicesOf(
  choices: Readonly<Record<string, string>>,
  typed: string,
  blank: string,
): FormChoice[] {
  const known = Object.entries(choices).map(([value, label]) => ({
    value,
    label,
  }));
  const strange =
    typed === "" || Object.hasOwn(choices, typed) ? [] : [{ value: typed, label: `${typed} (unknown)` }];
  return [{ value: "", label: blank }, ...known, ...strange];
}

function unitHintOf(leaf: Leaf, path: readonly string[], context: FormContext): string | undefined {
  const dimension = dimensionOf(leaf, path, context);
  if (dimension === undefined) return undefined;
  return `such as ${leaf.kind === "rateUnit" ? dimension.unit : dimension.example}`;
}

function readBackOf(
  leaf: Leaf,
  text: string,
  path: readonly string[],
  context: FormContext,
): string | undefined {
  const dimension = leaf.kind === "rateUnit" ? undefined : dimensionOf(leaf, path, context);
  return dimension === undefined || text === "" ? undefined : readBack(text, dimension);
}

/** What a field must hold; that of a rate constant follows from its order, as far as that can be read. */
function dimensionOf(leaf: Leaf, path: readonly string[], { order }: FormContext): Dimension | undefined {
  if (leaf.kind === "quantity") return leaf.dimension;
  if (leaf.kind !== "rate" && leaf.kind !== "rateUnit") return undefined;
  const of = path[0] === "decomposition" ? 1 : order;
  return of === null ? undefined : rateConstantDimension(of);
}

/** A value as the text of its control; groups and lists are shown elsewhere. */
export function textOf(value: unknown): string {
  return value === undefined || value === null || typeof value === "object" ? "" : String(value);
}

/** A key with its value, or nothing. */
export function optional<Key extends string, Value>(
  key: Key,
  value: Value | undefined,
): { readonly [K in Key]?: Value } {
  const kept: { [K in Key]?: Value } = {};
  if (value !== undefined) kept[key] = value;
  return kept;
}
