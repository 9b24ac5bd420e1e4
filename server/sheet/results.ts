import type { Findings } from "../screening/findings.js";
import {
  differenceText,
  durationText,
  numberText,
  percentText,
  powerText,
  temperatureNumber,
  temperatureText,
} from "../words/numbers.js";
import { findingTable, shown } from "./findingTable.js";
import { type Cursor, heading, paragraph, styles, subheading } from "./page.js";
import { writeFailures } from "./resultsFailures.js";
import { writeRate, writeUncertainty } from "./resultsRates.js";
import { classSentence, severityText, windowSentence } from "./sentences.js";
import { table } from "./table.js";

/** The findings in tables; every figure rounded towards caution, the full digits are in the attached record. */
export function writeResults(cursor: Cursor, findings: Findings): void {
  heading(cursor, "Findings", 190);
  paragraph(
    cursor,
    "Shown figures are rounded towards caution: times, T_D24 and the window's upper end down, MTSR and its lower end up. The attached record keeps full precision.",
    styles.small,
  );
  temperatures(cursor, findings);
  windowTable(cursor, findings);
  cooling(cursor, findings);
  writeFailures(cursor, findings);
  if (findings.rate !== null) writeRate(cursor, "Rate constant of the reaction", findings.rate);
  if (findings.decompositionRate !== null) {
    writeRate(cursor, "Rate constant of the decomposition", findings.decompositionRate);
  }
  writeUncertainty(cursor, findings);
}

function temperatures(cursor: Cursor, findings: Findings): void {
  const { temperatures: found, heat, accumulation, timeToMaximumRate: tmrad } = findings;
  subheading(cursor, "Temperatures and times");
  findingTable(cursor, [
    ["Process temperature", temperatureText(found.process_K), "as planned"],
    ["MTSR", shown(found.mtsr_K, (kelvin) => temperatureText(kelvin, "up")), mtsrRemark(findings)],
    ["MTT", temperatureText(found.mtt_K, "down"), "as typed"],
    ["T_D24", shown(found.td24_K, (kelvin) => temperatureText(kelvin, "down")), "fresh material"],
    [
      "All at once",
      shown(found.allAtOnce_K, (kelvin) => temperatureText(kelvin, "up")),
      "bound on the temperature if the whole recipe met at once",
    ],
    [
      "Adiabatic rise of the reaction",
      differenceText(heat.adiabaticRise_K, "up"),
      severityText(heat.severity),
    ],
    [
      "Adiabatic rise of the decomposition",
      shown(heat.decompositionRise_K, (kelvin) => differenceText(kelvin, "up")),
      severityText(heat.decompositionSeverity),
    ],
    [
      "Largest accumulation",
      shown(accumulation?.maximumFraction, (part) => percentText(part, "up")),
      accumulation === null ? "" : `${durationText(accumulation.at_s, "nearest")} after the start`,
    ],
    [
      "TMRad from the process temperature",
      shown(tmrad?.atProcess_s, durationText),
      `closed form, zero order: ${shown(tmrad?.zeroOrderAtProcess_s, durationText)}${tmrad?.zeroOrderCautious === false ? " (not on the careful side here)" : ""}`,
    ],
    [
      "TMRad from MTSR",
      shown(tmrad?.atMtsr_s, durationText),
      tmrad?.likelihood ? `likelihood ${tmrad.likelihood}` : "",
    ],
  ]);
  paragraph(cursor, classSentence(findings), styles.body);
}

function mtsrRemark(findings: Findings): string {
  return findings.accumulation?.usedFor === "measured"
    ? "from the measured accumulation"
    : "from the kinetics; assumes that the feed stops with the cooling";
}

function spansText(spans: readonly (readonly [number, number])[]): string {
  if (spans.length === 0) return "none";
  return spans
    .map(([low, high]) => `${temperatureNumber(low, "up")} to ${temperatureText(high, "down")}`)
    .join("; ");
}

function windowTable(cursor: Cursor, findings: Findings): void {
  const window = findings.window;
  subheading(cursor, "Temperature window");
  paragraph(cursor, windowSentence(findings), styles.body);
  if (window === null) return;
  table(
    cursor,
    [
      { heading: "Criterion", share: 34 },
      { heading: "Allowed", share: 26 },
      { heading: "Cautious side", share: 22 },
      { heading: "Met as planned", share: 14 },
      { heading: "Probability", share: 12, align: "right" },
    ],
    window.criteria.map((criterion) => [
      `${criterion.label}${criterion.binding ? "" : ", not binding"}`,
      criterion.assessed ? spansText(criterion.allowed) : "not assessed",
      criterion.cautious === null ? "not assessed" : spansText(criterion.cautious),
      criterion.metAtProcess === null ? "not assessed" : criterion.metAtProcess ? "yes" : "NO",
      shown(criterion.probability, (part) => percentText(part, "down")),
    ]),
  );
}

function cooling(cursor: Cursor, findings: Findings): void {
  const found = findings.cooling;
  if (found === null) return;
  subheading(cursor, "Cooling at the process temperature");
  findingTable(cursor, [
    ["Largest duty", powerText(found.duty_W, "up"), ""],
    ["Full capacity", powerText(found.capacity_W, "down"), ""],
    [
      "Duty over capacity",
      shown(found.use, (part) => percentText(part, "up")),
      found.use === null ? "the capacity is not positive" : "",
    ],
    [
      "Stability ratio",
      numberText(found.stabilityRatio),
      found.stabilityRatio < 1
        ? "below 1: steadies itself at constant coolant"
        : "1 or more: relies on its controller",
    ],
    [
      "Temperature of no return",
      found.noReturn_K === null ? "none found" : temperatureText(found.noReturn_K, "down"),
      "at full cooling",
    ],
    [
      "Critical coolant temperature",
      found.criticalCoolant_K === null ? "none found" : temperatureText(found.criticalCoolant_K, "down"),
      "",
    ],
  ]);
}
