import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { differenceText, durationText, numberText, percentText, temperatureText } from "../words/numbers.js";
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
        "MTSR = T + max over the feed of n_acc(t) (−ΔHr)/C(t), n_acc = min(nA, nB/ν); batch: T + ΔTad",
      numbers: `largest accumulation ${percentText(maximumFraction, "up")} of n_lim, ${durationText(at_s, "nearest")} after the start${measured === null ? "" : " (measured)"}; T = ${temperatureText(process)}: MTSR = ${temperatureText(mtsr, "up")}`,
      reference: `${gygax}. Assumes that the feed stops with the cooling.`,
    });
  }
  if (allAtOnce !== null) {
    methods.push({
      title: "All at once",
      equation: "T_all = [m₀ cp₀ T + m_feed cp_feed T_feed + n_lim (−ΔHr)]/C(end)",
      numbers: `${temperatureText(allAtOnce, "up")}`,
      reference: "Heat balance; a bound where a failure lets the feed run on",
    });
  }
  const decomposition = model.decomposition;
  if (decomposition !== null && findings.heat.decompositionRise_K !== null) {
    methods.push({
      title: "Adiabatic rise of the decomposition",
      equation: "ΔTad,d = Q/c, c = C(end)/m(end)",
      numbers: `Q = ${numberText(decomposition.heat.value / 1000, 4)} kJ/kg, C(end) = ${capacityText(model)}, m(end) = ${massText(model)}: ΔTad,d = ${differenceText(findings.heat.decompositionRise_K, "up")}`,
      reference: gygax,
    });
  }
  return methods;
}

function rise(model: CaseModel, findings: Findings): Method {
  const { a, b, heat } = model.reaction;
  const limiting =
    b === null
      ? `${numberText(a.amount.value, 4)} mol`
      : `min(${numberText(a.amount.value, 4)}, ${numberText(b.amount.value, 4)}/${numberText(b.perA.value)}) mol`;
  return {
    title: "Adiabatic rise of the reaction",
    equation: "ΔTad = n_lim (−ΔHr)/C(end), n_lim = min(nA, nB/ν), C(end) = m₀ cp₀ + m_feed cp_feed",
    numbers: `n_lim = ${limiting}, −ΔHr = ${numberText(-heat.value / 1000, 4)} kJ/mol, C(end) = ${capacityText(model)}: ΔTad = ${differenceText(findings.heat.adiabaticRise_K, "up")}`,
    reference: gygax,
  };
}

function capacityText({ mixture, reaction }: CaseModel): string {
  const part = (mass: number, heatCapacity: number) =>
    `${numberText(mass, 4)} kg × ${numberText(heatCapacity / 1000, 4)} kJ/(kg K)`;
  const own = part(mixture.mass.value, mixture.heatCapacity.value);
  const feed = reaction.feed;
  return feed === null ? own : `${own} + ${part(feed.mass.value, feed.heatCapacity.value)}`;
}

function massText({ mixture, reaction }: CaseModel): string {
  const own = `${numberText(mixture.mass.value, 4)} kg`;
  return reaction.feed === null ? own : `${own} + ${numberText(reaction.feed.mass.value, 4)} kg`;
}
