import { dimensions, type Kind } from "./dimensions.js";
import type { Leaf } from "./leaves.js";
import { memberOf, outline, type Place, placeBelow, valueAt } from "./outline.js";
import { readQuantity } from "./quantities.js";
import { isGroup } from "./typedParts.js";
import type { TypedRate } from "./typedQuantities.js";

/** Called for everything typed that stands where the schema has a leaf. */
export type Visit = (leaf: Leaf, value: unknown, path: readonly string[], groups: readonly Place[]) => void;

/** Walks what a document holds, sound or not, in the order of its schema. */
export function visitLeaves(document: unknown, visit: Visit): void {
  descend(outline, document, [], [], visit);
}

function descend(
  place: Place,
  value: unknown,
  path: readonly string[],
  groups: readonly Place[],
  visit: Visit,
): void {
  if (value === undefined) return;
  if (place.kind === "leaf") {
    visit(place.leaf, value, path, groups);
    return;
  }
  const inner = [...groups, place];
  if (place.kind === "list" || place.kind === "pair") {
    if (!Array.isArray(value)) return;
    const atMost = place.kind === "list" ? place.about.atMost : place.entries.length;
    for (let i = 0; i < Math.min(value.length, atMost); i++) {
      const entry = placeBelow(place, String(i), value);
      if (entry !== undefined) descend(entry, value[i], [...path, String(i)], inner, visit);
    }
    return;
  }
  const members = place.kind === "group" ? place.members : variantMembers(place, value);
  for (const [key, member] of members) {
    descend(member, memberOf(value, key), [...path, key], inner, visit);
  }
}

function variantMembers(place: Place, value: unknown): ReadonlyMap<string, Place> {
  if (place.kind !== "variants") return new Map();
  const word = memberOf(value, place.teller);
  return (typeof word === "string" ? place.options.get(word)?.members : undefined) ?? new Map();
}

/** The figure of something typed as a number, with or without its error; null where it is none. */
function numberTyped(typed: unknown): number | null {
  const value = isGroup(typed) ? typed.value : typed;
  return typeof value === "number" && Number.isFinite(value) ? value : null;
}

/** The SI figure of something typed as a quantity; null where it cannot be read. */
export function figureTyped(typed: unknown, kind: Kind): number | null {
  const parts = rateTyped(typed);
  if (parts === null) return null;
  const reading = readQuantity(parts.value, dimensions[kind]);
  return reading.ok && Number.isFinite(reading.measured.value) ? reading.measured.value : null;
}

/** The texts of something typed as a quantity; null where its shape is wrong. */
export function rateTyped(typed: unknown): TypedRate | null {
  if (typeof typed === "string") return { value: typed, standardError: null };
  if (!isGroup(typed) || typeof typed.value !== "string") return null;
  const { value, standardError } = typed;
  return {
    value,
    standardError: typeof standardError === "string" ? standardError : null,
  };
}

/**
 * Overall order of the desired reaction as typed, n = a + b; an order that is left out is 1.
 *
 * @returns null where an order cannot be read
 */
export function overallOrder(document: unknown): number | null {
  const reactants = valueAt(document, "reaction", "reactants");
  const of = (reactant: unknown) => {
    const order = memberOf(reactant, "order");
    return order === undefined ? 1 : numberTyped(order);
  };
  const a = of(memberOf(reactants, "A"));
  const b = memberOf(reactants, "B") === undefined ? 0 : of(memberOf(reactants, "B"));
  return a === null || b === null ? null : a + b;
}
