import type { Logger } from "pino";
import type { CaseStore } from "../files/cases.js";
import type { DemoCase } from "../files/demos.js";
import type { Register } from "../files/register.js";
import type { Readiness } from "./health.js";
import type { LongScreenings } from "./longScreenings.js";
import type { Screener } from "./screener.js";

/** What the web pages stand on and tests may replace. */
export interface Services {
  readonly cases: CaseStore;
  readonly demos: readonly DemoCase[];
  readonly register: Register;
  readonly screener: Screener;
  readonly screenings: LongScreenings;
  readonly ready: () => Promise<Readiness>;
  readonly log: Logger;
}
