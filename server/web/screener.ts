import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { screen } from "../screening/screen.js";
import { renderSheet, type SheetInput } from "../sheet/render.js";
import { fullest } from "./fullest.js";

/** What a screening is asked for. */
export interface ScreeningOrder {
  readonly model: CaseModel;
  readonly digest: string;
  readonly depth: "quick" | "full";
}

/** Screens cases and draws sheets, away from the thread that serves pages where that takes long. */
export interface Screener {
  /** @param signal gives up the work when nobody waits for it any more */
  screen(order: ScreeningOrder, signal?: AbortSignal): Promise<Findings>;
  /** The full findings of a case that was screened lately; null where it was not. */
  known(digest: string): Findings | null;
  sheet(input: SheetInput, signal?: AbortSignal): Promise<Buffer>;
  /** Gives up what is still running. */
  close(): Promise<void>;
}

/** Screens in the calling thread. */
export function directScreener(): Screener {
  const lately = fullest();
  return {
    screen: async ({ model, digest, depth }) =>
      depth === "quick" ? screen(model, { digest, depth }) : lately.keep(screen(model, { digest, depth })),
    known: lately.find,
    sheet: renderSheet,
    close: async () => undefined,
  };
}

/** Thrown where more work waits than can be done in sensible time. */
export class Overloaded extends Error {
  readonly status = 503;
}

/** More than this many at once are refused rather than kept waiting. */
const longestQueue = 40;

/**
 * Full screenings and sheets are made in worker threads, so that pages are served meanwhile;
 * quick screenings take less than handing them over.
 *
 * @param worker the built file of `screeningWorker.ts`
 */
export function threadedScreener(
  worker: string = fileURLToPath(new URL("./screeningWorker.js", import.meta.url)),
): Screener {
  const pool = new Piscina({
    filename: worker,
    minThreads: 1,
    maxThreads: Math.max(2, availableParallelism() - 1),
    maxQueue: longestQueue,
    idleTimeout: 60_000,
  });
  const lately = fullest();

  async function inThread<Result>(name: "screenCase" | "drawSheet", task: unknown, signal?: AbortSignal) {
    if (pool.queueSize >= longestQueue) throw new Overloaded("Too many screenings are under way.");
    const result: Result = await pool.run(task, signal === undefined ? { name } : { name, signal });
    return result;
  }

  return {
    async screen(order, signal) {
      const { model, digest, depth } = order;
      if (depth === "quick") return screen(model, { digest, depth });
      return lately.find(digest) ?? lately.keep(await inThread<Findings>("screenCase", order, signal));
    },
    known: lately.find,
    sheet: async (input, signal) => Buffer.from(await inThread<Uint8Array>("drawSheet", input, signal)),
    close: () => pool.destroy(),
  };
}
