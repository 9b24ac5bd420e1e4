import { carefulTimeToMaximumRate } from "../../thermal/history.js";
import { durationText } from "../../words/numbers.js";
import type { Criterion } from "../criterion.js";
import type { Study } from "../study.js";

function time(study: Study, temperature: number): number {
  if (study.runaway === null) return Number.NaN;
  return carefulTimeToMaximumRate(study.runaway, temperature, study.heldAt(temperature), study.accuracy);
}

/** TMRad from the process temperature itself is at least the minimum, the hold's history included. */
export const hold: Criterion = {
  key: "hold",
  label: "TMRad from Tp",
  binding: true,
  assessable: (study) => study.runaway !== null,
  margin: (study, temperature) =>
    Math.log(time(study, temperature) / study.step.limits.minimumTimeToMaximumRate),
  account(study, temperature) {
    const asked = durationText(study.step.limits.minimumTimeToMaximumRate, "up");
    return `TMRad from the process temperature is ${durationText(time(study, temperature))}, ${asked} are asked for`;
  },
};
