import type { Findings } from "../screening/findings.js";
import { differenceText, durationText, numberText, percentText, temperatureText } from "../words/numbers.js";

/** One figure of the summary, as a reader sees it. */
export interface KeyFigure {
  /** the trade's name or symbol, such as "MTSR" */
  readonly term: string;
  readonly meaning: string;
  /** null: does not apply or was not assessed */
  readonly value: string | null;
  readonly note: string | null;
}

export interface KeyFigureGroup {
  readonly title: string;
  readonly figures: readonly KeyFigure[];
}

/** The summary of a case. Every figure is rounded to the careful side. */
export function keyFigures(findings: Findings): readonly KeyFigureGroup[] {
  return [
    { title: "Temperatures", figures: temperatures(findings) },
    { title: "Time after a cooling failure", figures: times(findings) },
    { title: "Heat", figures: heat(findings) },
    { title: "Rate and cooling", figures: rateAndCooling(findings) },
  ];
}

function temperatures({ temperatures }: Findings): readonly KeyFigure[] {
  return [
    figure("planned process temperature", "Tp", temperatureText(temperatures.process_K)),
    figure(
      "reached when cooling fails",
      "MTSR",
      shown(temperatures.mtsr_K, (value) => temperatureText(value, "up")),
    ),
    figure(
      "technical limit",
      "MTT",
      shown(temperatures.mtt_K, (value) => temperatureText(value, "down")),
    ),
    figure(
      "decomposition in 24 h",
      "T_D24",
      shown(temperatures.td24_K, (value) => temperatureText(value, "down")),
    ),
  ];
}

function times({ timeToMaximumRate: times }: Findings): readonly KeyFigure[] {
  return [
    figure("from MTSR", "TMRad", shown(times?.atMtsr_s, durationText)),
    figure("from Tp", "TMRad", shown(times?.atProcess_s, durationText)),
    figure("of a runaway, from TMRad at MTSR", "Likelihood", times?.likelihood ?? null),
  ];
}

function heat({ heat, accumulation }: Findings): readonly KeyFigure[] {
  return [
    figure(
      "of the reaction",
      "Adiabatic rise",
      differenceText(heat.adiabaticRise_K, "up"),
      `severity ${heat.severity}`,
    ),
    figure(
      "of the decomposition",
      "Adiabatic rise",
      shown(heat.decompositionRise_K, (value) => differenceText(value, "up")),
      heat.decompositionSeverity === null ? null : `severity ${heat.decompositionSeverity}`,
    ),
    figure(
      "not yet reacted, at most",
      "Accumulation",
      shown(accumulation?.maximumFraction, (value) => percentText(value, "up")),
      shown(accumulation?.at_s, (value) => `at ${durationText(value, "nearest")}`),
    ),
  ];
}

function rateAndCooling({ rate, cooling }: Findings): readonly KeyFigure[] {
  return [
    figure(
      "rate constant at Tp",
      "k",
      shown(rate?.atProcess.k, (value) => `${numberText(value)} ${rate?.atProcess.unit ?? ""}`),
      interval(rate?.atProcess.low95, rate?.atProcess.high95),
    ),
    figure(
      "of its capacity at Tp",
      "Cooling use",
      shown(cooling?.use, (value) => percentText(value, "up")),
    ),
  ];
}

function interval(low: number | null | undefined, high: number | null | undefined): string | null {
  return low == null || high == null ? null : `95 %: ${numberText(low)} to ${numberText(high)}`;
}

function figure(meaning: string, term: string, value: string | null, note: string | null = null): KeyFigure {
  return { term, meaning, value, note };
}

function shown(value: number | null | undefined, write: (value: number) => string): string | null {
  return value == null ? null : write(value);
}
