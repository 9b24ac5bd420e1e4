import type { Findings } from "../screening/findings.js";

/** What a part of the findings holds. */
const meanings: Readonly<Record<keyof Findings, string>> = {
  format: "name and version of this shape; fields may be added to it, none is renamed",
  notice: "what whoever shows these findings has to show with them",
  program: "name and version of the program",
  digest: "SHA-256 of the case in canonical JSON (RFC 8785)",
  rate: "rate constant of the reaction at Tp and over the window, both forms, the fit",
  decompositionRate: "the same of the decomposition",
  heat: "adiabatic rises and their severity",
  accumulation: "the largest, its time and its course over the feed, computed and measured",
  temperatures: "Tp, MTSR, MTT, T_D24, and the bound with everything at once",
  timeToMaximumRate: "TMRad from Tp and from MTSR, the closed form, the likelihood",
  criticality: "class 1 to 5 or none, and how probable each is",
  cooling: "duty, capacity, use, stability, no return, critical coolant temperature",
  window: "its ends, what sets them, the cautious side, and each criterion",
  failures:
    "each failure: peak, times, verdict, time to act and what draws say of it, alarm temperature, trace",
  uncertainty: "percentiles from the draws and what drives them",
  workings: "how fields were worked out from other figures",
  cautions: "code, level (stop, warn, note), sentence, and the field it is about",
};

export interface AnswerPart {
  readonly key: string;
  readonly meaning: string;
}

/** The parts of an answer, in its own order. */
export const answerParts: readonly AnswerPart[] = Object.entries(meanings).map(([key, meaning]) => ({
  key,
  meaning,
}));

/** What each status means to a caller. */
export const statuses: readonly { readonly status: string; readonly meaning: string }[] = [
  { status: "200", meaning: "findings, a sheet or the schema; findings that hold a stop are an answer too" },
  { status: "400", meaning: "the body is not JSON, or a parameter is unknown" },
  { status: "401", meaning: "this server has an access password: send it by HTTP Basic, with any user name" },
  { status: "405", meaning: "another method is asked for; Allow names it" },
  { status: "413", meaning: "the case is larger than 256 KiB" },
  { status: "415", meaning: "the body is not sent as application/json" },
  { status: "422", meaning: "the case has faults: each with its JSON pointer and what would do" },
  { status: "429", meaning: "too many requests from one address; Retry-After says how long to wait" },
  { status: "503", meaning: "too many screenings are under way, or one took too long" },
];
