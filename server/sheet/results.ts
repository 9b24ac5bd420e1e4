import type { FailureFindings, Findings, Percentiles, RateFindings } from "../screening/findings.js";
import {
  differenceText,
  durationText,
  numberText,
  percentText,
  powerText,
  temperatureNumber,
  temperatureText,
} from "../words/numbers.js";
import { type Cursor, heading, paragraph, styles, subheading } from "./page.js";
import {
  actSentence,
  classSentence,
  failuresByUrgency,
  severityText,
  verdictText,
  windowSentence,
} from "./sentences.js";
import { table } from "./table.js";

type Rows = readonly (readonly string[])[];

const unknown = "not assessed";

function shown(value: number | null | undefined, text: (value: number) => string): string {
  return value === null || value === undefined ? unknown : text(value);
}

/** The findings in tables; every figure rounded towards caution, the full digits are in the attached record. */
export function writeResults(cursor: Cursor, findings: Findings): void {
  heading(cursor, "Findings");
  paragraph(
    cursor,
    "Shown figures are rounded towards caution: times, T_D24 and the window's upper end down, MTSR and its lower end up. The attached record keeps full precision.",
    styles.small,
  );
  temperatures(cursor, findings);
  windowTable(cursor, findings);
  cooling(cursor, findings);
  failures(cursor, findings);
  if (findings.rate !== null) rate(cursor, "Rate constant of the reaction", findings.rate);
  if (findings.decompositionRate !== null) {
    rate(cursor, "Rate constant of the decomposition", findings.decompositionRate);
  }
  uncertainty(cursor, findings);
}

function pairs(cursor: Cursor, rows: Rows): void {
  table(
    cursor,
    [
      { heading: "Finding", share: 44 },
      { heading: "Value", share: 22, align: "right" },
      { heading: "Remark", share: 50 },
    ],
    rows,
  );
}

function temperatures(cursor: Cursor, findings: Findings): void {
  const { temperatures: found, heat, accumulation, timeToMaximumRate: tmrad } = findings;
  subheading(cursor, "Temperatures and times");
  pairs(cursor, [
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
      accumulation === null ? "" : `${durationText(accumulation.at_s)} after the start`,
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
      criterion.assessed ? spansText(criterion.allowed) : unknown,
      criterion.cautious === null ? unknown : spansText(criterion.cautious),
      criterion.metAtProcess === null ? unknown : criterion.metAtProcess ? "yes" : "NO",
      shown(criterion.probability, (part) => percentText(part, "down")),
    ]),
  );
}

function cooling(cursor: Cursor, findings: Findings): void {
  const found = findings.cooling;
  if (found === null) return;
  subheading(cursor, "Cooling at the process temperature");
  pairs(cursor, [
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

function failures(cursor: Cursor, findings: Findings): void {
  subheading(cursor, "Cooling failures");
  paragraph(cursor, actSentence(findings), styles.body);
  if (findings.failures === null || findings.failures.length === 0) return;
  table(
    cursor,
    [
      { heading: "Failure, the most pressing first", share: 34 },
      { heading: "Verdict", share: 20 },
      { heading: "Margin", share: 12, align: "right" },
      { heading: "Begins", share: 12, align: "right" },
      { heading: "Peak", share: 13, align: "right" },
      { heading: "To MTT", share: 12, align: "right" },
      { heading: "To T_D24", share: 13, align: "right" },
    ],
    failuresByUrgency(findings.failures).map(failureRow),
  );
}

function failureRow(failure: FailureFindings): string[] {
  const mixing = failure.mixingAssumed === null ? "" : ` (worse as if ${failure.mixingAssumed})`;
  return [
    `${failure.name}${mixing}`,
    verdictText(failure),
    failure.margin_s === null
      ? "–"
      : `${failure.margin_s < 0 ? "−" : ""}${durationText(Math.abs(failure.margin_s), failure.margin_s < 0 ? "up" : "down")}`,
    durationText(failure.startedAt_s, "nearest"),
    failure.beyondModel ? "beyond model" : temperatureText(failure.peak_K, "up"),
    failure.timeToMtt_s === null ? "not reached" : durationText(failure.timeToMtt_s),
    failure.timeToTd24_s === null ? "not reached" : durationText(failure.timeToTd24_s),
  ];
}

function rate(cursor: Cursor, title: string, found: RateFindings): void {
  subheading(cursor, title);
  const { atProcess, eyring, arrhenius } = found;
  const withError = (value: string, error: number | null, scale: number, unit: string) =>
    `${value} ${error === null ? "(no error given)" : `± ${numberText(error / scale)}`} ${unit}`;
  pairs(cursor, [
    [
      `k at ${temperatureText(atProcess.temperature_K)}`,
      atProcess.k === null ? "beyond the range of numbers" : numberText(atProcess.k),
      `${atProcess.unit}; 95 %: ${shown(atProcess.low95, numberText)} to ${shown(atProcess.high95, numberText)}`,
    ],
    ["Outside the fitted range", extrapolationText(atProcess.extrapolation_K), fittedRangeText(found)],
    [
      "Activation enthalpy",
      withError(
        numberText(eyring.activationEnthalpy_J_mol / 1000),
        eyring.activationEnthalpyError_J_mol,
        1000,
        "kJ/mol",
      ),
      "",
    ],
    [
      "Activation entropy",
      withError(
        numberText(eyring.activationEntropy_J_molK),
        eyring.activationEntropyError_J_molK,
        1,
        "J/(mol K)",
      ),
      `for a standard concentration of ${numberText(eyring.standardConcentration_mol_m3 / 1000)} mol/L`,
    ],
    [
      "Activation energy",
      withError(
        numberText(arrhenius.activationEnergy_J_mol / 1000),
        arrhenius.activationEnergyError_J_mol,
        1000,
        "kJ/mol",
      ),
      "",
    ],
    [
      "ln A",
      withError(numberText(arrhenius.lnPreExponential, 4), arrhenius.lnPreExponentialError, 1, ""),
      `A in ${atProcess.unit}`,
    ],
  ]);
}

function extrapolationText(kelvin: number | null): string {
  if (kelvin === null) return "range not given";
  return kelvin === 0
    ? "no"
    : `${differenceText(Math.abs(kelvin), "up")} ${kelvin > 0 ? "above" : "below"} it`;
}

function fittedRangeText(found: RateFindings): string {
  const range = found.fittedRange_K;
  return range === null ? "" : `fitted from ${temperatureText(range[0])} to ${temperatureText(range[1])}`;
}

function uncertainty(cursor: Cursor, findings: Findings): void {
  const found = findings.uncertainty;
  if (found === null) return;
  subheading(cursor, "Uncertainty");
  paragraph(cursor, `${found.draws} draws from the stated standard errors, seed ${found.seed}.`, styles.body);
  const row = (name: string, values: Percentiles | null, text: (value: number) => string) => [
    name,
    shown(values?.p05, text),
    shown(values?.p50, text),
    shown(values?.p95, text),
  ];
  table(
    cursor,
    [
      { heading: "Finding", share: 34 },
      { heading: "5th percentile", share: 20, align: "right" },
      { heading: "50th", share: 20, align: "right" },
      { heading: "95th", share: 20, align: "right" },
    ],
    [
      row("T_D24", found.td24_K, (kelvin) => temperatureText(kelvin, "down")),
      row("MTSR", found.mtsr_K, (kelvin) => temperatureText(kelvin, "up")),
      row("Window, upper end", found.upper_K, (kelvin) => temperatureText(kelvin, "down")),
      row("Least time to act", found.timeToAct_s, durationText),
    ],
  );
}
