import type { FailureFindings } from "../screening/findings.js";
import { durationText, temperatureText } from "../words/numbers.js";
import { medianSentence } from "./drawnWords.js";

/**
 * A failure in words for those who run the plant: what to put right and by when, what is left after the
 * response, at which temperature the alarm must sound. Times are rounded down, the alarm downwards too.
 *
 * @param mtt_K maximum technical temperature
 */
export function failureSentence(failure: FailureFindings, mtt_K: number): string {
  return [
    fate(failure, mtt_K),
    feedAlone(failure),
    response(failure),
    mixing(failure),
    medianSentence(failure),
  ]
    .filter((part) => part !== "")
    .join(" ");
}

function fate({ verdict, timeToAct_s, timeToMtt_s, peak_K }: FailureFindings, mtt_K: number): string {
  const limit = `the technical limit of ${temperatureText(mtt_K, "down")}`;
  const passed =
    timeToMtt_s === null ? "" : `${limit} is passed ${durationText(timeToMtt_s)} after the failure`;
  if (verdict === "holds") {
    return `In the simulation nobody has to act: the contents reach ${temperatureText(peak_K, "up")} at most and stay below ${limit}.`;
  }
  if (verdict === "lost" || timeToAct_s === null) {
    const how = passed === "" ? "" : ` Untouched, ${passed}.`;
    return `Putting right what failed does not help, however soon.${how} Something else must stop this one, and it must be ready before the step is started.`;
  }
  const otherwise = passed === "" ? "the contents decompose or go on heating up" : passed;
  return `Put right what failed within ${durationText(timeToAct_s)}; untouched, ${otherwise}.`;
}

function feedAlone({ verdict, stopFeedOnly }: FailureFindings): string {
  if (verdict === "holds" || stopFeedOnly === null || stopFeedOnly === undefined) return "";
  const { suffices, timeToAct_s } = stopFeedOnly;
  if (!suffices) return "Stopping the feed alone is not enough.";
  return timeToAct_s === null
    ? "Stopping the feed alone is enough."
    : `Stopping the feed alone is enough within ${durationText(timeToAct_s)}.`;
}

function response({ verdict, margin_s, alarm_K }: FailureFindings): string {
  if (verdict !== "act") return "";
  if (margin_s === null)
    return "Noticing, deciding and acting must all fit into that time; no response was given.";
  if (margin_s < 0)
    return `TOO LATE: the response that was given takes ${durationText(-margin_s, "up")} too long.`;
  const alarm =
    alarm_K === null
      ? "no alarm temperature leaves that much"
      : `the alarm must sound at ${temperatureText(alarm_K, "down")} or below`;
  return `After the response that was given ${durationText(margin_s)} is left; ${alarm}.`;
}

function mixing({ mixingAssumed }: FailureFindings): string {
  return mixingAssumed === "unmixed" ? "Reckoned as if nothing mixed, which is the worse case here." : "";
}
