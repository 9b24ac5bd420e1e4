import type { Findings, Spans } from "../screening/findings.js";
import { differenceText, temperatureText } from "../words/numbers.js";
import { spanText } from "./windowWords.js";

type Span = Spans[number];

function leftOf({ window }: Findings): Span | null {
  if (window === null || window.lower_K === null || window.upper_K === null) return null;
  return [window.lower_K, window.upper_K];
}

/** The window of a case in a table: its ends rounded inwards. */
export function windowCell(findings: Findings): string {
  const left = leftOf(findings);
  if (findings.window === null) return "not assessed";
  return `${left === null ? "nothing" : spanText(left)}${findings.window.incomplete ? ", incomplete" : ""}`;
}

function one(name: string, findings: Findings): string {
  const { window, temperatures } = findings;
  if (window === null) return `The ${name} window was not assessed.`;
  const plan = `the planned ${temperatureText(temperatures.process_K)} is ${window.containsProcess ? "inside" : "OUTSIDE"}`;
  const left = leftOf(findings);
  const incomplete = window.incomplete ? " It is incomplete: a criterion lacks its data." : "";
  if (left === null) return `The ${name} window is empty; ${plan}.${incomplete}`;
  const wide = differenceText(left[1] - left[0], "down");
  return `The ${name} window is ${spanText(left)}, ${wide} wide; ${plan}.${incomplete}`;
}

/** Both windows, and what they have in common, in plain sentences. */
export function compareSentence(first: Findings, second: Findings): string {
  const [a, b] = [leftOf(first), leftOf(second)];
  const each = `${one("first", first)} ${one("second", second)}`;
  if (a === null || b === null) return each;
  const common: Span = [Math.max(a[0], b[0]), Math.min(a[1], b[1])];
  if (!(common[0] < common[1])) return `${each} No temperature lies in both.`;
  return `${each} ${spanText(common)} lies in both.`;
}
