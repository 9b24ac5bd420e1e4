import {
  adiabaticRise,
  allAtOnceTemperature,
  fedMass,
  heatCapacityOf,
  severityOf,
} from "../thermal/balance.js";
import { coolingCapacity, coolingDuty, effectiveUa } from "../thermal/cooling.js";
import { likelihoodOf } from "../thermal/criticality.js";
import type { Dosing } from "../thermal/dosing.js";
import { freezeHeat, heatCrossings } from "../thermal/frozenHeat.js";
import { type Runaway, timeToMaximumRate, zeroOrderIsCautious, zeroOrderTime } from "../thermal/runaway.js";
import type { Step } from "../thermal/step.js";
import type { AccumulationFindings, CoolingFindings, Findings, TmradFindings } from "./findings.js";

/** Points of a drawn curve. */
const curvePoints = 61;

function grid(low: number, high: number, points = curvePoints): number[] {
  return Array.from({ length: points }, (_, i) => low + ((high - low) * i) / (points - 1));
}

/** Beyond the range of floating-point numbers a time is not given. */
function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

/**
 * Adiabatic rises and their severity.
 *
 * @param step at the estimates
 * @param runaway its decomposition
 */
export function heatFindings(step: Step, runaway: Runaway | null): Findings["heat"] {
  const rise = adiabaticRise(step);
  return {
    adiabaticRise_K: rise,
    severity: severityOf(rise),
    decompositionRise_K: runaway?.rise ?? null,
    decompositionSeverity: runaway === null ? null : severityOf(runaway.rise),
  };
}

/**
 * TMRad at the process temperature and at MTSR, the closed form beside it, and a curve over both.
 *
 * @param runaway the decomposition; null gives null
 * @param process K
 * @param mtsr K; null where it is not known
 * @param span of the curve, K
 */
export function tmradFindings(
  runaway: Runaway | null,
  process: number,
  mtsr: number | null,
  span: readonly [number, number],
): TmradFindings | null {
  if (runaway === null) return null;
  const time = (temperature: number): number | null =>
    finiteOrNull(timeToMaximumRate(runaway, temperature).time);
  const atMtsr = mtsr === null ? null : time(mtsr);
  return {
    atProcess_s: time(process),
    atMtsr_s: atMtsr,
    zeroOrderAtProcess_s: finiteOrNull(zeroOrderTime(runaway, process)),
    zeroOrderCautious: zeroOrderIsCautious(runaway, process),
    likelihood: atMtsr === null ? null : likelihoodOf(atMtsr),
    curve: grid(span[0], span[1]).map((temperature) => ({
      temperature_K: temperature,
      time_s: time(temperature),
      zeroOrder_s: finiteOrNull(zeroOrderTime(runaway, temperature)),
    })),
  };
}

/**
 * Accumulation over the feed at the process temperature.
 *
 * @param step at the estimates
 * @param dosing its isothermal step
 */
export function accumulationFindings(step: Step, dosing: Dosing): AccumulationFindings {
  return {
    maximumFraction: dosing.accumulation.value,
    at_s: dosing.accumulation.at,
    curve: accumulationCurve(step, dosing),
    measured: null,
    usedFor: "kinetics",
  };
}

function accumulationCurve(step: Step, dosing: Dosing): AccumulationFindings["curve"] {
  const { run, balance } = dosing;
  if (run === null) return [];
  const times = [...grid(0, balance.feedEnd), dosing.accumulation.at, dosing.rise.at].sort((a, b) => a - b);
  return [...new Set(times)].map((time) => {
    const fed = balance.fed(time);
    const reacted = run.extentAt(time);
    const accumulated = Math.max(0, Math.min(fed, balance.charged) - reacted);
    const held = accumulated * balance.limiting * -step.reaction.heat;
    return {
      time_s: time,
      fed,
      reacted,
      accumulated,
      mtsr_K: step.reaction.temperature + held / heatCapacityOf(step, fedMass(step, time)),
    };
  });
}

/**
 * Cooling at the process temperature: duty, capacity, stability, crossings and the two curves.
 *
 * @param step at the estimates, with a rate constant
 * @param dosing its isothermal step
 */
export function coolingFindings(step: Step, dosing: Dosing): CoolingFindings | null {
  const { rate, temperature } = step.reaction;
  if (rate === null) return null;
  const duty = coolingDuty(step, temperature, dosing);
  const capacity = coolingCapacity(step, temperature);
  const heat = freezeHeat(step, rate, temperature, dosing);
  const { noReturn, tangency, criticalCoolant } = heatCrossings(step, heat, temperature);
  const hottest = Math.max(temperature + 15, (noReturn ?? tangency ?? temperature) + 15);
  const coldest = Math.min(step.vessel.coolantTemperature, temperature) - 2;
  return {
    duty_W: duty,
    capacity_W: capacity,
    use: capacity > 0 ? duty / capacity : null,
    stabilityRatio: heat.slope(temperature) / effectiveUa(step),
    noReturn_K: noReturn,
    tangency_K: tangency,
    criticalCoolant_K: criticalCoolant,
    curve: grid(coldest, hottest).map((at) => ({
      temperature_K: at,
      release_W: heat.value(at),
      removal_W: coolingCapacity(step, at),
    })),
  };
}

/**
 * The case's temperatures.
 *
 * @param step at the estimates
 * @param mtsr K
 * @param td24 K
 */
export function temperatureFindings(
  step: Step,
  mtsr: number | null,
  td24: number | null,
): Findings["temperatures"] {
  return {
    process_K: step.reaction.temperature,
    mtsr_K: mtsr,
    mtt_K: step.limits.maximumTechnicalTemperature,
    td24_K: td24,
    allAtOnce_K: allAtOnceTemperature(step, step.reaction.temperature),
  };
}
