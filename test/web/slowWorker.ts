import type { Findings } from "../../server/screening/findings.js";
import { screen } from "../../server/screening/screen.js";
import type { Order } from "../../server/web/pool.js";
import { reportTo } from "../../server/web/poolControl.js";
import type { ScreeningOrder } from "../../server/web/screener.js";

export { drawSheet } from "../../server/web/screeningWorker.js";

const each_ms = 250;

/** Screens the case with its first failure, after a time that the number of its failures sets on any machine. */
export function screenCase({ task: { model, digest }, control }: Order<ScreeningOrder>): Findings {
  const report = reportTo(control);
  const whole_ms = each_ms * model.failures.length;
  const start = performance.now();
  for (let spent = 0; spent < whole_ms; spent = performance.now() - start) report(spent / whole_ms);
  return screen({ ...model, failures: model.failures.slice(0, 1) }, { digest, depth: "full" });
}
