import type { Fault } from "./faults.js";
import { pointerOf } from "./faults.js";
import { memberOf, valueAt } from "./outline.js";
import { failureRules } from "./ruleFailures.js";
import { rateFaults } from "./ruleRates.js";
import { workingFieldRules } from "./ruleWorkings.js";
import { figureTyped } from "./typed.js";
import { isGroup } from "./typedParts.js";
import { workingRules } from "./workings.js";

/** Reports a fault of the field at a path. */
export type ReportAt = (path: readonly PropertyKey[], message: string) => void;

/**
 * What the fields of a document must have to do with each other. Looks only at what can be read: the
 * rest has its faults already.
 */
export function crossFaults(document: unknown): Fault[] {
  const faults: Fault[] = [];
  const report: ReportAt = (path, message) => faults.push({ pointer: pointerOf(path), message });
  operationRules(document, report);
  accumulationRules(document, report);
  coolantRules(document, report);
  rangeRules(document, report);
  rateFaults(document, report);
  failureRules(document, report);
  workingFieldRules(document, report);
  workingRules(document, report);
  return faults;
}

/** Feed and operation belong together. */
function operationRules(document: unknown, report: ReportAt): void {
  const reaction = memberOf(document, "reaction");
  const operation = memberOf(reaction, "operation");
  const feed = memberOf(reaction, "feed");
  if (operation === "semibatch" && feed === undefined) {
    report(
      ["reaction", "feed"],
      "is missing; a semibatch reaction needs its feed, or the operation is batch",
    );
  }
  if (operation === "batch" && feed !== undefined) {
    report(
      ["reaction", "feed"],
      "came with a batch reaction, which has no feed; leave it out, or the operation is semibatch",
    );
  }
  if (memberOf(feed, "reactant") === "B" && valueAt(reaction, "reactants", "B") === undefined) {
    report(
      ["reaction", "feed", "reactant"],
      'came as "B", but there is no reactant B; expected "A", or add B',
    );
  }
}

/** Something must tell how fast the reaction is. */
function accumulationRules(document: unknown, report: ReportAt): void {
  const reaction = memberOf(document, "reaction");
  const measured = memberOf(reaction, "measuredAccumulation");
  if (isGroup(reaction) && memberOf(reaction, "rateConstant") === undefined && measured === undefined) {
    report(["reaction", "rateConstant"], "is missing; expected a rate constant, or a measured accumulation");
  }
  if (measured === undefined) return;
  if (memberOf(reaction, "operation") === "batch") {
    report(
      ["reaction", "measuredAccumulation"],
      "came with a batch reaction; an accumulation is measured while one reactant is fed",
    );
  }
  const rows = memberOf(measured, "rows");
  if (!Array.isArray(rows)) return;
  let before: number | null = null;
  for (const [i, row] of rows.entries()) {
    const time = figureTyped(memberOf(row, "time"), "time");
    if (time === null) continue;
    if (before !== null && time <= before) {
      report(
        ["reaction", "measuredAccumulation", "rows", i, "time"],
        "is not later than the row before; expected times in order",
      );
    }
    before = time;
  }
}

/** A flowing coolant is known whole, or the jacket is at one temperature. */
function coolantRules(document: unknown, report: ReportAt): void {
  const coolant = valueAt(document, "vessel", "coolant");
  const keys = ["flow", "heatCapacity", "holdup"];
  const given = keys.filter((key) => memberOf(coolant, key) !== undefined);
  if (given.length === 0) return;
  for (const key of keys.filter((each) => !given.includes(each))) {
    report(
      ["vessel", "coolant", key],
      `is missing beside ${given.join(" and ")}; give flow, heatCapacity and holdup together, or none of them for a jacket at one temperature`,
    );
  }
}

/** A wider swing is no control, and would only lengthen the study, K. */
const widestBand = 100;

/** Ranges run from low to high. */
function rangeRules(document: unknown, report: ReportAt): void {
  const limits = memberOf(document, "limits");
  const band = figureTyped(memberOf(limits, "controlBand"), "temperatureDifference");
  if (band !== null && band > widestBand) {
    report(
      ["limits", "controlBand"],
      `is wider than ${widestBand} K; expected how far the temperature swings to each side of its set point, such as "2 K"`,
    );
  }
  const lowest = figureTyped(memberOf(limits, "lowestTemperature"), "temperature");
  const highest = figureTyped(memberOf(limits, "highestTemperature"), "temperature");
  if (lowest !== null && highest !== null && lowest >= highest) {
    report(
      ["limits", "lowestTemperature"],
      "is not below highestTemperature; expected a range from low to high",
    );
  }
  for (const part of ["reaction", "decomposition"]) {
    const path = [part, "rateConstant", "fittedRange"];
    const low = figureTyped(valueAt(document, ...path, 0), "temperature");
    const high = figureTyped(valueAt(document, ...path, 1), "temperature");
    if (low !== null && high !== null && low >= high) {
      report(path, "is upside down; expected the lowest temperature of the fit, then the highest");
    }
  }
}
