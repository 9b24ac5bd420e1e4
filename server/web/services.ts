import type { Logger } from "pino";
import type { CaseStore } from "../files/cases.js";
import type { DemoCase } from "../files/demos.js";
import type { Screener } from "./screener.js";

/** What the web pages stand on and tests may replace. */
export interface Services {
  readonly cases: CaseStore;
  readonly demos: readonly DemoCase[];
  readonly screener: Screener;
  readonly log: Logger;
}
