import { temperatureText } from "../../words/numbers.js";
import type { Criterion } from "../criterion.js";

/** MTSR stays below the maximum temperature for technical reasons. */
export const mtsrMtt: Criterion = {
  key: "mtsr-mtt",
  label: "MTSR below MTT",
  binding: true,
  assessable: (study) => study.step.reaction.rate !== null,
  margin: (study, temperature) =>
    study.step.limits.maximumTechnicalTemperature - (study.mtsrAt(temperature) ?? Number.NaN),
  account(study, temperature) {
    const mtsr = study.mtsrAt(temperature) ?? Number.NaN;
    const mtt = study.step.limits.maximumTechnicalTemperature;
    return `MTSR is ${temperatureText(mtsr, "up")}, MTT ${temperatureText(mtt, "down")}`;
  },
};
