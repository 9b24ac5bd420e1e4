import { memberOf, valueAt } from "./outline.js";
import { readRate, readRateUnit } from "./rates.js";
import type { ReportAt } from "./rules.js";
import { figureTyped, overallOrder, rateTyped, visitLeaves } from "./typed.js";
import type { TypedRate } from "./typedQuantities.js";

/** Rate constants against the order of their rate laws, and what belongs to their forms. */
export function rateFaults(document: unknown, report: ReportAt): void {
  const reactionOrder = overallOrder(document);
  visitLeaves(document, (leaf, value, path) => {
    // alpha has no dimension: whatever its order, a decomposition is counted per time.
    const order = path[0] === "decomposition" ? 1 : reactionOrder;
    if (order === null) return;
    if (leaf.kind === "rateUnit" && typeof value === "string") {
      const read = readRateUnit(value, order);
      if (typeof read === "string") report(path, read);
    }
    const typed = leaf.kind === "rate" ? rateTyped(value) : null;
    if (typed === null) return;
    const read = readRate(typed, order);
    const within = (part: string) => (typeof value === "string" ? path : [...path, part]);
    if (!read.ok) report(within(read.part), read.message);
    else if (!Number.isFinite(read.k.value) && path.at(-1) !== "preExponential") {
      report(within("value"), "is not finite in the SI: too large to calculate with");
    }
  });
  for (const part of ["reaction", "decomposition"]) {
    const path = [part, "rateConstant"];
    const rateConstant = valueAt(document, ...path);
    const form = memberOf(rateConstant, "form");
    if (form === "arrhenius") factorRules(rateConstant, path, report);
    const order = part === "decomposition" ? 1 : reactionOrder;
    if (form === "table") rowRules(memberOf(rateConstant, "rows"), [...path, "rows"], order, report);
  }
}

/** A is given once: as it is, or as its logarithm. */
function factorRules(rateConstant: unknown, path: readonly string[], report: ReportAt): void {
  const plain = memberOf(rateConstant, "preExponential") !== undefined;
  const logarithm = memberOf(rateConstant, "lnPreExponential") !== undefined;
  if (!plain && !logarithm) {
    report(
      [...path, "preExponential"],
      'is missing; expected a factor such as "4.0e11 1/s", or lnPreExponential',
    );
  }
  if (plain && logarithm) {
    report([...path, "lnPreExponential"], "came beside preExponential; give one of the two");
  }
}

/** Rows enough for a line, none of them twice. */
function rowRules(rows: unknown, path: readonly string[], order: number | null, report: ReportAt): void {
  if (!Array.isArray(rows)) return;
  const temperatures = new Set<string>();
  const seen = new Map<string, number>();
  let readable = true;
  for (const [i, row] of rows.entries()) {
    const typed = rateTyped(memberOf(row, "rateConstant"));
    if (typed !== null && typed.standardError !== null && memberOf(row, "relativeError") !== undefined) {
      report(
        [...path, i, "relativeError"],
        "came beside the standard error of the rate constant; give one of the two",
      );
    }
    const temperature = figureTyped(memberOf(row, "temperature"), "temperature");
    if (temperature === null || typed === null) {
      readable = false;
      continue;
    }
    const key = temperature.toPrecision(12);
    if (memberOf(row, "leftOut") === undefined) temperatures.add(key);
    const pair = `${key} ${sizeOf(typed, order)}`;
    const first = seen.get(pair);
    if (first === undefined) seen.set(pair, i);
    else report([...path, i], `is the same as row ${first + 1}; a measurement counts once`);
  }
  if (readable && temperatures.size < 3) {
    report(
      path,
      `holds ${temperatures.size} different temperature${temperatures.size === 1 ? "" : "s"} that are not left out; a fit needs at least three`,
    );
  }
}

/** A rate constant so that the same figure is found however it is typed. */
function sizeOf(typed: TypedRate, order: number | null): string {
  const read = order === null ? null : readRate(typed, order);
  return read?.ok === true ? read.lnK.value.toPrecision(12) : typed.value.trim();
}
