import { lnRateConstant } from "../kinetics/rateConstant.js";
import { lawValue } from "../kinetics/rateLaw.js";
import { maximise } from "../numeric/roots.js";
import { decompositionRise, fedMass } from "./balance.js";
import { courseOf, type Dosing, type DosingFigures, figuresOf, type RateCourse } from "./dosing.js";
import { progressAfterHold } from "./history.js";
import type { Runaway } from "./runaway.js";
import type { Step } from "./step.js";

/**
 * Effective heat transfer of a well-mixed jacket with flowing coolant, UAe = UA w/(UA + w), w = flow cpc;
 * UA itself where the jacket stays at the coolant's temperature.
 *
 * @param step SI numbers
 * @returns W/K
 * @see from the steady balance UA (T - Tj) = w (Tj - Tc) of a mixed jacket
 */
export function effectiveUa(step: Step): number {
  const { ua, flowing } = step.vessel;
  if (flowing === null) return ua;
  const capacityRate = flowing.flow * flowing.heatCapacity;
  return (ua * capacityRate) / (ua + capacityRate);
}

/**
 * Full cooling capacity at a temperature, UAe (T - Tc); negative where the coolant is warmer.
 *
 * @param step SI numbers
 * @param temperature of the contents, K
 * @returns W
 */
export function coolingCapacity(step: Step, temperature: number): number {
  return effectiveUa(step) * (temperature - step.vessel.coolantTemperature);
}

/**
 * The decomposition on its own, as TMRad takes it.
 *
 * @param step SI numbers
 * @returns null where no decomposition is known
 */
export function runawayOf(step: Step): Runaway | null {
  const { decomposition } = step;
  if (decomposition === null) return null;
  return {
    law: decomposition.law,
    rate: decomposition.rate,
    rise: decompositionRise(step, decomposition),
  };
}

/**
 * Heat of the decomposition at a moment of the isothermal step, m Q kd f(alpha), with the alpha that the hold
 * up to then has left.
 *
 * @param step SI numbers
 * @param temperature K
 * @param time s
 * @returns W
 */
export function decompositionHeat(step: Step, temperature: number, time: number): number {
  const runaway = runawayOf(step);
  if (runaway === null || step.decomposition === null) return 0;
  const mass = step.mixture.mass + fedMass(step, time);
  const alpha = progressAfterHold(runaway, temperature, time);
  return (
    mass *
    step.decomposition.heat *
    Math.exp(lnRateConstant(runaway.rate, temperature)) *
    lawValue(runaway.law, alpha)
  );
}

/**
 * Cooling duty: the supremum over [0, feed end] of r V (-dHr) + m Q kd f(alpha) - feed rate cpfeed (T - Tfeed),
 * its end also without the feed term (batch: the start), plus the agitator's power. No credit for losses.
 *
 * @param step SI numbers
 * @param temperature K
 * @param dosing the isothermal step at that temperature
 * @returns W
 */
export function coolingDuty(step: Step, temperature: number, dosing: Dosing): number {
  return coolingDutyFrom(step, temperature, figuresOf(dosing), () => courseOf(dosing), 1e-7);
}

/**
 * `coolingDuty` from the few figures that it mostly needs.
 *
 * @param step SI numbers
 * @param temperature K
 * @param figures of the isothermal step at that temperature
 * @param course of its rate: asked for where the decomposition could move the moment of the largest heat
 * @param negligible a decomposition below this part of the largest heat cannot; bounds the error as well
 * @returns W; NaN where the step could not be integrated
 */
export function coolingDutyFrom(
  step: Step,
  temperature: number,
  figures: DosingFigures,
  course: () => RateCourse | null,
  negligible: number,
): number {
  const { reaction, vessel } = step;
  const { feed } = reaction;
  const { fastest, endRate } = figures;
  const perMol = -reaction.heat;
  if (feed === null) {
    return fastest.value * perMol + decompositionHeat(step, temperature, 0) + vessel.agitatorPower;
  }
  const feedTerm = ((feed.mass * feed.heatCapacity) / feed.duration) * (temperature - feed.temperature);
  const decomposingAtEnd = decompositionHeat(step, temperature, feed.duration);
  const end = endRate * perMol + decomposingAtEnd;
  const start = decompositionHeat(step, temperature, 0);
  const peak = fastest.value * perMol + decompositionHeat(step, temperature, fastest.at);
  let largest = Math.max(end, start, peak);
  if (decomposingAtEnd > negligible * largest) {
    const rate = course();
    if (rate === null) return Number.NaN;
    const released = (time: number, reacting: number): number =>
      reacting * perMol + decompositionHeat(step, temperature, time);
    largest = Math.max(largest, largestOver(rate, released));
  }
  return Math.max(largest - feedTerm, end) + vessel.agitatorPower;
}

/** Largest value over a course, refined about the best of its times. */
function largestOver(
  { times, rates, rateAt }: RateCourse,
  value: (time: number, rate: number) => number,
): number {
  const values = times.map((time, i) => value(time, rates[i]));
  const best = values.indexOf(Math.max(...values));
  if (best === 0 || best === values.length - 1) return values[best];
  const refined = maximise(
    (time) => value(time, rateAt(time)),
    times[best - 1],
    times[best + 1],
    1e-5 * times[best],
  );
  return Math.max(values[best], refined.value);
}
