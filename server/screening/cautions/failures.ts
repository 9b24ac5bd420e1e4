import type { Assessment } from "../../failure/assessment.js";
import type { Judgement } from "../../failure/judgement.js";
import { responseTime } from "../../failure/response.js";
import { momentOf } from "../../failure/run.js";
import type { Vessel } from "../../failure/vessel.js";
import { allAtOnceTemperature } from "../../thermal/balance.js";
import { failingText } from "../../uncertainty/probabilitySentence.js";
import {
  differenceText,
  durationText,
  percentText,
  powerText,
  temperatureText,
} from "../../words/numbers.js";
import type { Caution, DrawnFailureFindings } from "../findings.js";
import type { FailureModel } from "../model.js";
import { caution } from "./catalogue.js";

/**
 * Cautions on a failure that was run.
 *
 * @param failure as the case states it
 * @param pointer to it in the case
 * @param vessel in which it was run
 * @param assessment what came of it
 */
export function failureCautions(
  failure: FailureModel,
  pointer: string,
  vessel: Vessel,
  assessment: Assessment,
): Caution[] {
  return [
    ...verdictOf(failure, pointer, assessment),
    ...startOf(failure, pointer, vessel, assessment),
    ...courseOf(failure, pointer, vessel, assessment),
    ...quenchesOf(failure, pointer, vessel, assessment),
  ];
}

/**
 * The caution that a failure leaves enough time at the estimates, but not in 95 of 100 draws. Without a stated
 * response it is raised where the failure holds at the estimates but not in that many draws, and where it is lost in
 * too many, since then no response is fast enough. A failure that is too late at the estimates already has its stop.
 *
 * @param failure as the case states it
 * @param pointer to it in the case
 * @param judgement of it at the estimates
 * @param drawn what the draws say about it
 */
export function drawnFailureCautions(
  failure: FailureModel,
  pointer: string,
  { verdict, timeToAct }: Judgement,
  { draws, p05_s: low, probability, probabilityMarginPositive }: DrawnFailureFindings,
): Caution[] {
  const needed = failure.response === null ? null : responseTime(failure.response);
  if (verdict === "lost" || low === null) return [];
  if (needed !== null && timeToAct !== null && timeToAct < needed) return [];
  const isUnsure = needed === null ? low === 0 || timeToAct === null : low < needed;
  if (!isUnsure) return [];
  const estimate =
    timeToAct === null
      ? "holds by itself at the estimates"
      : `leaves ${durationText(timeToAct, "down")} to act at the estimates`;
  const inDraws =
    low === 0
      ? `in ${failingText(1 - probability.lost, draws)} draws it is lost`
      : `in 5 of 100 draws it leaves less than ${durationText(low, "down")}`;
  const response =
    needed === null || probabilityMarginPositive === null
      ? ""
      : ` Detection, decision and action take ${durationText(needed, "up")}: they come too late in ${failingText(probabilityMarginPositive, draws)} draws.`;
  return [caution("ACT_UNSURE", pointer, `“${failure.name}” ${estimate}, but ${inDraws}.${response}`)];
}

/** A case without a rate constant has nothing to simulate. */
export function withoutKinetics(failures: readonly FailureModel[]): Caution {
  const names = failures.map((failure) => `“${failure.name}”`).join(", ");
  return caution(
    "NOT_ASSESSED",
    "/failures",
    `Without a rate constant of the desired reaction failures cannot be simulated: ${names} and the time to act are not assessed.`,
  );
}

/**
 * Failures are run with the kinetics; where a measured run has accumulated more, they look better than they are.
 *
 * @param excess K by which the measurement lets MTSR exceed what the kinetics say
 */
export function measuredBeyondKinetics(excess: number): Caution {
  return caution(
    "MEASURED_ACCUMULATION",
    "/failures",
    `Failures are simulated with the kinetics, which accumulate less than was measured: peaks can lie up to ${differenceText(excess, "up")} higher, and the time to act is shorter than shown.`,
  );
}

/** A failure whose hold could not be integrated. */
export function unfollowed(failure: FailureModel, pointer: string): Caution {
  return caution(
    "NOT_COMPUTED",
    pointer,
    `“${failure.name}” is left out: the step before the failure could not be computed for these inputs.`,
  );
}

