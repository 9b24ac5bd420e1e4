import type {
  CautionLevel,
  FailureFindings,
  Findings,
  Severity,
  WindowFindings,
} from "../screening/findings.js";
import { criterionLabel } from "../screening/labels.js";
import { differenceText, durationText, percentText, temperatureText } from "../words/numbers.js";

export const levelNames: Readonly<Record<CautionLevel, string>> = {
  stop: "STOP",
  warn: "Warning",
  note: "Note",
};

/** What a level asks of the reader. */
export const levelMeanings: Readonly<Record<CautionLevel, string>> = {
  stop: "the result must not be used as it is",
  warn: "a reviewer must decide",
  note: "worth knowing",
};

export function severityText(severity: Severity | null): string {
  return severity === null ? "not assessed" : `${severity} severity`;
}

/** The window in a sentence: its ends rounded inwards, what sets them, and whether the plan lies inside. */
export function windowSentence(findings: Findings): string {
  const window = findings.window;
  if (window === null) return "The temperature window was not assessed.";
  const incomplete = window.incomplete
    ? " The window is incomplete: a criterion could not be assessed for want of data, and that never widens it."
    : "";
  if (window.lower_K === null || window.upper_K === null) {
    const why = window.conflict === null ? "" : ` ${window.conflict}`;
    return `No process temperature meets every assessed criterion.${why}${incomplete}`;
  }
  const span = `from ${end(window, "lower")} to ${end(window, "upper")}`;
  const band = window.controlBand_K > 0 ? ` ± ${differenceText(window.controlBand_K)}` : "";
  const plan = `${temperatureText(findings.temperatures.process_K)}${band}`;
  const inside = window.containsProcess ? "lies inside" : "does NOT lie inside";
  return `Temperature window: ${span}. The planned ${plan} ${inside} it.${cautiousSide(window)}${incomplete}`;
}

function end(window: WindowFindings, which: "lower" | "upper"): string {
  const value = which === "lower" ? window.lower_K : window.upper_K;
  const setBy = which === "lower" ? window.lowerSetBy : window.upperSetBy;
  const text = value === null ? "?" : temperatureText(value, which === "lower" ? "up" : "down");
  return setBy === null ? text : `${text} (${criterionLabel(setBy)})`;
}

function cautiousSide(window: WindowFindings): string {
  const cautious = window.cautious;
  if (cautious === null) return "";
  return cautious.lower_K === null || cautious.upper_K === null
    ? " On the cautious side (95 % of the draws) nothing is left."
    : ` On the cautious side (95 % of the draws): ${temperatureText(cautious.lower_K, "up")} to ${temperatureText(cautious.upper_K, "down")}.`;
}

const classMeanings = {
  "1": "after a loss of cooling the reaction on its own (MTSR) reaches neither MTT nor T_D24",
  "2": "MTSR stays below T_D24, but MTT lies at or above T_D24 and is no barrier before it",
  "3": "after a loss of cooling the reaction on its own (MTSR) can reach MTT, but not T_D24",
  "4": "after a loss of cooling the reaction on its own (MTSR) can reach T_D24; MTT, which comes before it, is the only barrier",
  "5": "after a loss of cooling the reaction on its own (MTSR) can reach T_D24, and MTT is no barrier before it",
  none: "the process temperature is itself at or above MTT or T_D24",
} as const;

/** The criticality class and what it means. */
export function classSentence(findings: Findings): string {
  const value = findings.criticality.class;
  if (value === null) return "Criticality class: not assessed (decomposition data are missing).";
  const chance = findings.criticality.probability?.[`${value}`];
  const probability =
    chance === undefined ? "" : ` Probability of this class: ${percentText(chance, "down")}.`;
  const name = value === "none" ? "No criticality class" : `Criticality class ${value}`;
  return `${name}: ${classMeanings[value]}.${probability}`;
}

/** Failures, the most pressing first: lost ones, then by time to act, those that hold last. */
export function failuresByUrgency(failures: readonly FailureFindings[]): FailureFindings[] {
  const urgency = (failure: FailureFindings) => failure.timeToAct_s ?? Number.POSITIVE_INFINITY;
  const soonest = (failure: FailureFindings) => failure.timeToMtt_s ?? Number.POSITIVE_INFINITY;
  return failures.toSorted((one, other) => {
    if (urgency(one) !== urgency(other)) return urgency(one) < urgency(other) ? -1 : 1;
    return soonest(one) === soonest(other)
      ? other.peak_K - one.peak_K
      : soonest(one) < soonest(other)
        ? -1
        : 1;
  });
}

/** One failure's verdict with its time to act, rounded down. */
export function verdictText(failure: FailureFindings): string {
  if (failure.verdict === "lost") return "LOST: no delay is short enough";
  if (failure.verdict === "holds") return "holds by itself";
  return failure.timeToAct_s === null ? "act" : `act within ${durationText(failure.timeToAct_s)}`;
}

/** The least time to act over all failures. */
export function actSentence(findings: Findings): string {
  if (findings.failures === null) return "Cooling failures were not simulated; the time to act is not known.";
  const [worst] = failuresByUrgency(findings.failures);
  if (worst === undefined) return "No cooling failure was given; the time to act is not known.";
  const low = findings.uncertainty?.timeToAct_s?.p05 ?? null;
  if (worst.verdict === "holds") {
    const drawn =
      low === null
        ? ""
        : ` At the estimates only: 5th percentile of the time to act over the draws: ${durationText(low)}.`;
    return `Every failure that was simulated holds by itself.${drawn}`;
  }
  if (worst.verdict === "lost") {
    return `“${worst.name}” is lost: restoring the cooling does not help, however soon.`;
  }
  const cautious = low === null ? "" : ` 5th percentile over the draws: ${durationText(low)}.`;
  return `Least time to act: ${durationText(worst.timeToAct_s ?? 0)} (“${worst.name}”).${cautious}`;
}

/** What stands or does not stand against using the result. */
export function stopSentence(findings: Findings): string {
  const count = findings.cautions.filter((caution) => caution.level === "stop").length;
  if (count === 0 && findings.failures === null) {
    return "No stop was raised by what was assessed; cooling failures were not simulated.";
  }
  if (count === 0) return "No stop was raised. That does not make the step safe.";
  return count === 1 ? "A stop stands." : `${count} stops stand.`;
}
