import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { differenceText, temperatureText } from "../words/numbers.js";
import { typeable, worked } from "./worked.js";

/** Heat capacity of the contents once `part` of the feed is in, J/K. */
export function capacityAfter({ mixture, reaction: { feed } }: CaseModel, part: number): number {
  const own = mixture.mass.value * mixture.heatCapacity.value;
  return feed === null ? own : own + part * feed.mass.value * feed.heatCapacity.value;
}

function limitingAmount({ reaction: { a, b } }: CaseModel): number {
  return b === null ? a.amount.value : Math.min(a.amount.value, b.amount.value / b.perA.value);
}

/** Limiting amount, heat capacity at the end and the adiabatic rise that they give. */
export function workedRise(model: CaseModel, { heat }: Findings): readonly string[] {
  const { a, b } = model.reaction;
  const limiting = limitingAmount(model);
  const amounts =
    b === null
      ? []
      : [
          worked(
            "n_{lim} = min(n_{A}, n_{B}/ν)",
            { "n_{A}": a.amount.value, "n_{B}": b.amount.value, ν: b.perA.value },
            `${typeable(limiting)} mol`,
          ),
        ];
  const values = {
    "n_{lim}": limiting,
    "(−ΔH_{r})": -model.reaction.heat.value,
    "C(end)": capacityAfter(model, 1),
  };
  return [
    ...amounts,
    workedCapacity(model, "C(end)", 1),
    worked("ΔT_{ad} = n_{lim} (−ΔH_{r})/C(end)", values, differenceText(heat.adiabaticRise_K, "up")),
  ];
}

/** C(t) = m0 cp0 + what has been fed, with its heat capacity. */
function workedCapacity(model: CaseModel, name: string, part: number): string {
  const { mixture, reaction } = model;
  const { feed } = reaction;
  const own = { "m_{0}": mixture.mass.value, "c_{p,0}": mixture.heatCapacity.value };
  const result = `${typeable(capacityAfter(model, part))} J/K`;
  if (feed === null) return worked(`${name} = m_{0} c_{p,0}`, own, result);
  const fed = { "m_{feed}": part * feed.mass.value, "c_{p,feed}": feed.heatCapacity.value };
  return worked(`${name} = m_{0} c_{p,0} + m_{feed} c_{p,feed}`, { ...own, ...fed }, result);
}

/** MTSR at the moment of the feed that gives the highest; batch: with everything in. */
export function workedMtsr(model: CaseModel, { temperatures, accumulation, heat }: Findings): string[] {
  const { mtsr_K: mtsr, process_K: T } = temperatures;
  if (mtsr === null || accumulation === null) return [];
  const result = `${differenceText(mtsr, "up", 2)} = ${temperatureText(mtsr, "up")}`;
  const { feed, heat: perMol } = model.reaction;
  if (feed === null) {
    return [worked("MTSR = T + ΔT_{ad}", { T, "ΔT_{ad}": heat.adiabaticRise_K }, result)];
  }
  const { curve } =
    accumulation.usedFor === "measured" && accumulation.measured !== null
      ? accumulation.measured
      : accumulation;
  const [first, ...rest] = curve;
  if (first === undefined) return [];
  const worst = rest.reduce((highest, each) => (each.mtsr_K > highest.mtsr_K ? each : highest), first);
  const part = Math.min(1, worst.time_s / feed.duration.value);
  const held = worst.accumulated * limitingAmount(model);
  const values = { T, "n_{acc}": held, "(−ΔH_{r})": -perMol.value, "C(t)": capacityAfter(model, part) };
  return [workedCapacity(model, "C(t)", part), worked("MTSR = T + n_{acc} (−ΔH_{r})/C(t)", values, result)];
}

/** The bound on the temperature if the whole recipe met at once. */
export function workedAllAtOnce(model: CaseModel, process: number, found: number): string {
  const { mixture, reaction } = model;
  const { feed } = reaction;
  const result = `${differenceText(found, "up", 2)} = ${temperatureText(found, "up")}`;
  const own = {
    "m_{0}": mixture.mass.value,
    "c_{p,0}": mixture.heatCapacity.value,
    T: process,
    "n_{lim}": limitingAmount(model),
    "(−ΔH_{r})": -reaction.heat.value,
    "C(end)": capacityAfter(model, 1),
  };
  if (feed === null) {
    return worked("T_{all} = [m_{0} c_{p,0} T + n_{lim} (−ΔH_{r})]/C(end)", own, result);
  }
  const fed = {
    "m_{feed}": feed.mass.value,
    "c_{p,feed}": feed.heatCapacity.value,
    "T_{feed}": feed.temperature.value,
  };
  return worked(
    "T_{all} = [m_{0} c_{p,0} T + m_{feed} c_{p,feed} T_{feed} + n_{lim} (−ΔH_{r})]/C(end)",
    { ...own, ...fed },
    result,
  );
}
