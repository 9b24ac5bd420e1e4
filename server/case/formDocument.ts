import { pathOf } from "./faults.js";
import type { Leaf } from "./leaves.js";
import { outline, type Place } from "./outline.js";
import { plainCharacters } from "./pasted.js";
import { caseFormat } from "./schema.js";

/** No control of the form stands deeper; longer pointers are not ours. */
const deepest = 20;

/** What was sent for one place and for the places below it. */
interface Sent {
  text: string;
  readonly below: Map<string, Sent>;
}

/**
 * The case document that a form was sent for. Keeps everything typed, even nonsense; leaves out what is
 * empty. Controls are named by the JSON pointer of where their text goes, all others are passed over.
 *
 * @param body names and values as a browser sends them
 */
export function documentFromForm(body: Readonly<Record<string, unknown>>): unknown {
  const root: Sent = { text: "", below: new Map() };
  for (const [name, value] of Object.entries(body)) {
    if (!name.startsWith("/")) continue;
    const texts = (Array.isArray(value) ? value : [value]).filter((each) => typeof each === "string");
    const text = texts.find((each) => each.trim() !== "") ?? "";
    const path = pathOf(name);
    if (path.length > deepest) continue;
    let sent = root;
    for (const key of path) {
      let next = sent.below.get(key);
      if (next === undefined) {
        next = { text: "", below: new Map() };
        sent.below.set(key, next);
      }
      sent = next;
    }
    sent.text = text.replaceAll("\r\n", "\n");
  }
  return { format: caseFormat, ...groupSent(outline, root) };
}

/** What was typed at a place, or undefined where nothing was. */
function sentAt(place: Place | undefined, sent: Sent, parent: Sent): unknown {
  if (place === undefined) return anythingSent(sent);
  switch (place.kind) {
    case "leaf":
      return leafSent(place.leaf, sent);
    case "word":
      return textSent(sent);
    case "pair":
      return pairSent(place.entries, sent);
    case "list":
      return listSent(place, sent);
    default: {
      const group = groupSent(place, sent);
      return Object.keys(group).length > 0 || isKept(place, parent) ? group : undefined;
    }
  }
}

/** A group that the form showed stays, though empty, where the case needs it or someone asked for it. */
function isKept(place: Place & { readonly kind: "group" | "variants" }, parent: Sent): boolean {
  const { adding, onlyWith } = place.about;
  if (place.required || adding !== undefined) return true;
  return onlyWith !== undefined && parent.below.get(onlyWith[0])?.text === onlyWith[1];
}

function groupSent(place: Place, sent: Sent): Readonly<Record<string, unknown>> {
  const members = membersSent(place, sent);
  const keys = [...members.keys()].filter((key) => sent.below.has(key));
  const others = [...sent.below.keys()].filter((key) => !members.has(key));
  const entries: [string, unknown][] = [];
  for (const key of [...keys, ...others]) {
    const below = sent.below.get(key);
    const value = below === undefined ? undefined : sentAt(members.get(key), below, sent);
    if (value !== undefined) entries.push([key, value]);
  }
  return Object.fromEntries(entries);
}

function membersSent(place: Place, sent: Sent): ReadonlyMap<string, Place> {
  if (place.kind === "group") return place.members;
  if (place.kind !== "variants") return new Map();
  const option = place.options.get(sent.below.get(place.teller)?.text ?? "");
  return option?.members ?? new Map([[place.teller, wordPlace]]);
}

const wordPlace: Place = {
  kind: "word",
  word: "",
  required: true,
  fallback: undefined,
};

/** Rows that are blank vanish; groups stay until they are removed. */
function listSent(place: Place & { readonly kind: "list" }, sent: Sent): unknown[] | undefined {
  const rows = place.about.layout === "rows";
  const entries = inOrder(sent).flatMap((below) => {
    const entry =
      place.entry.kind === "group" ? groupSent(place.entry, below) : sentAt(place.entry, below, sent);
    const blank = typeof entry === "object" && entry !== null && Object.keys(entry).length === 0;
    return rows && blank ? [] : [entry];
  });
  return entries.length > 0 || place.required ? entries : undefined;
}

/** Entries by their number; what has no number comes last. */
function inOrder(sent: Sent): Sent[] {
  const number = (key: string) => (/^\d+$/.test(key) ? Number(key) : Number.MAX_VALUE);
  return [...sent.below].sort(([a], [b]) => number(a) - number(b)).map(([, below]) => below);
}

/** Both ends of a pair, the empty one as empty text, so that each keeps its place. */
function pairSent(entries: readonly Place[], sent: Sent): unknown {
  const values = entries.map((entry, i) => {
    const below = sent.below.get(String(i));
    return below === undefined ? undefined : sentAt(entry, below, sent);
  });
  return values.every((value) => value === undefined) ? undefined : values.map((value) => value ?? "");
}

/** A bare value, or an object where it carries more than its value. */
function leafSent(leaf: Leaf, sent: Sent): unknown {
  const typed = textSent(sent);
  const bare = typed === undefined || leaf.kind !== "number" ? typed : numberSent(typed);
  const parts: [string, unknown][] = [];
  for (const [key, below] of sent.below) {
    const numeric = leaf.kind === "number" && (key === "value" || key === "standardError");
    const part = anythingSent(below);
    if (part !== undefined) parts.push([key, numeric && typeof part === "string" ? numberSent(part) : part]);
  }
  if (parts.length === 0) return bare;
  return Object.fromEntries(bare === undefined ? parts : [["value", bare], ...parts]);
}

function textSent(sent: Sent): string | undefined {
  return sent.text.trim() === "" ? undefined : sent.text;
}

/** A number as JSON has it; text that is none stays text, for the fault to name. */
function numberSent(text: string): number | string {
  const plain = plainCharacters(text);
  const isNumber = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i.test(plain);
  return isNumber && Number.isFinite(Number(plain)) ? Number(plain) : text;
}

/** Where the schema knows nothing, text and groups of text. */
function anythingSent(sent: Sent): unknown {
  const entries: [string, unknown][] = [];
  for (const [key, below] of sent.below) {
    const value = anythingSent(below);
    if (value !== undefined) entries.push([key, value]);
  }
  if (entries.length === 0) return textSent(sent);
  return entries.every(([key], i) => key === String(i))
    ? entries.map(([, value]) => value)
    : Object.fromEntries(entries);
}
