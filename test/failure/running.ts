import { type Assessment, assess } from "../../server/failure/assessment.js";
import { type FullRun, runToHorizon } from "../../server/failure/run.js";
import { startAt } from "../../server/failure/start.js";
import type { Change, Timeline } from "../../server/failure/timeline.js";
import { createVessel, type Vessel } from "../../server/failure/vessel.js";
import type { ModifiedArrhenius } from "../../server/kinetics/rateConstant.js";
import type { Step } from "../../server/thermal/step.js";
import { documentOf, modelOf, stepOf } from "../screening/realised.js";

/** A checked case at its estimates, and its failures. */
export function caseOf(name: string): { readonly step: Step; readonly failures: readonly Timeline[] } {
  const document = documentOf(name);
  return { step: stepOf(document), failures: modelOf(document).failures };
}

/** A failure by its changes; the first has to be after 0. */
export function timelineOf(changes: readonly Change[], rest: Partial<Timeline> = {}): Timeline {
  return { name: "", at: 0, startTemperature: null, horizon: null, response: null, changes, ...rest };
}

export function rateOf(step: Step): ModifiedArrhenius {
  if (step.reaction.rate === null) throw new Error("No rate constant");
  return step.reaction.rate;
}

export function vesselFor(step: Step, timeline: Timeline): Vessel {
  const temperature = timeline.startTemperature ?? step.reaction.temperature;
  const vessel = createVessel(step, rateOf(step), temperature);
  if (vessel === null) throw new Error("The hold could not be followed");
  return vessel;
}

export function assessed(step: Step, timeline: Timeline): Assessment {
  const assessment = assess(vesselFor(step, timeline), timeline);
  if (assessment === null) throw new Error("The failure could not be run");
  return assessment;
}

/** One run to its horizon, from a given start. */
export function runFrom(
  vessel: Vessel,
  timeline: Timeline,
  startedAt: number,
  relativeTolerance = 1e-8,
): FullRun {
  const start = startAt(vessel.contents, vessel.hold, startedAt);
  if (start === null) throw new Error("The hold could not be followed");
  return runToHorizon(vessel, start, timeline, "mixed", relativeTolerance);
}

/** Temperature of a run at a time after the failure, K. */
export function temperatureAt(vessel: Vessel, run: FullRun, time: number): number {
  return vessel.contents.reference + run.trajectory.component(time, 0, true);
}
