import { randomUUID } from "node:crypto";
import type { Logger } from "pino";
import type { Findings } from "../screening/findings.js";
import type { CaseToShow } from "./casePage.js";
import type { Standing } from "./pool.js";
import type { Screener, ScreeningOrder } from "./screener.js";
import { Unavailable } from "./unavailable.js";

/** Where a full screening stands, or how it ended. */
export type Course =
  | { readonly kind: "running" }
  | { readonly kind: "done"; readonly findings: Findings }
  /** by its button, or because nobody looked after it any more */
  | { readonly kind: "cancelled" }
  | { readonly kind: "failed"; readonly error: unknown };

/** What a page asked for: the case with its findings, and perhaps a file of it. */
export interface Wish {
  readonly shown: CaseToShow;
  readonly file: "sheet" | "findings" | null;
}

/** A full screening that may outlast the request that asked for it. */
export interface LongScreening {
  readonly id: string;
  /** null where only the result of what is being typed was asked for */
  readonly wish: Wish | null;
  course(): Course;
  standing(): Standing;
  cancel(): void;
  /** Waits for its end, but not longer. */
  within(time_ms: number): Promise<Course>;
  /** Says that someone looks after it now. A screening that is kept and that nobody looks after is cancelled. */
  look(): void;
  /** Says that someone looks after it until the function that is returned is called. */
  watch(): () => void;
}

export interface LongScreenings {
  /** @param wish null where only the result of what is being typed is wanted */
  begin(order: ScreeningOrder, wish: Wish | null): LongScreening;
  /** Keeps a screening, so that it can be found again. */
  keep(screening: LongScreening): void;
  find(id: string): LongScreening | null;
}

/** Screenings that are kept; the oldest are dropped. */
const kept = 100;

/**
 * Full screenings by their identifiers.
 *
 * @param log told of those that fail by a defect
 * @param patience_ms a screening that nobody looks after for so long is cancelled
 */
export function longScreenings(screener: Screener, log: Logger, patience_ms = 8000): LongScreenings {
  const all = new Map<string, LongScreening>();

  function begin(order: ScreeningOrder, wish: Wish | null): LongScreening {
    const stop = new AbortController();
    let course: Course = { kind: "running" };
    let watchers = 0;
    let patience: NodeJS.Timeout | undefined;
    const ended = screener.screen(order, stop.signal).then(
      (findings) => settle({ kind: "done", findings }),
      (error: unknown) => {
        if (stop.signal.aborted) return settle({ kind: "cancelled" });
        if (!(error instanceof Unavailable)) log.error({ err: error });
        settle({ kind: "failed", error });
      },
    );

    function settle(end: Course): void {
      clearTimeout(patience);
      course = end;
    }

    function look(): void {
      clearTimeout(patience);
      if (watchers > 0 || course.kind !== "running") return;
      patience = setTimeout(() => stop.abort(), patience_ms).unref();
    }

    return {
      id: randomUUID(),
      wish,
      course: () => course,
      standing: () => screener.standing(order.digest) ?? { before: null, fraction: 0 },
      cancel: () => stop.abort(),
      async within(time_ms) {
        let timer: NodeJS.Timeout | undefined;
        const late = new Promise<void>((resolve) => {
          timer = setTimeout(resolve, time_ms);
        });
        await Promise.race([ended, late]);
        clearTimeout(timer);
        return course;
      },
      look,
      watch() {
        watchers += 1;
        look();
        return () => {
          watchers -= 1;
          look();
        };
      },
    };
  }

  return {
    begin,
    keep(screening) {
      all.set(screening.id, screening);
      screening.look();
      for (const [id, oldest] of all) {
        if (all.size <= kept) break;
        oldest.cancel();
        all.delete(id);
      }
    },
    find: (id) => all.get(id) ?? null,
  };
}
