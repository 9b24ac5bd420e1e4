import { effectiveUa } from "../../thermal/cooling.js";
import { freezeHeat } from "../../thermal/frozenHeat.js";
import { numberText } from "../../words/numbers.js";
import type { Criterion } from "../criterion.js";
import type { Study } from "../study.js";

function ratio(study: Study, temperature: number): number {
  const { rate } = study.step.reaction;
  const figures = study.isothermal.figuresAt(temperature);
  if (rate === null || figures === null) return Number.NaN;
  return freezeHeat(study.step, rate, temperature, figures).slope(temperature) / effectiveUa(study.step);
}

/**
 * With a constant coolant the vessel steadies itself: d qnet/dT < UAe (Semenov slope; van Heerden 1953).
 * Advisory: a controlled vessel may run above it on its controller alone.
 */
export const stability: Criterion = {
  key: "stability",
  label: "steadies itself",
  binding: false,
  assessable: (study) => study.step.reaction.rate !== null,
  margin: (study, temperature) => 1 - ratio(study, temperature),
  account: (study, temperature) =>
    `the stability ratio is ${numberText(ratio(study, temperature))}, below 1 the vessel steadies itself`,
};
