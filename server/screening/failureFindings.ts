import { type Assessment, assess } from "../failure/assessment.js";
import { traceOf } from "../failure/trace.js";
import { createVessel, type Vessel } from "../failure/vessel.js";
import { vulnerableMoments } from "../failure/vulnerable.js";
import type { Step } from "../thermal/step.js";
import { failureCautions, measuredBeyondKinetics, unfollowed, withoutKinetics } from "./cautions/failures.js";
import type { Caution, FailureFindings } from "./findings.js";
import type { FailureModel } from "./model.js";
import { ignored, type Progress } from "./progress.js";

/**
 * Simulates and judges the failures of a case.
 *
 * @param step at the estimates
 * @param failures of the case, in its order
 * @param onProgress told before each of them
 * @returns findings in the same order, null where the case has no kinetics to simulate; with their cautions
 */
export function failureFindings(
  step: Step,
  failures: readonly FailureModel[],
  onProgress: Progress = ignored,
): { readonly failures: FailureFindings[] | null; readonly cautions: Caution[] } {
  const { rate } = step.reaction;
  if (failures.length === 0) return { failures: [], cautions: [] };
  if (rate === null) return { failures: null, cautions: [withoutKinetics(failures)] };
  const vessels = new Map<number, Vessel | null>();
  const findings: FailureFindings[] = [];
  const cautions: Caution[] = [];
  const { measuredExcess } = step.reaction;
  if (measuredExcess > 0) cautions.push(measuredBeyondKinetics(measuredExcess));
  failures.forEach((failure, i) => {
    onProgress(i / failures.length);
    const pointer = `/failures/${i}`;
    const temperature = failure.startTemperature ?? step.reaction.temperature;
    const vessel = vessels.get(temperature) ?? createVessel(step, rate, temperature);
    vessels.set(temperature, vessel);
    const assessment = vessel === null ? null : assess(vessel, failure);
    if (vessel === null || assessment === null) {
      cautions.push(unfollowed(failure, pointer));
      return;
    }
    findings.push(findingsOf(failure, vessel, assessment));
    cautions.push(...failureCautions(failure, pointer, vessel, assessment));
  });
  return { failures: findings, cautions };
}

function findingsOf(failure: FailureModel, vessel: Vessel, assessment: Assessment): FailureFindings {
  const { run, runs, margin, stopFeedOnly } = assessment;
  const { places } = vessel.contents;
  const { state } = run.end;
  return {
    name: failure.name,
    startedAt_s: assessment.start.startedAt,
    peak_K: run.peak.value,
    peakAt_s: run.peak.at,
    timeToMtt_s: run.marks.mtt,
    timeToTd24_s: run.marks.td24,
    maximumRate_K_s: run.fastest.value,
    timeToMaximumRate_s: run.fastest.at,
    conversion: state[places.extent],
    decomposed: places.progress === null ? null : Math.min(state[places.progress], 1),
    beyondModel: run.marks.mtt !== null,
    mixingAssumed: runs.length > 1 ? run.mixing : null,
    verdict: assessment.verdict,
    timeToAct_s: assessment.timeToAct,
    margin_s: margin?.margin ?? null,
    alarm_K: margin?.alarm ?? null,
    stopFeedOnly:
      stopFeedOnly === null ? null : { suffices: stopFeedOnly.suffices, timeToAct_s: stopFeedOnly.timeToAct },
    vulnerable:
      vulnerableMoments(vessel, failure)?.map((moment) => ({
        startedAt_s: moment.startedAt,
        timeToAct_s: moment.timeToAct,
        verdict: moment.verdict,
      })) ?? null,
    trace: traceOf(vessel, run).map((point) => ({
      time_s: point.time,
      temperature_K: point.temperature,
      jacket_K: point.jacket,
    })),
  };
}
