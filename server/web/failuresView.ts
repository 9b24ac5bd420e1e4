import { drawnWords } from "../charts/drawnWords.js";
import { failureSentence } from "../charts/failureSentence.js";
import { byTimeToAct, verdictWords } from "../charts/failuresWords.js";
import type { FailureFindings, Findings } from "../screening/findings.js";
import { durationText, temperatureText } from "../words/numbers.js";

/** One failure as a line of the page, in the words of those who run the plant. */
export interface FailureLine {
  /** as the figure marks it */
  readonly number: number;
  readonly name: string;
  readonly verdict: FailureFindings["verdict"];
  /** the verdict with its time */
  readonly words: string;
  readonly sentence: string;
  /** time to act and response over the draws */
  readonly drawn: string;
  /** left after the response; null where none was given, or nothing has to be done */
  readonly margin: string | null;
  readonly alarm: string | null;
}

/** Every failure that was simulated, the one that leaves the least time first. */
export function failureLines({ failures, temperatures }: Findings): readonly FailureLine[] {
  return byTimeToAct(failures ?? []).map((failure, at) => ({
    number: at + 1,
    name: failure.name,
    verdict: failure.verdict,
    words: verdictWords(failure),
    sentence: failureSentence(failure, temperatures.mtt_K),
    drawn: drawnWords(failure),
    margin: failure.margin_s === null ? null : marginText(failure.margin_s),
    alarm: failure.alarm_K === null ? null : temperatureText(failure.alarm_K, "down"),
  }));
}

/** What is left after the response, or by how much it comes too late. */
function marginText(margin: number): string {
  return margin < 0 ? `${durationText(-margin, "up")} too late` : durationText(margin);
}
