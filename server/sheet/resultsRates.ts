import type { Findings, Percentiles, RateFindings } from "../screening/findings.js";
import { differenceText, durationText, numberText, percentText, temperatureText } from "../words/numbers.js";
import { findingTable, shown } from "./findingTable.js";
import { type Cursor, paragraph, styles, subheading } from "./page.js";
import { table } from "./table.js";

/** A rate constant at the process temperature with its parameters in both forms. */
export function writeRate(cursor: Cursor, title: string, found: RateFindings): void {
  subheading(cursor, title);
  const { atProcess, eyring, arrhenius } = found;
  const withError = (value: string, error: number | null, scale: number, unit: string) =>
    `${value} ${error === null ? "(no error given)" : `± ${numberText(error / scale)}`} ${unit}`;
  findingTable(cursor, [
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

/** What the draws say. */
export function writeUncertainty(cursor: Cursor, findings: Findings): void {
  const found = findings.uncertainty;
  if (found === null) return;
  subheading(cursor, "Uncertainty");
  paragraph(cursor, `${found.draws} draws from the stated standard errors, seed ${found.seed}.`, styles.body);
  const row = (name: string, values: Percentiles | null, text: (value: number) => string) => [
    name,
    ...[values?.p05, values?.p50, values?.p95].map((value) =>
      // In draws without a window there is no end of one, which is not the same as not having looked.
      values !== null && value === null ? "none" : shown(value, text),
    ),
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
      row("TMRad from the process temperature", found.timeToMaximumRateAtProcess_s, durationText),
      row("TMRad from MTSR", found.timeToMaximumRateAtMtsr_s, durationText),
      row("Cooling duty over capacity", found.coolingUse, (part) => percentText(part, "up")),
      row("Window, upper end", found.upper_K, (kelvin) => temperatureText(kelvin, "down")),
      row("Least time to act", found.timeToAct_s, durationText),
    ],
  );
}
