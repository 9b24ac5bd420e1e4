import type { InputNote } from "../screening/model.js";
import { pointerOf } from "./faults.js";
import type { Leaf } from "./leaves.js";
import { memberOf, type Place } from "./outline.js";
import { visitLeaves } from "./typed.js";
import { type Basis, bases, isGroup } from "./typedParts.js";

/**
 * How every quantity of an accepted document is known, in the order of the schema: as typed, with its
 * error, basis and source.
 */
export function inputNotes(document: unknown): InputNote[] {
  const notes: InputNote[] = [];
  visitLeaves(document, (leaf, value, path, groups) => {
    const isQuantity = leaf.kind === "quantity" || leaf.kind === "rate";
    if (!isQuantity && leaf.kind !== "number") return;
    notes.push({
      pointer: pointerOf(path),
      label: labelOf(leaf, path, groups),
      ...notesOf(value),
    });
  });
  return notes;
}

/** `Mass` of the feed as "mass of the feed"; entries of lists with their number. */
export function labelOf(leaf: Leaf, path: readonly string[], groups: readonly Place[]): string {
  const of = groups.flatMap((place) =>
    (place.kind === "group" || place.kind === "variants") && place.about.of !== undefined
      ? [place.about.of]
      : [],
  );
  const suffix = of.length === 0 ? "" : ` ${of.at(-1)}`;
  const entries = groups.flatMap((place, depth) =>
    place.kind === "list" ? [`${lowered(place.about.entry)} ${Number(path[depth]) + 1}`] : [],
  );
  const name = leaf.alone ?? `${leaf.short ?? lowered(leaf.label)}${suffix}`;
  return entries.length === 0 ? name : `${name}, ${entries.join(", ")}`;
}

/** A label inside a sentence: its first letter small, unless it is a symbol such as T_D24. */
function lowered(label: string): string {
  return /^[A-Z][a-z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label;
}

function notesOf(typed: unknown): Omit<InputNote, "pointer" | "label"> {
  if (!isGroup(typed))
    return {
      text: String(typed),
      standardErrorText: null,
      basis: null,
      source: null,
    };
  const inner = isGroup(typed.value) ? typed.value : null;
  const part = (key: string) => memberOf(typed, key) ?? memberOf(inner, key);
  const basis = part("basis");
  return {
    text: textOf(inner === null ? typed.value : inner.value) ?? "",
    standardErrorText: textOf(part("standardError")),
    basis: isBasis(basis) ? basis : null,
    // The basis of a limit is told in any words: to a reader that is where the figure comes from.
    source: textOf(part("source")) ?? (isBasis(basis) ? null : textOf(basis)),
  };
}

function textOf(value: unknown): string | null {
  return typeof value === "string" || typeof value === "number" ? String(value) : null;
}

function isBasis(value: unknown): value is Basis {
  return typeof value === "string" && Object.hasOwn(bases, value);
}
