import type { z } from "zod";
import { cameAs, type Fault, pointerOf, shortened } from "./faults.js";
import { membersOf, outline, type Place, placeBelow, valueAt } from "./outline.js";
import { oneOf, unknownKey } from "./typedParts.js";

/**
 * The schema's complaints in our words: what came, what was expected, what would do.
 *
 * @param document as it came
 */
export function shapeFaults(issues: readonly z.core.$ZodIssue[], document: unknown): Fault[] {
  return issues.flatMap((issue) => {
    if (issue.code === "unrecognized_keys") {
      return issue.keys.map((key) => ({
        pointer: pointerOf([...issue.path, key]),
        message: strangeKey(key, placeAt(document, issue.path), valueAt(document, ...issue.path)),
      }));
    }
    return [{ pointer: pointerOf(issue.path), message: messageOf(issue, document) }];
  });
}

function messageOf(issue: z.core.$ZodIssue, document: unknown): string {
  const value = valueAt(document, ...issue.path);
  const came = cameAs(value);
  switch (issue.code) {
    case "custom":
      return issue.message;
    case "invalid_type":
      return `${came}; expected ${issue.expected === "object" ? groupWords(placeAt(document, issue.path)) : "a list"}`;
    case "invalid_value":
      return `${came}; expected ${oneOf(issue.values.map(String))}`;
    case "invalid_union":
      return unknownVariant(came, document, issue.path);
    case "too_small":
      return `holds ${lengthOf(value)}; at least ${issue.minimum} are needed`;
    case "too_big":
      return `holds ${lengthOf(value)}; at most ${issue.maximum} are taken`;
    default:
      return `${came}; ${issue.message}`;
  }
}

function lengthOf(value: unknown): string {
  const length = Array.isArray(value) ? value.length : 0;
  return length === 1 ? "1 entry" : `${length} entries`;
}

/** The place of the schema at a path of the document. */
function placeAt(document: unknown, path: readonly PropertyKey[]): Place | undefined {
  let place: Place | undefined = outline;
  for (const [depth, key] of path.entries()) {
    if (place === undefined) return undefined;
    place = placeBelow(place, String(key), valueAt(document, ...path.slice(0, depth)));
  }
  return place;
}

function groupWords(place: Place | undefined): string {
  const keys =
    place?.kind === "variants"
      ? [place.teller]
      : place?.kind === "group"
        ? [...place.members].filter(([, member]) => member.required).map(([key]) => key)
        : [];
  return keys.length === 0 ? "a group of fields" : `a group of fields with ${keys.join(", ")}`;
}

function strangeKey(key: string, place: Place | undefined, value: unknown): string {
  if (place === undefined) return `${shortened(key)} is not a known key here`;
  if (place.kind === "variants") {
    const owners = [...place.options].filter(([, option]) => option.members.has(key)).map(([word]) => word);
    const chosen = valueAt(value, place.teller);
    if (owners.length > 0) {
      return `${shortened(key)} belongs to ${place.teller} ${oneOf(owners)}; this one is ${cameAs(chosen).replace("came as ", "")}`;
    }
  }
  return unknownKey(key, [...membersOf(place, value).keys()]);
}

function unknownVariant(came: string, document: unknown, path: readonly PropertyKey[]): string {
  const parent = placeAt(document, path.slice(0, -1));
  const words = parent?.kind === "variants" ? [...parent.options.keys()] : [];
  const word = valueAt(document, ...path);
  const onlyThere =
    path[0] === "reaction" && (word === "heatRate" || word === "td24")
      ? ", which only a decomposition may state"
      : "";
  return `${came}${onlyThere}; expected ${oneOf(words)}`;
}
