import type { Step } from "../thermal/step.js";
import { drawnIsothermal } from "../uncertainty/drawnIsothermal.js";
import { collectWindows, type DrawnWindow } from "../uncertainty/drawnWindow.js";
import { createDraws, usualCount } from "../uncertainty/draws.js";
import { percentilesOf } from "../uncertainty/percentiles.js";
import { uncertainInputs } from "../uncertainty/sample.js";
import { type Isothermal, type Study, studyOf } from "../window/study.js";
import type { TemperatureWindow } from "../window/window.js";
import { type DrawnOutcome, outcomeOf } from "./drawnOutcomes.js";
import type { CriticalityKey, Percentiles, UncertaintyFindings, WindowFindings } from "./findings.js";
import type { KnownRates } from "./known.js";
import type { CaseModel } from "./model.js";
import { realise } from "./realise.js";

/** The case at its estimates, about which it is drawn. */
export interface Nominal {
  readonly study: Study;
  /** null where no rate constant is known */
  readonly window: TemperatureWindow | null;
  /** K */
  readonly td24: number | null;
  /** the isothermal step of draws, where several kinds of draws share its table; made anew unless said */
  readonly isothermal?: (step: Step) => Isothermal;
}

export interface DrawnOptions {
  /** 2,000 unless said */
  readonly draws?: number;
  /** the fixed one unless said */
  readonly seed?: number;
  /** called now and then with the part that is done; what it throws ends the work */
  readonly onProgress?: (fraction: number) => void;
}

/** What the draws say about a case. */
export interface DrawnFindings {
  readonly uncertainty: UncertaintyFindings;
  /** null where the class is not assessed */
  readonly criticalityProbability: Readonly<Record<CriticalityKey, number>> | null;
  /** null where no window is known */
  readonly window: DrawnWindow | null;
}

/** Draws between two reports of progress. */
const reportEvery = 50;

/**
 * Screens draws of a case: everything but its failures. The same case gives the same findings to the last digit;
 * without any standard error the one draw that there is stands for all.
 *
 * @param model parsed case
 * @param known its fits and covariances
 * @param nominal the case at its estimates
 * @param options number of draws, seed, progress
 */
export function drawnFindings(
  model: CaseModel,
  known: KnownRates,
  nominal: Nominal,
  options: DrawnOptions = {},
): DrawnFindings {
  const draws = createDraws(options.draws ?? usualCount, options.seed);
  const isothermal = nominal.isothermal ?? drawnIsothermal(nominal.study.step);
  const limit = nominal.td24 ?? 400;
  const drawn = (index: number) => {
    const step = realise(model, known, draws.sample(index));
    const study = studyOf(step, "draws", isothermal(step));
    const outcome = outcomeOf(study, model.reaction.measuredAccumulation, limit);
    const shift = (outcome.td24 ?? limit) - limit;
    return { study, outcome, shift: Number.isFinite(shift) ? shift : 0 };
  };
  const count = uncertainInputs((sample) => realise(model, known, sample)).length > 0 ? draws.count : 1;
  const windows =
    nominal.window === null ? null : collectWindows(nominal.study, nominal.window, count, drawn);
  const outcomes: DrawnOutcome[] = [];
  const upper = new Float64Array(windows === null ? 0 : count);
  for (let i = 0; i < count; i += 1) {
    if (i % reportEvery === 0) options.onProgress?.(i / count);
    const draw = drawn(i);
    outcomes.push(draw.outcome);
    if (windows !== null) upper[i] = windows.add(draw);
  }
  const percentiles = (figure: (outcome: DrawnOutcome) => number | null): Percentiles | null => {
    const values = outcomes.map(figure).filter((value) => value !== null);
    return values.length < count ? null : percentilesOf(Float64Array.from(values));
  };
  return {
    uncertainty: {
      draws: draws.count,
      seed: draws.seed,
      td24_K: percentiles((outcome) => outcome.td24),
      mtsr_K: percentiles((outcome) => outcome.mtsr),
      upper_K: windows === null ? null : percentilesOf(upper),
      timeToMaximumRateAtProcess_s: percentiles((outcome) => outcome.timeAtProcess),
      timeToMaximumRateAtMtsr_s: percentiles((outcome) => outcome.timeAtMtsr),
      coolingUse: percentiles((outcome) => outcome.coolingUse),
      timeToAct_s: null,
      drivers: null,
      nextMeasurement: null,
    },
    criticalityProbability: nominal.td24 === null ? null : classProbabilities(outcomes),
    window: windows === null ? null : windows.result(count),
  };
}

function classProbabilities(outcomes: readonly DrawnOutcome[]): Record<CriticalityKey, number> | null {
  const counts: Record<CriticalityKey, number> = {
    "1": 0,
    "2": 0,
    "3": 0,
    "4": 0,
    "5": 0,
    none: 0,
  };
  for (const { criticality } of outcomes) {
    if (criticality === null) return null;
    counts[`${criticality}`] += 1;
  }
  const part = (key: CriticalityKey): number => counts[key] / outcomes.length;
  return {
    "1": part("1"),
    "2": part("2"),
    "3": part("3"),
    "4": part("4"),
    "5": part("5"),
    none: part("none"),
  };
}

/**
 * A window's findings with the cautious side that draws give it.
 *
 * @param window at the estimates
 * @param drawn null where nothing was drawn
 */
export function windowWithDraws(window: WindowFindings, drawn: DrawnFindings | null): WindowFindings {
  const found = drawn?.window ?? null;
  if (found === null) return window;
  return {
    ...window,
    cautious: {
      lower_K: found.cautious?.[0] ?? null,
      upper_K: found.cautious?.[1] ?? null,
    },
    criteria: window.criteria.map((criterion) => {
      const lane = found.lanes.find((each) => each.key === criterion.key);
      return lane === undefined
        ? criterion
        : {
            ...criterion,
            cautious: lane.cautious,
            probability: lane.probability,
          };
    }),
  };
}
