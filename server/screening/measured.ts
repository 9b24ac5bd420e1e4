import { type Dosing, doseAt } from "../thermal/dosing.js";
import { type MeasuredDosing, measuredDosing } from "../thermal/measuredAccumulation.js";
import type { Step } from "../thermal/step.js";
import { differenceText, temperatureText } from "../words/numbers.js";
import { caution } from "./cautions/catalogue.js";
import type { AccumulationFindings, Caution } from "./findings.js";
import type { KnownRates } from "./known.js";
import type { CaseModel } from "./model.js";
import { estimates, realise } from "./realise.js";

/** A run at another temperature than the planned one says nothing about it, K. */
const sameTemperature = 1;

/**
 * The measured accumulation of a case; null without one.
 *
 * @param model parsed case
 * @param step at its estimates
 */
export function measuredOf(model: CaseModel, step: Step): MeasuredDosing | null {
  const run = model.reaction.measuredAccumulation;
  return run === null ? null : measuredDosing(step, run);
}

/** Whether a measured run was made at the planned temperature. */
function atProcess(model: CaseModel): boolean {
  const run = model.reaction.measuredAccumulation;
  return run !== null && Math.abs(run.temperature - model.reaction.temperature.value) <= sameTemperature;
}

/**
 * Rates with the excess of a measured accumulation over the kinetics, where both are given for the planned
 * temperature: MTSR is then the larger of the two, here and in the window.
 *
 * @param model parsed case
 * @param known rates without it
 */
export function withMeasured(model: CaseModel, known: KnownRates): KnownRates {
  if (!atProcess(model) || known.reaction === null) return known;
  const step = realise(model, known, estimates);
  const measured = measuredOf(model, step);
  const { rate, temperature } = step.reaction;
  const kinetic = rate === null ? null : doseAt(step, rate, temperature);
  if (measured === null || kinetic === null) return known;
  return { ...known, measuredExcess: Math.max(0, measured.rise.value - kinetic.rise.value) };
}

/**
 * The measured run beside the accumulation that the kinetics give, and which of the two MTSR rests on.
 *
 * @param step at the estimates
 * @param kinetic findings from the kinetics; null where there are none
 * @param measured run
 * @param model parsed case
 */
export function measuredFindings(
  step: Step,
  kinetic: AccumulationFindings | null,
  measured: MeasuredDosing | null,
  model: CaseModel,
): AccumulationFindings | null {
  const run = model.reaction.measuredAccumulation;
  if (measured === null || run === null) return kinetic;
  const temperature = kinetic === null ? step.reaction.temperature : run.temperature;
  const curve = measured.curve.map((point) => ({
    time_s: point.time,
    fed: point.fed,
    reacted: point.released,
    accumulated: point.accumulated,
    mtsr_K: temperature + point.rise,
  }));
  const beside = {
    temperature_K: run.temperature,
    maximumFraction: measured.accumulation.value,
    at_s: measured.accumulation.at,
    mtsr_K: temperature + measured.rise.value,
    curve,
  };
  if (kinetic !== null) {
    return {
      ...kinetic,
      measured: beside,
      usedFor: step.reaction.measuredExcess > 0 ? "measured" : "kinetics",
    };
  }
  return {
    maximumFraction: measured.accumulation.value,
    at_s: measured.accumulation.at,
    curve,
    measured: beside,
    usedFor: "measured",
  };
}

/**
 * What a measured accumulation means for the findings.
 *
 * @param model parsed case
 * @param step at the estimates
 * @param kinetic isothermal step from the kinetics; null without them
 */
export function measuredCautions(model: CaseModel, step: Step, kinetic: Dosing | null): Caution[] {
  const run = model.reaction.measuredAccumulation;
  if (run === null) return [];
  const about = "/reaction/measuredAccumulation";
  const at = temperatureText(run.temperature);
  const cautions: Caution[] = [];
  if (kinetic === null) {
    cautions.push(
      caution(
        "NOT_ASSESSED",
        about,
        `The accumulation rests on one run at ${at} with its own feed: it gives MTSR, but no window, no cooling duty and no failures, which need a rate constant.`,
      ),
    );
  }
  if (!atProcess(model)) {
    const used =
      kinetic === null ? "It is used all the same, for want of kinetics." : "It is shown, not used.";
    cautions.push(
      caution(
        "MEASURED_ACCUMULATION",
        about,
        `The accumulation was measured at ${at}, the planned temperature is ${temperatureText(step.reaction.temperature)}: colder, more accumulates. ${used}`,
      ),
    );
  } else if (step.reaction.measuredExcess > 0) {
    cautions.push(
      caution(
        "MEASURED_ACCUMULATION",
        about,
        `The measured accumulation gives an MTSR ${differenceText(step.reaction.measuredExcess, "up")} above that of the kinetics. MTSR is taken from the measurement, and the window adds the difference at every temperature.`,
      ),
    );
  }
  return cautions;
}
