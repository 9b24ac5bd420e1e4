import type { Study } from "./study.js";

/** One condition on the process temperature. A criterion is one file of the folder criteria. */
export interface Criterion {
  readonly key: string;
  /** the name of its lane, a few plain words */
  readonly label: string;
  /** takes part in the intersection; an advisory one has its lane and its caution only */
  readonly binding: boolean;
  /** whether the step holds the data it needs */
  assessable(study: Study): boolean;
  /**
   * Positive where the criterion holds, continuous where the step is; -Infinity where it certainly fails,
   * NaN where it could not be computed (which never passes).
   */
  margin(study: Study, temperature: number): number;
  /** in words, what is asked and what there is at a temperature: "MTSR is 158.3 °C, MTT 165.0 °C" */
  account(study: Study, temperature: number): string;
}
