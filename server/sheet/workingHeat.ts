import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { differenceText, durationText, percentText, temperatureText } from "../words/numbers.js";
import { shortNumber } from "./shortNumber.js";
import { typeable, worked } from "./worked.js";
import { capacityAfter, workedAllAtOnce, workedMtsr, workedRise } from "./workedHeat.js";
import type { Method } from "./working.js";

const gygax = "Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008, Thermal Safety of Chemical Processes";

/** Adiabatic rises, accumulation and MTSR. */
export function heatMethods(model: CaseModel, findings: Findings): Method[] {
  const methods: Method[] = [rise(model, findings)];
  const { mtsr_K: mtsr, process_K: process, allAtOnce_K: allAtOnce } = findings.temperatures;
  const accumulation = findings.accumulation;
  if (mtsr !== null && accumulation !== null) {
    const measured = accumulation.usedFor === "measured" ? accumulation.measured : null;
    const { maximumFraction, at_s } = measured ?? accumulation;
    methods.push({
      title: "Accumulation and MTSR",
      equation:
        "MTSR = T + max over the feed of n_{acc}(t) (−ΔH_{r})/C(t), n_{acc} = min(n_{A}, n_{B}/ν); batch: T + ΔT_{ad}",
      worked: workedMtsr(model, findings),
      numbers: `largest accumulation ${percentText(maximumFraction, "up")} of n_{lim}, ${durationText(at_s, "nearest")} after the start${measured === null ? "" : " (measured)"}; T = ${temperatureText(process)}: MTSR = ${temperatureText(mtsr, "up")}`,
      reference: `${gygax}. Assumes that the feed stops with the cooling.`,
    });
  }
  if (allAtOnce !== null) {
    methods.push({
      title: "All at once",
      equation: "T_{all} = [m_{0} c_{p,0} T + m_{feed} c_{p,feed} T_{feed} + n_{lim} (−ΔH_{r})]/C(end)",
      numbers: `${temperatureText(allAtOnce, "up")}`,
      worked: [workedAllAtOnce(model, process, allAtOnce)],
      reference: "Heat balance; a bound where a failure lets the feed run on",
    });
  }
  const decomposition = model.decomposition;
  const capacity = capacityAfter(model, 1);
  const mass = model.mixture.mass.value + (model.reaction.feed?.mass.value ?? 0);
  if (decomposition !== null && findings.heat.decompositionRise_K !== null) {
    methods.push({
      title: "Adiabatic rise of the decomposition",
      equation: "ΔT_{ad,d} = Q/c, c = C(end)/m(end)",
      worked: [
        worked(
          "c = C(end)/m(end)",
          { "C(end)": capacity, "m(end)": mass },
          `${typeable(capacity / mass)} J/(kg K)`,
        ),
        worked(
          "ΔT_{ad,d} = Q/c",
          { Q: decomposition.heat.value, c: capacity / mass },
          differenceText(findings.heat.decompositionRise_K, "up"),
        ),
      ],
      numbers: `Q = ${shortNumber(decomposition.heat.value / 1000)} kJ/kg, C(end) = ${capacityText(model)}, m(end) = ${massText(model)}: ΔT_{ad,d} = ${differenceText(findings.heat.decompositionRise_K, "up")}`,
      reference: gygax,
    });
  }
  return methods;
}

function rise(model: CaseModel, findings: Findings): Method {
  const { a, b, heat } = model.reaction;
  const limiting =
    b === null
      ? `${shortNumber(a.amount.value)} mol`
      : `min(${shortNumber(a.amount.value)}, ${shortNumber(b.amount.value)}/${shortNumber(b.perA.value)}) mol`;
  return {
    title: "Adiabatic rise of the reaction",
    equation:
      "ΔT_{ad} = n_{lim} (−ΔH_{r})/C(end), n_{lim} = min(n_{A}, n_{B}/ν), C(end) = m_{0} c_{p,0} + m_{feed} c_{p,feed}",
    numbers: `n_{lim} = ${limiting}, −ΔH_{r} = ${shortNumber(-heat.value / 1000)} kJ/mol, C(end) = ${capacityText(model)}: ΔT_{ad} = ${differenceText(findings.heat.adiabaticRise_K, "up")}`,
    worked: workedRise(model, findings),
    reference: gygax,
  };
}

function capacityText({ mixture, reaction }: CaseModel): string {
  const part = (mass: number, heatCapacity: number) =>
    `${shortNumber(mass)} kg × ${shortNumber(heatCapacity / 1000)} kJ/(kg K)`;
  const own = part(mixture.mass.value, mixture.heatCapacity.value);
  const feed = reaction.feed;
  return feed === null ? own : `${own} + ${part(feed.mass.value, feed.heatCapacity.value)}`;
}

function massText({ mixture, reaction }: CaseModel): string {
  const own = `${shortNumber(mixture.mass.value)} kg`;
  return reaction.feed === null ? own : `${own} + ${shortNumber(reaction.feed.mass.value)} kg`;
}
