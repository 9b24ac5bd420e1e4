import { hasLoneSurrogate } from "./canonical.js";
import { cameAs, nearestKey, shortened } from "./faults.js";

/** How well a quantity is known, in one word. */
export const bases = {
  measured: "measured",
  estimated: "estimated",
  assumed: "assumed",
} as const;
export type Basis = keyof typeof bases;

/** Says what is wrong with a part of a leaf; the path is relative to the leaf. */
export type Report = (message: string, ...path: string[]) => void;

const longestText = 2000;

const quantityKeys = ["value", "standardError", "source", "basis"];

/** Checks source, basis and the keys of a quantity's object. */
export function readNotes(typed: Readonly<Record<string, unknown>>, report: Report): boolean {
  let sound = true;
  const wrong = (message: string, key: string) => {
    report(message, key);
    sound = false;
  };
  for (const key of Object.keys(typed)) {
    if (!quantityKeys.includes(key)) wrong(unknownKey(key, quantityKeys), key);
  }
  if (typed.source !== undefined) {
    readText(typed.source, "text", (message) => wrong(message, "source"));
  }
  if (typed.basis !== undefined && !isWord(typed.basis, bases)) {
    wrong(`${cameAs(typed.basis)}; expected ${oneOf(Object.keys(bases))}`, "basis");
  }
  return sound;
}

/** The fault of a key that nothing reads. */
export function unknownKey(key: string, known: readonly string[]): string {
  const near = nearestKey(key, known);
  return `${shortened(key)} is not a known key here${
    near === null ? `; known are ${known.join(", ")}` : `; did you mean "${near}"?`
  }`;
}

/** Whether a value is an object with keys, not a list. */
export function isGroup(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

/** Reads free text: something, and not too much. */
export function readText(typed: unknown, wanted: string, report: (message: string) => void): string | null {
  if (typeof typed !== "string") report(`${cameAs(typed)}; expected ${wanted}`);
  else if (typed.trim() === "") report(`is empty; expected ${wanted}, or leave the key out`);
  else if (typed.length > longestText) {
    report(`is ${typed.length} characters long; at most ${longestText} are kept`);
  } else if (hasLoneSurrogate(typed)) report("holds half of a surrogate pair, which is not text");
  else return typed;
  return null;
}

/** Whether something typed is one of a choice's words. */
export function isWord<Choices extends object>(
  typed: unknown,
  choices: Choices,
): typed is Extract<keyof Choices, string> {
  return typeof typed === "string" && Object.hasOwn(choices, typed);
}

/** `"a", "b" or "c"` */
export function oneOf(words: readonly string[]): string {
  const quoted = words.map((word) => `"${word}"`);
  const last = quoted.pop() ?? "";
  return quoted.length === 0 ? last : `${quoted.join(", ")} or ${last}`;
}

/** The word that was probably meant, as the end of a fault. */
export function meant(typed: unknown, words: readonly string[]): string {
  const near = typeof typed === "string" ? nearestKey(typed, words) : null;
  return near === null ? "" : `: did you mean "${near}"?`;
}
