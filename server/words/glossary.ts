import { failureTerms, uncertaintyTerms } from "./glossaryFailures.js";
import { decompositionTerms, rateTerms } from "./glossaryRates.js";
import { heatTerms, temperatureTerms } from "./glossaryTemperatures.js";
import { coolingTerms, paperTerms, windowTerms } from "./glossaryVessel.js";

/** A word that the program shows, explained. */
export interface Term {
  /** of the page's anchor, kept for good: links from elsewhere may use it */
  readonly id: string;
  readonly name: string;
  /** how else the pages write it */
  readonly also?: readonly string[];
  /** two sentences */
  readonly meaning: string;
  /** as `readFormula` takes it */
  readonly formula?: string;
  readonly source: string;
}

export interface TermGroup {
  readonly id: string;
  readonly title: string;
  readonly terms: readonly Term[];
}

/** Every term that the program shows, in the order in which a reader meets them. */
export const glossary: readonly TermGroup[] = [
  { id: "temperatures", title: "Temperatures and class", terms: temperatureTerms },
  { id: "heat", title: "Heat and accumulation", terms: heatTerms },
  { id: "rates", title: "Rate constants", terms: rateTerms },
  { id: "decomposition", title: "Decomposition and time", terms: decompositionTerms },
  { id: "cooling", title: "Cooling", terms: coolingTerms },
  { id: "window", title: "Window", terms: windowTerms },
  { id: "failures", title: "Cooling failures", terms: failureTerms },
  { id: "uncertainty", title: "Uncertainty", terms: uncertaintyTerms },
  { id: "paper", title: "Case, sheet and register", terms: paperTerms },
];

const byName: ReadonlyMap<string, Term> = new Map(
  glossary
    .flatMap((group) => group.terms)
    .flatMap((term) => [term.name, ...(term.also ?? [])].map((name) => [key(name), term] as const)),
);

/** The term of that name, whatever its capitals; null where the glossary has none. */
export function termNamed(name: string): Term | null {
  return byName.get(key(name)) ?? null;
}

/** Lower case folds "Accumulation" and "accumulation"; a single letter is a symbol and keeps its case. */
function key(name: string): string {
  return name.length > 1 ? name.toLowerCase() : name;
}
