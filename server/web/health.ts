import { Router } from "express";
import type { Storage } from "../files/storage.js";
import type { Screener } from "./screener.js";

/** What the server needs to do its work, each with whether it is there. */
export interface Readiness {
  /** a file can be written */
  readonly storage: boolean;
  /** screenings are done */
  readonly screenings: boolean;
}

/** For whatever watches over the server: it lives, it can work. Says nothing of what it holds, so it asks for no password. */
export function health(ready: () => Promise<Readiness>): Router {
  const router = Router();
  router.use(["/health", "/ready"], (_request, response, next) => {
    response.set("Cache-Control", "no-store");
    next();
  });
  router.get("/health", (_request, response) => {
    response.json({ alive: true });
  });
  router.get("/ready", async (_request, response) => {
    const { storage, screenings } = await ready();
    const all = storage && screenings;
    response.status(all ? 200 : 503).json({ ready: all, storage, screenings });
  });
  return router;
}

const patience_ms = 3000;

/** Anyone may ask; the disk is not written more often for it. */
const lasts_ms = 2000;

/**
 * Finds out whether the server can work. An answer holds for a moment, and those who ask meanwhile share it.
 *
 * @param now ms; tests bring their own
 */
export function readiness(
  storage: Storage,
  screener: Pick<Screener, "load" | "responds">,
  now = () => performance.now(),
): () => Promise<Readiness> {
  let lately: Promise<Readiness> | null = null;
  let askedAt = 0;

  async function look(): Promise<Readiness> {
    const [writes, screens] = await Promise.all([
      soon(writesTo(storage)),
      // Threads that are busy work; a question would only wait behind the rest.
      screener.load().running > 0 || soon(screener.responds()),
    ]);
    return { storage: writes, screenings: screens };
  }

  return () => {
    if (lately === null || now() - askedAt > lasts_ms) {
      askedAt = now();
      lately = look();
    }
    return lately;
  };
}

async function writesTo(storage: Storage): Promise<void> {
  const path = `probe/${process.pid}.txt`;
  await storage.write(path, "This file shows that the folder can be written; it may be removed.\n");
  await storage.remove(path);
}

/** Whether a step succeeds within a few seconds. */
async function soon(step: Promise<unknown>): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<boolean>((resolve) => {
    timer = setTimeout(() => resolve(false), patience_ms);
  });
  const done = step.then(
    () => true,
    () => false,
  );
  return Promise.race([done, late]).finally(() => clearTimeout(timer));
}
