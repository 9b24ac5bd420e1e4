import type { FailureFindings } from "../screening/findings.js";
import {
  durationText,
  numberText,
  percentText,
  temperatureNumber,
  temperatureText,
} from "../words/numbers.js";
import { drawnResponseWords, drawnTimeWords } from "./drawnWords.js";

const verdictOrder = { lost: 0, act: 1, holds: 2 } as const;

/** The failures that leave the least time first: lost, then by time to act, those that hold last. */
export function byTimeToAct(failures: readonly FailureFindings[]): FailureFindings[] {
  const soonest = (time: number | null) => time ?? Number.POSITIVE_INFINITY;
  return [...failures].sort(
    (a, b) =>
      verdictOrder[a.verdict] - verdictOrder[b.verdict] ||
      compared(soonest(a.timeToAct_s), soonest(b.timeToAct_s)) ||
      compared(soonest(a.timeToMtt_s), soonest(b.timeToMtt_s)) ||
      b.peak_K - a.peak_K,
  );
}

function compared(a: number, b: number): number {
  return a === b ? 0 : a < b ? -1 : 1;
}

/** What becomes of a failure, in a few words with the time rounded down. */
export function verdictWords({ verdict, timeToAct_s }: FailureFindings): string {
  if (verdict === "holds") return "holds by itself";
  if (verdict === "lost" || timeToAct_s === null) return "lost: no delay is short enough";
  return `act within ${durationText(timeToAct_s)}`;
}

/** How the failures end, and which leaves the least time. */
export function failuresSentence(sorted: readonly FailureFindings[]): string {
  const [worst] = sorted;
  if (worst === undefined) return "";
  const count = (verdict: FailureFindings["verdict"]) =>
    sorted.filter((each) => each.verdict === verdict).length;
  const head = `Failures simulated: ${sorted.length}; lost ${count("lost")}, to act on ${count("act")}, holding by themselves ${count("holds")}.`;
  switch (worst.verdict) {
    case "lost":
      return `${head} “${worst.name}” is lost: no delay is short enough.`;
    case "act":
      return `${head} The least time is left by “${worst.name}”: ${verdictWords(worst)}.`;
    case "holds":
      return `${head} The highest peak is ${temperatureText(Math.max(...sorted.map((each) => each.peak_K)), "up")}.`;
  }
}

/** A failure as a row of the table under the figure. */
export function failureRow(failure: FailureFindings, at: number): string[] {
  const {
    name,
    startedAt_s,
    timeToMtt_s,
    timeToTd24_s,
    peak_K,
    peakAt_s,
    beyondModel,
    decomposed,
    margin_s,
    alarm_K,
  } = failure;
  const after = (time: number | null) => (time === null ? "not reached" : durationText(time));
  return [
    String(at + 1),
    failure.mixingAssumed === "unmixed" ? `${name} (worse without mixing)` : name,
    verdictWords(failure),
    durationText(startedAt_s, "nearest"),
    margin_s === null ? "not given" : durationText(margin_s),
    alarm_K === null ? "none" : temperatureNumber(alarm_K, "down"),
    after(timeToMtt_s),
    after(timeToTd24_s),
    beyondModel
      ? "above MTT: beyond the model"
      : `${temperatureNumber(peak_K, "up")} after ${durationText(peakAt_s)}`,
    beyondModel ? "beyond the model" : `${numberText(60 * failure.maximumRate_K_s)} K/min`,
    percentText(failure.conversion),
    decomposed === null ? "not known" : percentText(decomposed, "up"),
    drawnTimeWords(failure),
    drawnResponseWords(failure) ?? "not given",
  ];
}

/** Headings of the table under the figure. */
export const failureColumns = [
  "No.",
  "Failure",
  "Time to act",
  "Begins at",
  "Left after the response",
  "Latest alarm, °C",
  "MTT after",
  "T_D24 after",
  "Peak, °C",
  "Fastest rise",
  "Conversion",
  "Decomposed",
  "Time to act in the draws",
  "Response in the draws",
] as const;
