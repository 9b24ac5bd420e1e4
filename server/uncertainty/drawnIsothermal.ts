import type { Reaction, Step } from "../thermal/step.js";
import { type Isothermal, integrated } from "../window/study.js";
import { type BatchAtUnitRate, batchAtUnitRate, batchFigures } from "./batchFigures.js";
import { dosingLattice } from "./dosingLattice.js";
import { recipeForm } from "./recipeForm.js";

/**
 * The isothermal step of each draw, by the cheapest way that is exact enough. While the recipe carries no error
 * the step depends on k alone: a batch in closed form, a semibatch by a table over ln k; errors of the recipe lead
 * to tables of neighbouring recipes. Only a draw with other orders of reaction is integrated by itself.
 *
 * @param nominal the step at its estimates
 */
export function drawnIsothermal(nominal: Step): (step: Step) => Isothermal {
  if (nominal.reaction.rate === null) return integrated;
  const form = recipeForm(nominal);
  if (form !== null) {
    const tabulated = dosingLattice(nominal, form);
    return (step) => (sameOrders(step.reaction, nominal.reaction) ? tabulated(step) : integrated(step));
  }
  let unit: BatchAtUnitRate | null = null;
  return (step) => {
    if (!sameBatch(step, nominal)) return batchFigures(step, batchAtUnitRate(step));
    unit ??= batchAtUnitRate(nominal);
    return batchFigures(step, unit);
  };
}

function sameOrders(a: Reaction, b: Reaction): boolean {
  return a.orderA === b.orderA && a.b?.order === b.b?.order;
}

/** Whether two batches have the same balance at the same k: amounts, orders and volume. */
function sameBatch(one: Step, other: Step): boolean {
  const [a, b] = [one.reaction, other.reaction];
  return (
    sameOrders(a, b) &&
    one.mixture.mass === other.mixture.mass &&
    one.mixture.density === other.mixture.density &&
    a.amountA === b.amountA &&
    a.b?.amount === b.b?.amount &&
    a.b?.perA === b.b?.perA
  );
}
