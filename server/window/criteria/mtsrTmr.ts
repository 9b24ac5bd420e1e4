import { carefulTimeToMaximumRate } from "../../thermal/history.js";
import { durationText } from "../../words/numbers.js";
import type { Criterion } from "../criterion.js";
import type { Study } from "../study.js";

function time(study: Study, temperature: number): number {
  const mtsr = study.mtsrAt(temperature);
  if (mtsr === null || study.runaway === null) return Number.NaN;
  return carefulTimeToMaximumRate(study.runaway, mtsr, study.heldAt(temperature), study.accuracy);
}

/** TMRad from MTSR is at least the minimum, with what the hold at the process temperature has left behind. */
export const mtsrTmr: Criterion = {
  key: "mtsr-tmr",
  label: "TMRad from MTSR",
  binding: true,
  assessable: (study) => study.step.reaction.rate !== null && study.runaway !== null,
  margin: (study, temperature) =>
    Math.log(time(study, temperature) / study.step.limits.minimumTimeToMaximumRate),
  account(study, temperature) {
    const asked = durationText(study.step.limits.minimumTimeToMaximumRate, "up");
    return `TMRad from MTSR is ${durationText(time(study, temperature))}, ${asked} are asked for`;
  },
};
