import type { Step } from "../thermal/step.js";
import { drawnIsothermal } from "../uncertainty/drawnIsothermal.js";
import { collectWindows, type DrawnStudy } from "../uncertainty/drawnWindow.js";
import { createDraws } from "../uncertainty/draws.js";
import { percentilesOf } from "../uncertainty/percentiles.js";
import { errorFreeInputs, moved, type Sample, uncertainInputs } from "../uncertainty/sample.js";
import { type Isothermal, integrated, type Study, studyOf } from "../window/study.js";
import type { DriverFindings } from "./decisionFindings.js";
import type { Nominal } from "./drawn.js";
import { limitTemperature, mtsrOf, sameRunaway } from "./drawnOutcomes.js";
import { inputLabel } from "./inputLabels.js";
import type { KnownRates } from "./known.js";
import type { CaseModel } from "./model.js";
import { estimates, realise } from "./realise.js";

/** Draws of each input unless another number is asked for. */
const driverDraws = 500;

export interface DriverOptions {
  /** 500 of each input unless said */
  readonly draws?: number;
  /** the fixed one unless said */
  readonly seed?: number;
  /** called before each input with the part that is done; what it throws ends the work */
  readonly onProgress?: (fraction: number) => void;
}

interface Drawn extends DrawnStudy {
  /** T_D24, K; infinite beyond the range in which it is looked for, NaN where there is none */
  readonly limit: number;
}

interface Output {
  readonly key: DriverFindings["output"];
  /** what infinite values of it mean */
  readonly beyond: string;
  valueIn(draw: Drawn): number;
  /** a number that moves where the output does, and costs little */
  trace(draw: Drawn): number;
}

/**
 * What moves T_D24, MTSR and the window's upper end: (p95 - p05)^2 of each with only one input drawn, over the sum
 * of all inputs. An activation pair is one input. Inputs that carry no error cannot be weighed: those on which
 * a figure depends stand first, without a share.
 *
 * @param model parsed case
 * @param known its fits and covariances
 * @param nominal the case at its estimates
 * @param options number of draws, seed, progress
 */
export function driverFindings(
  model: CaseModel,
  known: KnownRates,
  nominal: Nominal,
  options: DriverOptions = {},
): DriverFindings[] {
  const draws = createDraws(options.draws ?? driverDraws, options.seed);
  const isothermal = nominal.isothermal ?? drawnIsothermal(nominal.study.step);
  const walk = (sample: Sample) => realise(model, known, sample);
  const limitOf = limitIn(nominal);
  const studied = (sample: Sample, found: (step: Step) => Isothermal = isothermal): Drawn => {
    const step = walk(sample);
    const study = studyOf(step, "draws", found(step));
    const limit = limitOf(study);
    const shift = limit - (nominal.td24 ?? limit);
    return { study, limit, shift: Number.isFinite(shift) ? shift : 0 };
  };
  const outputs = outputsOf(model, nominal, draws.count, (index) => studied(draws.sample(index)));
  const inputs = uncertainInputs(walk);
  const squares = inputs.map((pointer, at) => {
    options.onProgress?.(at / inputs.length);
    const columns = outputs.map(() => new Float64Array(draws.count));
    for (let i = 0; i < draws.count; i += 1) {
      const draw = studied(draws.sample(i, pointer));
      outputs.forEach((output, of) => {
        columns[of][i] = output.valueIn(draw);
      });
    }
    return columns.map(squaredSpread);
  });
  // Each of these is looked at once or twice: no table would pay.
  const unmoved = studied(estimates, integrated);
  const bare = errorFreeInputs(walk).map((pointer) => ({
    pointer,
    nearby: [0.99, 1.01].map((factor) => studied(moved(pointer, factor), integrated)),
  }));
  const named = (pointer: string, share: number | null) => ({
    pointer,
    label: inputLabel(model, pointer),
    share,
  });
  return outputs.map((output, of) => {
    const before = output.trace(unmoved);
    const total = squares.reduce((sum, each) => sum + each[of], 0);
    const untold = inputs.filter((_, at) => !Number.isFinite(squares[at][of]));
    const weighed = inputs
      .map((pointer, at) => ({ pointer, share: total > 0 ? squares[at][of] / total : 0 }))
      .sort((a, b) => b.share - a.share)
      .map(({ pointer, share }) => named(pointer, share));
    return {
      output: output.key,
      shares: [
        ...bare
          .filter(({ nearby }) => nearby.some((draw) => !Object.is(output.trace(draw), before)))
          .map(({ pointer }) => named(pointer, null)),
        ...(untold.length === 0 ? weighed : []),
      ],
      why:
        untold.length === 0
          ? null
          : `The error of this input alone is so large that ${output.beyond} in more than 5 % of its draws: ${untold.map((pointer) => inputLabel(model, pointer)).join(", ")}. No shares are told.`,
    };
  });
}

/** (p95 - p05)^2 of the values; infinite where either cannot be told. */
function squaredSpread(values: Float64Array): number {
  const { p05, p95 } = percentilesOf(values);
  return p05 === null || p95 === null ? Number.POSITIVE_INFINITY : (p95 - p05) ** 2;
}

/** T_D24 of draws; most inputs leave the decomposition as it is at the estimates. */
function limitIn({ study, td24 }: Nominal): (study: Study) => number {
  const { runaway } = study;
  if (runaway === null || td24 === null) return () => Number.NaN;
  const same = limitTemperature(runaway, td24);
  return (drawn) =>
    drawn.runaway === null || sameRunaway(drawn.runaway, runaway)
      ? same
      : limitTemperature(drawn.runaway, td24);
}

/** The outputs that the case has at its estimates. */
function outputsOf(
  model: CaseModel,
  { study, window, td24 }: Nominal,
  count: number,
  drawn: (index: number) => DrawnStudy,
): Output[] {
  const outputs: Output[] = [];
  if (td24 !== null) {
    outputs.push({
      key: "td24_K",
      beyond: "T_D24 lies beyond the temperatures in which it is looked for",
      valueIn: ({ limit }) => limit,
      trace: ({ limit }) => limit,
    });
  }
  const { measuredAccumulation } = model.reaction;
  if (mtsrOf(study, measuredAccumulation) !== null) {
    const valueIn = (draw: Drawn) => mtsrOf(draw.study, measuredAccumulation) ?? Number.POSITIVE_INFINITY;
    outputs.push({ key: "mtsr_K", beyond: "MTSR cannot be computed", valueIn, trace: valueIn });
  }
  if (window !== null && window.chosen !== null) {
    const { upperIn } = collectWindows(study, window, count, drawn);
    const binding = window.lanes.find(({ criterion }) => criterion.key === window.upperSetBy)?.criterion;
    const end = window.chosen[1] + study.step.limits.controlBand;
    outputs.push({
      key: "upper_K",
      beyond: "nothing is left of the window",
      valueIn: upperIn,
      // An upper end that no criterion sets is the study's own limit: nothing moves it.
      trace: (draw) => binding?.margin(draw.study, end) ?? 0,
    });
  }
  return outputs;
}
