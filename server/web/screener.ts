import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { screen } from "../screening/screen.js";
import { renderSheet, type SheetInput } from "../sheet/render.js";
import { createPool, type Job, type Pool, type Standing } from "./pool.js";
import { rememberedFindings } from "./remembered.js";
import { type SharedWork, sharedWork } from "./sharedWork.js";

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
  /** How far the full screening of a case is; null where none is under way. */
  standing(digest: string): Standing | null;
  sheet(input: SheetInput, signal?: AbortSignal): Promise<Buffer>;
  /** pieces of work in the threads and before them */
  load: Pool["load"];
  /** Settles once a thread has answered; a question like any other piece of work, it waits its turn. */
  responds(): Promise<void>;
  /** Gives up what is still running. */
  close(): Promise<void>;
}

/** Screens in the calling thread. */
export function directScreener(): Screener {
  const lately = rememberedFindings();
  return {
    screen: async ({ model, digest, depth }) =>
      depth === "quick" ? screen(model, { digest, depth }) : lately.keep(screen(model, { digest, depth })),
    known: lately.find,
    standing: () => null,
    sheet: renderSheet,
    load: () => ({ running: 0, waiting: 0 }),
    responds: async () => undefined,
    close: async () => undefined,
  };
}

/** Pieces of work that may wait: a little over what sixty people ask for at once. */
const longestQueue = 64;

/** Two, so that one long screening holds up nobody; more than four would cost more memory than a small server has. */
const threads = Math.min(4, Math.max(2, availableParallelism() - 1));

export interface ThreadOptions {
  /** the built file of `screeningWorker.ts` */
  readonly worker?: string;
  /** the longest that one screening, or one sheet, may take, s */
  readonly ceiling_s?: number;
  /** told of a thread that broke while it had nothing to do */
  readonly onTrouble?: (error: unknown) => void;
}

/**
 * Full screenings and sheets are made in worker threads, so that pages are served meanwhile; quick screenings take
 * less than handing them over. Those who ask for the same case at the same time wait for one screening.
 */
export function threadedScreener({
  worker = fileURLToPath(new URL("./screeningWorker.js", import.meta.url)),
  ceiling_s = 30,
  onTrouble = () => undefined,
}: ThreadOptions = {}): Screener {
  const pool = createPool({ worker, threads, longestQueue, ceiling_s, onTrouble });
  const lately = rememberedFindings();
  const quickly = rememberedFindings();
  const underWay = new Map<string, { readonly job: Job<Findings>; readonly work: SharedWork<Findings> }>();

  function begin(order: ScreeningOrder) {
    const { digest } = order;
    const stop = new AbortController();
    const job = pool.run<Findings>("screenCase", order, stop.signal);
    const result = job.result.then(lately.keep).finally(() => {
      if (underWay.get(digest)?.job === job) underWay.delete(digest);
    });
    const begun = { job, work: sharedWork(result, (reason) => stop.abort(reason)) };
    underWay.set(digest, begun);
    return begun;
  }

  return {
    async screen(order, signal) {
      const { model, digest, depth } = order;
      if (depth === "quick") return quickly.find(digest) ?? quickly.keep(screen(model, { digest, depth }));
      const known = lately.find(digest);
      if (known !== null) return known;
      const already = underWay.get(digest);
      const { work } = already === undefined || already.work.isGivenUp() ? begin(order) : already;
      return work.join(signal);
    },
    known: lately.find,
    standing: (digest) => underWay.get(digest)?.job.standing() ?? null,
    sheet: async (input, signal = new AbortController().signal) =>
      Buffer.from(await pool.run<Uint8Array>("drawSheet", input, signal).result),
    load: pool.load,
    responds: async () => pool.run<void>("respond", null, new AbortController().signal).result,
    close: pool.close,
  };
}
