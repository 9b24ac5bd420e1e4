import type { Leaf } from "./leaves.js";
import { memberOf, membersOf, outline, type Place } from "./outline.js";
import { caseFormat } from "./schema.js";
import { isGroup } from "./typedParts.js";

/** More than anyone clears by hand. */
const most = 300;
const deepest = 12;

/**
 * Paths of everything in a document that no field of the form shows: unknown keys, and what was typed
 * for a choice that has changed since. The form shows them apart, so that nothing is lost unseen.
 */
export function unusedOf(document: unknown): string[][] {
  const found: string[][] = [];
  if (isGroup(document)) below(outline, document, [], found);
  return found;
}

function look(place: Place | undefined, value: unknown, path: readonly string[], found: string[][]): void {
  if (value === undefined || value === null || found.length >= most || path.length > deepest) return;
  const isScalar = typeof value !== "object";
  if (place?.kind === "leaf" ? isScalar || isRead(place.leaf, value) : place?.kind === "word") {
    if (place?.kind === "leaf") insideLeaf(value, path, found);
    return;
  }
  const shaped =
    place !== undefined &&
    (place.kind === "list" || place.kind === "pair" ? Array.isArray(value) : isGroup(value));
  if (isScalar) found.push([...path]);
  else below(shaped ? place : undefined, value, path, found);
}

function below(place: Place | undefined, value: object, path: readonly string[], found: string[][]): void {
  const members = place === undefined ? new Map<string, Place>() : membersOf(place, value);
  for (const [key, member] of Object.entries(value)) {
    look(placeOf(place, members, key), member, [...path, key], found);
  }
  if (
    path.length === 0 &&
    memberOf(value, "format") !== caseFormat &&
    memberOf(value, "format") !== undefined
  ) {
    found.push(["format"]);
  }
}

function placeOf(
  place: Place | undefined,
  members: ReadonlyMap<string, Place>,
  key: string,
): Place | undefined {
  if (place?.kind === "list") return place.entry;
  if (place?.kind === "pair") return place.entries[Number(key)];
  // The choice between variants is a field of its own, whatever word it holds.
  if (place?.kind === "variants" && key === place.teller)
    return place.options.values().next().value?.members.get(key);
  return members.get(key);
}

/** Whether the form shows an object as one field with its details. */
function isRead(leaf: Leaf, value: unknown): boolean {
  const detailed =
    leaf.kind === "quantity" || leaf.kind === "rate" || (leaf.kind === "number" && leaf.estimated);
  return detailed && isGroup(value);
}

function insideLeaf(value: unknown, path: readonly string[], found: string[][], isInner = false): void {
  if (!isGroup(value)) return;
  for (const [key, part] of Object.entries(value)) {
    const nested = key === "value" && isGroup(part);
    // Inside the value of a limit a basis has no control of its own: the limit's is free text.
    const shown = isInner
      ? ["value", "standardError", "source"]
      : ["value", "standardError", "source", "basis"];
    if (nested) insideLeaf(part, [...path, key], found, true);
    else if (!shown.includes(key) || typeof part === "object") look(undefined, part, [...path, key], found);
  }
}
