import type { FailureFindings } from "../screening/findings.js";
import { failingText } from "../uncertainty/probabilitySentence.js";
import { durationText } from "../words/numbers.js";

/** What the draws say about a failure's time to act, in a few words with the time rounded down. */
export function drawnTimeWords({ drawn }: FailureFindings): string {
  if (drawn === undefined || drawn === null) return "not drawn";
  const { draws, p05_s: low, p95_s: high, probability } = drawn;
  const lost = `lost in ${failingText(1 - probability.lost, draws)} draws`;
  if (low === 0) return lost;
  if (low !== null && low === high) return "the same in every draw";
  if (probability.holds === 1) return `holds in all ${draws} draws`;
  const time =
    low === null
      ? `must be acted on in ${failingText(probability.holds, draws)} draws`
      : `5 % of draws: less than ${durationText(low)}`;
  return probability.lost === 0 ? time : `${time}; ${lost}`;
}

/** How often the stated response comes too late, in a few words; null where none is stated or nothing was drawn. */
export function drawnResponseWords({ drawn }: FailureFindings): string | null {
  const inTime = drawn?.probabilityMarginPositive ?? null;
  if (drawn === undefined || drawn === null || inTime === null) return null;
  return `response too late in ${failingText(inTime, drawn.draws)} draws`;
}

/** Both in one line. */
export function drawnWords(failure: FailureFindings): string {
  const response = drawnResponseWords(failure);
  return response === null ? drawnTimeWords(failure) : `${drawnTimeWords(failure)}; ${response}`;
}

/** A sentence where the middle of the draws tells another story than the estimates; empty where it does not. */
export function medianSentence({ drawn }: FailureFindings): string {
  if (drawn === undefined || drawn === null || drawn.estimateAgrees) return "";
  const { p50_s: middle } = drawn;
  const half =
    middle === null
      ? "it holds by itself"
      : middle === 0
        ? "it is lost"
        : `the time to act is ${durationText(middle)} or less`;
  return `The estimate does not stand for the draws: in half of them ${half}.`;
}
