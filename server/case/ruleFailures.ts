import { memberOf, valueAt } from "./outline.js";
import type { ReportAt } from "./rules.js";
import { figureTyped } from "./typed.js";
import { isGroup } from "./typedParts.js";

/** Timelines that can be run, and slips that change something. */
export function failureRules(document: unknown, report: ReportAt): void {
  const batch = valueAt(document, "reaction", "operation") === "batch";
  const failures = memberOf(document, "failures");
  if (Array.isArray(failures)) {
    for (const [i, failure] of failures.slice(0, 20).entries()) {
      timelineRules(memberOf(failure, "changes"), ["failures", i, "changes"], batch, report);
    }
  }
  const slips = memberOf(document, "slips");
  if (!Array.isArray(slips)) return;
  for (const [i, slip] of slips.entries()) slipRules(slip, ["slips", i], document, report);
}

function timelineRules(
  changes: unknown,
  path: readonly PropertyKey[],
  batch: boolean,
  report: ReportAt,
): void {
  if (!Array.isArray(changes)) return;
  let before: number | null = null;
  for (const [i, change] of changes.entries()) {
    const after = figureTyped(memberOf(change, "after"), "time");
    if (i === 0 && after !== null && after !== 0) {
      report([...path, i, "after"], 'is not 0; the first change is the failure itself, after "0 min"');
    }
    if (before !== null && after !== null && after <= before) {
      report(
        [...path, i, "after"],
        after === before
          ? "is the time of the change before; write both into one change"
          : "is earlier than the change before; expected changes in the order of time",
      );
    }
    before = after ?? before;
    if (memberOf(change, "agitator") === "off" && memberOf(change, "heatTransfer") === undefined) {
      report(
        [...path, i, "heatTransfer"],
        "is missing; with the agitator off say what is left of the heat transfer, such as 0.2",
      );
    }
    if (batch && memberOf(change, "feed") !== undefined) {
      report([...path, i, "feed"], "came with a batch reaction, which has no feed; leave it out");
    }
  }
}

const feedSlips = ["fedAmount", "feedDuration", "feedTemperature"];

function slipRules(slip: unknown, path: readonly PropertyKey[], document: unknown, report: ReportAt): void {
  if (!isGroup(slip)) return;
  if (Object.keys(slip).every((key) => key === "name")) {
    report(path, "changes nothing; expected at least one thing that slips, such as rate 2");
  }
  const reaction = memberOf(document, "reaction");
  if (memberOf(reaction, "operation") === "batch") {
    for (const key of feedSlips.filter((each) => slip[each] !== undefined)) {
      report([...path, key], "came with a batch reaction, which has no feed; leave it out");
    }
  }
  if (slip.chargeOfB !== undefined && valueAt(reaction, "reactants", "B") === undefined) {
    report([...path, "chargeOfB"], "came without a reactant B; leave it out");
  }
}
