import { durationText, percentText } from "../../words/numbers.js";
import type { Criterion } from "../criterion.js";

/** The target conversion is reached at constant temperature within the available time. */
export const completion: Criterion = {
  key: "completion",
  label: "done in time",
  binding: true,
  assessable: (study) => study.step.reaction.rate !== null,
  margin: (study, temperature) =>
    Math.log(study.step.limits.availableTime / study.isothermal.completionAt(temperature)),
  account(study, temperature) {
    const { targetConversion, availableTime } = study.step.limits;
    const needed = study.isothermal.completionAt(temperature);
    const asked = `${durationText(availableTime)} are available`;
    return Number.isFinite(needed)
      ? `${percentText(targetConversion)} conversion takes ${durationText(needed, "up")}, ${asked}`
      : `${percentText(targetConversion)} conversion is never reached, ${asked}`;
  },
};
