import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { screen } from "../screening/screen.js";

/** What a screening is asked for. */
export interface ScreeningOrder {
  readonly model: CaseModel;
  readonly digest: string;
  readonly depth: "quick" | "full";
}

/** Screens a case, away from the thread that serves pages where that takes long. */
export interface Screener {
  screen(order: ScreeningOrder): Promise<Findings>;
  /** Gives up what is still running. */
  close(): Promise<void>;
}

/** Screens in the calling thread. */
export const directScreener: Screener = {
  screen: async ({ model, digest, depth }) => screen(model, { digest, depth }),
  close: async () => undefined,
};

/**
 * Full screenings run in worker threads, so that a page is served meanwhile; quick ones take
 * milliseconds, less than handing them over.
 *
 * @param worker the built file of `screeningWorker.ts`
 */
export function threadedScreener(
  worker: string = fileURLToPath(new URL("./screeningWorker.js", import.meta.url)),
): Screener {
  const pool = new Piscina<ScreeningOrder, Findings>({
    filename: worker,
    minThreads: 1,
    maxThreads: Math.max(1, availableParallelism() - 1),
    idleTimeout: 60_000,
  });
  return {
    screen: (order) => (order.depth === "quick" ? directScreener.screen(order) : pool.run(order)),
    close: () => pool.destroy(),
  };
}
