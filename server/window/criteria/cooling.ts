import { coolingCapacity } from "../../thermal/cooling.js";
import { percentText, powerText } from "../../words/numbers.js";
import type { Criterion } from "../criterion.js";

/** The largest heat to be removed is at most the allowed part of the full cooling capacity. */
export const cooling: Criterion = {
  key: "cooling",
  label: "cooling suffices",
  binding: true,
  assessable: (study) => study.step.reaction.rate !== null,
  margin(study, temperature) {
    const capacity = coolingCapacity(study.step, temperature);
    const spare = study.step.limits.coolingUse * capacity - study.dutyAt(temperature);
    // Without a capacity nothing is cooled, even where nothing has to be.
    return capacity > 0 ? spare : Math.min(spare, capacity, -1e-9);
  },
  account(study, temperature) {
    const use = percentText(study.step.limits.coolingUse, "down");
    const capacity = powerText(coolingCapacity(study.step, temperature), "down");
    return `the duty is ${powerText(study.dutyAt(temperature), "up")}, ${use} of ${capacity} may be used`;
  },
};