function verdictOf(failure: FailureModel, pointer: string, assessment: Assessment): Caution[] {
  const { verdict, timeToAct, margin } = assessment;
  if (verdict === "lost") {
    const text = `“${failure.name}” is lost: not even full cooling restored at once saves the batch.`;
    return [caution("ACT_TOO_LATE", pointer, text)];
  }
  if (margin === null || timeToAct === null || margin.margin >= 0) return [];
  const needed = timeToAct - margin.margin;
  return [
    caution(
      "ACT_TOO_LATE",
      pointer,
      `“${failure.name}” leaves ${durationText(timeToAct, "down")} to act, but detection, decision and action take ${durationText(needed, "up")}: the response comes ${durationText(-margin.margin, "up")} too late.`,
    ),
  ];
}

function startOf(failure: FailureModel, pointer: string, vessel: Vessel, { start }: Assessment): Caution[] {
  const cautions: Caution[] = [];
  const { step, places } = vessel.contents;
  if (start.duty > start.capacity) {
    cautions.push(
      caution(
        "CANNOT_HOLD",
        pointer,
        `“${failure.name}”: at its start ${powerText(start.duty, "up")} must be taken out at ${temperatureText(vessel.hold.temperature)}, but the cooling can take out no more than ${powerText(start.capacity, "down")}. That temperature cannot be held, and what is simulated from it is too favourable.`,
      ),
    );
  }
  const extent = start.state[places.extent];
  if (!start.conditions.feeding && extent >= step.limits.targetConversion) {
    cautions.push(
      caution(
        "LATE_FAILURE",
        `${pointer}/at`,
        `“${failure.name}” starts after the reaction's end: ${percentText(extent, "down")} has reacted by then. An earlier moment is worse.`,
      ),
    );
  }
  return cautions;
}

function courseOf(
  failure: FailureModel,
  pointer: string,
  vessel: Vessel,
  { run, runs, verdict }: Assessment,
): Caution[] {
  const cautions: Caution[] = [];
  const { step } = vessel.contents;
  if (runs.length > 1) {
    const shown = run.mixing === "mixed" ? "as if mixed" : "unmixed until the agitator runs again";
    const judged =
      verdict === "holds"
        ? "It holds with both."
        : "The time to act is the one that is short enough for both.";
    cautions.push(
      caution(
        "MIXING_LOST",
        pointer,
        `“${failure.name}” stops the agitator, and nobody knows how far the contents still mix: they were run as if mixed, and unmixed until the agitator runs again. The course shown is the worse one, ${shown}. ${judged}`,
      ),
    );
  }
  if (runs.some((each) => each.legs.some((leg) => leg.conditions.feeding))) {
    const bound = allAtOnceTemperature(step, vessel.hold.temperature);
    cautions.push(
      caution(
        "FEED_RUNS_ON",
        pointer,
        `“${failure.name}” lets the feed run on: MTSR does not cover it. If all of the recipe met at once, the desired reaction alone could reach ${temperatureText(bound, "up")}.`,
      ),
    );
  }
  if (run.marks.mtt !== null) {
    const mtt = step.limits.maximumTechnicalTemperature;
    cautions.push(
      caution(
        "BEYOND_MODEL",
        pointer,
        `“${failure.name}”, left to itself, passes the technical limit ${temperatureText(mtt, "down")} after ${durationText(run.marks.mtt, "down")}. What comes later is beyond the model: boiling, venting and failure of the vessel are not in it.`,
      ),
    );
  }
  if (runs.some((each) => each.loss?.by === "failed")) {
    cautions.push(
      caution(
        "NOT_COMPUTED",
        pointer,
        `“${failure.name}” could not be followed to its end and counts as lost where it stopped.`,
      ),
    );
  }
  return cautions;
}

function quenchesOf(failure: FailureModel, pointer: string, vessel: Vessel, { run }: Assessment): Caution[] {
  return failure.changes.flatMap(({ after, quench }, i) => {
    if (quench === undefined) return [];
    const moment = momentOf(vessel, run, after, "before");
    const contents = vessel.contents.reference + moment.state[vessel.contents.places.temperature];
    if (quench.temperature <= contents) return [];
    return [
      caution(
        "WARM_QUENCH",
        `${pointer}/changes/${i}/quench/temperature`,
        `The quench of “${failure.name}” (${temperatureText(quench.temperature, "up")}) is warmer than the contents at that moment (${temperatureText(contents, "down")}): it heats them.`,
      ),
    ];
  });
}
