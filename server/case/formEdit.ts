import { pathOf } from "./faults.js";
import { startedFailure } from "./formStarts.js";
import { unusedOf } from "./formUnused.js";
import { memberOf, outline, type Place, placeBelow, valueAt } from "./outline.js";
import { isGroup } from "./typedParts.js";

/**
 * What a button of the form does to the document: `add:/failures`, `add:/decomposition`,
 * `add-failure:quench`, `remove:/failures/2`, `remove:unused:/reaction`. Anything else changes nothing.
 */
export function editForm(document: unknown, action: string): unknown {
  if (action.startsWith("remove:unused:")) {
    const path = pathOf(action.slice("remove:unused:".length));
    return unusedOf(document)
      .filter((unused) => path.every((key, i) => unused[i] === key))
      .reduceRight<unknown>((edited, unused) => withoutEmpty(edited, unused), document);
  }
  if (action.startsWith("add-failure:")) {
    const failure = startedFailure(document, action.slice("add-failure:".length));
    return failure === null ? document : added(document, ["failures"], failure);
  }
  if (action.startsWith("add:")) return added(document, pathOf(action.slice("add:".length)));
  if (action.startsWith("remove:")) return without(document, pathOf(action.slice("remove:".length)));
  return document;
}

function added(document: unknown, path: readonly string[], entry?: object): unknown {
  const place = placeAt(document, path);
  if (place === undefined) return document;
  const there = valueAt(document, ...path);
  if (place.kind === "list") {
    const entries: unknown[] = Array.isArray(there) ? there : [];
    if (entries.length >= place.about.atMost) return document;
    return replaced(document, path, [...entries, entry ?? place.about.starter ?? {}]);
  }
  const isOptional = place.kind === "group" || place.kind === "variants";
  return isOptional && there === undefined ? replaced(document, path, {}) : document;
}

/** The place of the schema at the end of a path, given what the document holds on the way. */
export function placeAt(document: unknown, path: readonly string[]): Place | undefined {
  let place: Place | undefined = outline;
  let value = document;
  for (const key of path) {
    place = place === undefined ? undefined : placeBelow(place, key, value);
    value = memberOf(value, key);
  }
  return place;
}

/** The document with another value at the end of a path. */
export function replaced(document: unknown, [key, ...rest]: readonly string[], value: unknown): unknown {
  if (key === undefined) return value;
  const below = replaced(memberOf(document, key), rest, value);
  if (Array.isArray(document)) return document.map((entry, i) => (String(i) === key ? below : entry));
  return Object.fromEntries([...Object.entries(isGroup(document) ? document : {}), [key, below]]);
}

/** The document without what stands at the end of a path. */
export function without(document: unknown, [key, ...rest]: readonly string[]): unknown {
  if (key === undefined || memberOf(document, key) === undefined) return document;
  if (rest.length > 0) return replaced(document, [key], without(memberOf(document, key), rest));
  if (Array.isArray(document)) return document.filter((_, i) => String(i) !== key);
  return Object.fromEntries(
    Object.entries(isGroup(document) ? document : {}).filter(([other]) => other !== key),
  );
}

/** The same, and without the groups that it leaves empty on the way. */
function withoutEmpty(document: unknown, path: readonly string[]): unknown {
  const edited = without(document, path);
  const parent = path.slice(0, -1);
  const left = valueAt(edited, ...parent);
  const isEmpty = typeof left === "object" && left !== null && Object.keys(left).length === 0;
  return parent.length > 0 && isEmpty ? withoutEmpty(edited, parent) : edited;
}
