import type { Step } from "../thermal/step.js";
import { type Isothermal, integrated } from "../window/study.js";
import { type BatchAtUnitRate, batchAtUnitRate, batchFigures } from "./batchFigures.js";
import { dosingTable } from "./dosingTable.js";

/**
 * The isothermal step of each draw, by the cheapest way that is exact enough. While the recipe carries no error
 * the step depends on k alone: a batch in closed form, a semibatch by a table over ln k. Else each draw is looked
 * at by itself.
 *
 * @param nominal the step at its estimates
 */
export function drawnIsothermal(nominal: Step): (step: Step) => Isothermal {
  if (nominal.reaction.rate === null) return integrated;
  if (nominal.reaction.feed === null) {
    let unit: BatchAtUnitRate | null = null;
    return (step) => {
      if (!sameRecipe(step, nominal)) return batchFigures(step, batchAtUnitRate(step));
      unit ??= batchAtUnitRate(nominal);
      return batchFigures(step, unit);
    };
  }
  const tabulated = dosingTable(nominal);
  return (step) => (sameRecipe(step, nominal) ? tabulated(step) : integrated(step));
}

/** Whether two steps have the same balance at the same k: amounts, orders, volumes and feed. */
function sameRecipe(one: Step, other: Step): boolean {
  const [a, b] = [one.reaction, other.reaction];
  return (
    one.mixture.mass === other.mixture.mass &&
    one.mixture.density === other.mixture.density &&
    a.amountA === b.amountA &&
    a.orderA === b.orderA &&
    a.b?.amount === b.b?.amount &&
    a.b?.order === b.b?.order &&
    a.b?.perA === b.b?.perA &&
    a.feed?.mass === b.feed?.mass &&
    a.feed?.density === b.feed?.density &&
    a.feed?.duration === b.feed?.duration
  );
}
