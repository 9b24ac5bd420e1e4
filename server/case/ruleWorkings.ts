import { memberOf, valueAt } from "./outline.js";
import type { ReportAt } from "./rules.js";
import { figureTyped } from "./typed.js";

/** What the workings behind an area, a coefficient and a boiling point must fulfil. */
export function workingFieldRules(document: unknown, report: ReportAt): void {
  areaRules(valueAt(document, "vessel", "heatTransferAreaFrom"), report);
  const wall = valueAt(document, "vessel", "heatTransferCoefficientFrom");
  const lining = ["liningThickness", "liningConductivity"];
  const given = lining.filter((key) => memberOf(wall, key) !== undefined);
  for (const key of given.length === 1 ? lining.filter((each) => !given.includes(each)) : []) {
    report(
      ["vessel", "heatTransferCoefficientFrom", key],
      `is missing beside ${given[0]}; a lining has a thickness and a conductivity`,
    );
  }
  const boiling = valueAt(document, "limits", "maximumTechnicalTemperatureFrom");
  const lowest = figureTyped(memberOf(boiling, "lowest"), "temperature");
  const highest = figureTyped(memberOf(boiling, "highest"), "temperature");
  if (lowest !== null && highest !== null && lowest >= highest) {
    report(
      ["limits", "maximumTechnicalTemperatureFrom", "lowest"],
      "is not below highest; expected a range from low to high",
    );
  }
}

function areaRules(area: unknown, report: ReportAt): void {
  const path = ["vessel", "heatTransferAreaFrom"];
  const length = (key: string) => figureTyped(memberOf(area, key), "length");
  const lower = length("jacketLower");
  const upper = length("jacketUpper");
  if (lower !== null && upper !== null && lower >= upper) {
    report([...path, "jacketLower"], "is not below jacketUpper; expected heights from low to high");
  }
}
