import { drawnWords } from "../charts/drawnWords.js";
import type { FailureFindings, Findings } from "../screening/findings.js";
import { durationText, temperatureText } from "../words/numbers.js";
import { type Cursor, paragraph, styles, subheading } from "./page.js";
import { actSentence, failuresByUrgency, verdictText } from "./sentences.js";
import { table } from "./table.js";

/** Every failure with its verdict, the most pressing first. */
export function writeFailures(cursor: Cursor, findings: Findings): void {
  subheading(cursor, "Cooling failures");
  paragraph(cursor, actSentence(findings), styles.body);
  if (findings.failures === null || findings.failures.length === 0) return;
  table(
    cursor,
    [
      { heading: "Failure, the most pressing first", share: 30 },
      { heading: "Verdict", share: 18 },
      { heading: "In the draws", share: 22 },
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
    drawnWords(failure),
    failure.margin_s === null
      ? "–"
      : `${failure.margin_s < 0 ? "−" : ""}${durationText(Math.abs(failure.margin_s), failure.margin_s < 0 ? "up" : "down")}`,
    durationText(failure.startedAt_s, "nearest"),
    failure.beyondModel ? "beyond model" : temperatureText(failure.peak_K, "up"),
    failure.timeToMtt_s === null ? "not reached" : durationText(failure.timeToMtt_s),
    failure.timeToTd24_s === null ? "not reached" : durationText(failure.timeToTd24_s),
  ];
}
