import type { Caution, CautionLevel } from "../findings.js";

/**
 * Every caution that the program knows, with its level. stop: the result must not be used as it is.
 * warn: a reviewer must decide. note: worth knowing. EXTRAPOLATED alone has two: a note within 10 K.
 */
export const levels = {
  PROCESS_ABOVE_LIMIT: "stop",
  CANNOT_HOLD: "stop",
  WINDOW_EMPTY: "stop",
  OUTSIDE_WINDOW: "stop",
  ACT_TOO_LATE: "stop",
  ACT_UNSURE: "warn",
  CLASS_5: "warn",
  CLASS_4: "warn",
  CLASS_3: "warn",
  OUTSIDE_CAUTIOUS_SIDE: "warn",
  NOT_ASSESSED: "warn",
  NOT_COMPUTED: "warn",
  EXTRAPOLATED: "warn",
  NO_RANGE: "warn",
  NO_ERRORS: "warn",
  CORRELATION_DOUBTFUL: "warn",
  LARGE_ERROR: "warn",
  ERRORS_UNUSED: "warn",
  FORMS_PART: "warn",
  BARRIER_ODD: "warn",
  ENTROPY_ODD: "note",
  DIFFUSION_LIMIT: "warn",
  CURVED_FIT: "warn",
  CLOSED_FORM_UNSAFE: "warn",
  NO_ACCELERATION: "note",
  HISTORY: "warn",
  INERTIA: "warn",
  COOLANT_HEATS: "warn",
  UNSTABLE: "warn",
  MEASURED_ACCUMULATION: "warn",
  MIXING_LOST: "warn",
  FEED_RUNS_ON: "warn",
  BEYOND_MODEL: "warn",
  LATE_FAILURE: "warn",
  WARM_QUENCH: "warn",
  INPUT_MOVED: "warn",
  OUTSIDE_HELPER_RANGE: "warn",
  NO_BAND: "note",
  ASSUMED_INPUT: "note",
  PRESSURE: "note",
} as const satisfies Readonly<Record<string, CautionLevel>>;

export type CautionCode = keyof typeof levels;

/**
 * Raises a caution.
 *
 * @param code of the catalogue
 * @param about JSON pointer into the case; "" for the case as a whole
 * @param text a plain sentence with its numbers
 * @param level where it is milder than the catalogue's
 */
export function caution(
  code: CautionCode,
  about: string,
  text: string,
  level: CautionLevel = levels[code],
): Caution {
  return { code, level, text, about };
}

const rank: Readonly<Record<CautionLevel, number>> = { stop: 0, warn: 1, note: 2 };

/**
 * Cautions as a reader wants them: stops first, then warnings, then notes, each in the order raised.
 *
 * @param cautions as raised
 */
export function byLevel(cautions: readonly Caution[]): Caution[] {
  return [...cautions].sort((a, b) => rank[a.level] - rank[b.level]);
}
