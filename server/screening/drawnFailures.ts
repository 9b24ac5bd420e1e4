import { drawnSearch, type Judgement, judgeAt } from "../failure/judgement.js";
import { responseTime } from "../failure/response.js";
import { reusedStart } from "../failure/reusedStart.js";
import { createVessel, type Vessel } from "../failure/vessel.js";
import type { Step } from "../thermal/step.js";
import { createDraws } from "../uncertainty/draws.js";
import { percentilesOf } from "../uncertainty/percentiles.js";
import { uncertainInputs } from "../uncertainty/sample.js";
import { agreesWithMedian, orderedTime, timesToAct } from "../uncertainty/timesToAct.js";
import { drawnFailureCautions } from "./cautions/failures.js";
import type { SimulatedFailure, SimulatedFailures } from "./failureFindings.js";
import type { Caution, DrawnFailureFindings, FailureFindings, Percentiles } from "./findings.js";
import type { KnownRates } from "./known.js";
import type { CaseModel } from "./model.js";
import { ignored, type Progress } from "./progress.js";
import { realise } from "./realise.js";

/** Draws of every failure unless another number is asked for. */
export const failureDraws = 200;

export interface DrawnFailureOptions {
  /** 200 unless said */
  readonly draws?: number;
  /** the fixed one unless said */
  readonly seed?: number;
  /** called now and then with the part that is done; what it throws ends the work */
  readonly onProgress?: Progress;
}

/** What the draws say about the failures of a case. */
export interface DrawnFailures {
  /** in the order of the failures */
  readonly failures: readonly DrawnFailureFindings[];
  /** of the least time to act in each draw, s; null without a failure */
  readonly timeToAct: Percentiles | null;
}

/**
 * Judges draws of the failures of a case: the same streams of draws as everything else in a screening, so two cases
 * share the draws of what they have in common. A failure that cannot be computed in a draw counts as lost there.
 * Without any standard error the estimates stand for all draws.
 *
 * @param model parsed case
 * @param known its fits and covariances
 * @param simulated its failures at the estimates
 * @param options number of draws, seed, progress
 */
export function drawnFailures(
  model: CaseModel,
  known: KnownRates,
  simulated: readonly SimulatedFailure[],
  options: DrawnFailureOptions = {},
): DrawnFailures {
  const { onProgress = ignored } = options;
  const draws = createDraws(options.draws ?? failureDraws, options.seed);
  const isUncertain = uncertainInputs((sample) => realise(model, known, sample)).length > 0;
  const judged = simulated.map((): Judgement[] => []);
  if (isUncertain) {
    for (let i = 0; i < draws.count; i += 1) {
      const step = realise(model, known, draws.sample(i));
      const vesselAt = vesselsOf(step);
      simulated.forEach((each, at) => {
        onProgress((i + at / simulated.length) / draws.count);
        judged[at].push(judgedIn(vesselAt(each.failure.startTemperature), each));
      });
    }
  } else {
    simulated.forEach((each, at) => {
      judged[at].push(each.judgement);
    });
  }
  return {
    failures: simulated.map((each, at) => findingsOf(each, judged[at], draws.count)),
    timeToAct: leastOf(judged),
  };
}

/** Vessels of one draw, made when they are asked for; null for a hold that could not be followed. */
function vesselsOf(step: Step): (startTemperature: number | null) => Vessel | null {
  const vessels = new Map<number, Vessel | null>();
  const { rate, temperature: process } = step.reaction;
  return (startTemperature) => {
    const temperature = startTemperature ?? process;
    let vessel = vessels.get(temperature);
    if (vessel === undefined) {
      vessel = rate === null ? null : createVessel(step, rate, temperature);
      vessels.set(temperature, vessel);
    }
    return vessel;
  };
}

const worst: Judgement = { verdict: "lost", timeToAct: 0 };

function judgedIn(vessel: Vessel | null, { failure, start }: SimulatedFailure): Judgement {
  if (vessel === null) return worst;
  return judgeAt(vessel, failure, reusedStart(vessel, failure, start), drawnSearch) ?? worst;
}

function findingsOf(
  { failure, judgement }: SimulatedFailure,
  judged: readonly Judgement[],
  count: number,
): DrawnFailureFindings {
  const response = failure.response === null ? null : responseTime(failure.response);
  const { percentiles, probabilityMarginPositive, probability } = timesToAct(judged, response);
  return {
    draws: count,
    p05_s: percentiles.p05,
    p50_s: percentiles.p50,
    p95_s: percentiles.p95,
    probabilityMarginPositive,
    probability,
    estimateAgrees: agreesWithMedian(judgement, percentiles.p50),
  };
}

/** Percentiles of the least time to act of all failures in each draw. */
function leastOf(judged: readonly (readonly Judgement[])[]): Percentiles | null {
  const [first] = judged;
  if (first === undefined) return null;
  return percentilesOf(
    Float64Array.from(first, (_, draw) => Math.min(...judged.map((each) => orderedTime(each[draw])))),
  );
}

/**
 * Findings of the failures of a case with what draws say about them, and with the cautions of both.
 *
 * @param model parsed case
 * @param known its fits and covariances
 * @param simulated its failures at the estimates
 * @param onProgress told the part that is done
 */
export function failuresWithDraws(
  model: CaseModel,
  known: KnownRates,
  { failures, simulated, cautions }: SimulatedFailures,
  onProgress: Progress = ignored,
): {
  readonly failures: FailureFindings[] | null;
  readonly timeToAct: Percentiles | null;
  readonly cautions: Caution[];
} {
  if (failures === null) return { failures, timeToAct: null, cautions };
  const drawn = drawnFailures(model, known, simulated, { onProgress });
  return {
    failures: failures.map((failure, i) => ({ ...failure, drawn: drawn.failures[i] })),
    timeToAct: drawn.timeToAct,
    cautions: [
      ...cautions,
      ...simulated.flatMap(({ failure, pointer, judgement }, i) =>
        drawnFailureCautions(failure, pointer, judgement, drawn.failures[i]),
      ),
    ],
  };
}
