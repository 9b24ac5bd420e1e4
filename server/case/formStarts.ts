import { type StartingPoint, startingPoints } from "../failure/startingPoints.js";
import type { FormStart } from "./formShape.js";
import { memberOf, valueAt } from "./outline.js";
import { figureTyped } from "./typed.js";

/** Failures to begin with, filled in from what the case says so far. */
function startsOf(document: unknown): readonly StartingPoint[] {
  return startingPoints({
    operation: valueAt(document, "reaction", "operation") === "semibatch" ? "semibatch" : "batch",
    processTemperature: figureTyped(valueAt(document, "reaction", "temperature"), "temperature"),
    coolantTemperature: figureTyped(valueAt(document, "vessel", "coolant", "temperature"), "temperature"),
    mass: figureTyped(valueAt(document, "mixture", "mass"), "mass"),
  });
}

/** The buttons that add a failure to begin with. */
export function failureStarts(document: unknown): readonly FormStart[] {
  return startsOf(document).map(({ key, question, failure }) => ({
    button: { value: `add-failure:${key}`, label: failure.name },
    question,
  }));
}

/**
 * The failure of a starting point as an entry of the case, under a name that no other failure has.
 *
 * @returns null where there is no such starting point for this case
 */
export function startedFailure(document: unknown, key: string): object | null {
  const failure = startsOf(document).find((point) => point.key === key)?.failure;
  if (failure === undefined) return null;
  const failures = memberOf(document, "failures");
  const taken = Array.isArray(failures) ? failures.map((each) => memberOf(each, "name")) : [];
  const names = [failure.name, ...taken.map((_, at) => `${failure.name}, ${at + 2}`)];
  return { ...failure, name: names.find((name) => !taken.includes(name)) ?? failure.name };
}
