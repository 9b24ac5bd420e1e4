import { type Checked, type CheckGroup, judge } from "./check.js";
import { interruption } from "./interruption.js";
import { rateConstants } from "./rateConstants.js";
import { regression } from "./regression.js";
import { runaways } from "./runaway.js";
import { semibatch } from "./semibatch.js";
import { vessels } from "./vessel.js";

/** Every check that a page, a sheet and the tests run. */
export const checkGroups: readonly CheckGroup[] = [
  interruption,
  regression,
  ...rateConstants,
  ...vessels,
  ...runaways,
  semibatch,
];

/** A group whose checks have run. */
export interface CheckedGroup extends Omit<CheckGroup, "checks"> {
  readonly checks: readonly Checked[];
}

let ran: readonly CheckedGroup[] | undefined;

/** Runs every check of this build; once in a process, because nothing in them can change. */
export function runChecks(): readonly CheckedGroup[] {
  ran ??= checkGroups.map((group) => ({ ...group, checks: group.checks.map(judge) }));
  return ran;
}

/**
 * What the checks came to, in one line, such as "Checks of this build: 58 of 58 published values and 30 of 30 of an
 * independent implementation agree."
 */
export function checksLine(groups: readonly CheckedGroup[] = runChecks()): string {
  const count = (kind: CheckGroup["kind"]): string => {
    const checks = groups.filter((group) => group.kind === kind).flatMap((group) => group.checks);
    return `${checks.filter((check) => check.agrees).length} of ${checks.length}`;
  };
  return `Checks of this build: ${count("published")} published values and ${count("independent")} of an independent implementation agree.`;
}
