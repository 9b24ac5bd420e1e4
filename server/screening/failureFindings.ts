import { type Assessment, assess } from "../failure/assessment.js";
import type { Judgement } from "../failure/judgement.js";
import type { KnownStart } from "../failure/reusedStart.js";
import { traceOf } from "../failure/trace.js";
import { createVessel, type Vessel } from "../failure/vessel.js";
import { vulnerableMoments } from "../failure/vulnerable.js";
import type { Step } from "../thermal/step.js";
import { failureCautions, measuredBeyondKinetics, unfollowed, withoutKinetics } from "./cautions/failures.js";
import type { Caution, FailureFindings } from "./findings.js";
import type { FailureModel } from "./model.js";
import { ignored, type Progress } from "./progress.js";

/** A failure at the estimates, ready to be drawn. */
export interface SimulatedFailure {
  readonly failure: FailureModel;
  /** JSON pointer to it in the case */
  readonly pointer: string;
  readonly start: KnownStart;
  readonly judgement: Judgement;
}

/** Failures at the estimates. One that could not be run is left out of both lists. */
export interface SimulatedFailures {
  /** in the order of the case; null where it has no kinetics to simulate */
  readonly failures: FailureFindings[] | null;
  readonly simulated: readonly SimulatedFailure[];
  readonly cautions: Caution[];
}

/**
 * Simulates and judges the failures of a case.
 *
 * @param step at the estimates
 * @param failures of the case, in its order
 * @param onProgress told before each of them
 */
export function failureFindings(
  step: Step,
  failures: readonly FailureModel[],
  onProgress: Progress = ignored,
): SimulatedFailures {
  const { rate } = step.reaction;
  if (failures.length === 0) return { failures: [], simulated: [], cautions: [] };
  if (rate === null) return { failures: null, simulated: [], cautions: [withoutKinetics(failures)] };
  const vessels = new Map<number, Vessel | null>();
  const findings: FailureFindings[] = [];
  const simulated: SimulatedFailure[] = [];
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
    const start = { startedAt: assessment.start.startedAt, mtsrAt: vessel.hold.mtsrAt };
    const { verdict, timeToAct } = assessment;
    simulated.push({ failure, pointer, start, judgement: { verdict, timeToAct } });
    cautions.push(...failureCautions(failure, pointer, vessel, assessment));
  });
  return { failures: findings, simulated, cautions };
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
