import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import express from "express";
import request from "supertest";
import { describe, expect, onTestFinished, test } from "vitest";
import { folderStorage, type Storage } from "../../server/files/storage.js";
import { health, readiness } from "../../server/web/health.js";
import { threadedScreener } from "../../server/web/screener.js";
import { built } from "../build.js";
import { memoryStorage } from "../files/memoryStorage.js";

const idle = { load: () => ({ running: 0, waiting: 0 }), responds: async () => undefined };

async function ask(storage: Storage, screener: Parameters<typeof readiness>[1] = idle) {
  const app = express();
  app.use(health(readiness(storage, screener)));
  await request(app).get("/health").expect(200, { alive: true });
  const { status, body } = await request(app).get("/ready");
  return { status, ...body };
}

describe("readiness", () => {
  test("a folder that can be written and threads that answer are ready, and nothing is left behind", async () => {
    const folder = await mkdtemp(join(tmpdir(), "ready-"));
    const screener = threadedScreener({ worker: built("server/web/screeningWorker.ts") });
    onTestFinished(async () => {
      await screener.close();
      await rm(folder, { recursive: true });
    });
    const storage = folderStorage(folder);
    expect(await ask(storage, screener)).toEqual({
      status: 200,
      ready: true,
      storage: true,
      screenings: true,
    });
    expect(await storage.list("probe")).toEqual([]);
  });

  test("a folder that cannot be written is not, though the server is alive", async () => {
    const folder = await mkdtemp(join(tmpdir(), "ready-"));
    onTestFinished(() => rm(folder, { recursive: true }));
    await writeFile(join(folder, "file"), "no folder");
    const answer = await ask(folderStorage(join(folder, "file")));
    expect(answer).toEqual({ status: 503, ready: false, storage: false, screenings: true });
  });

  test("threads that do not start, or that are closed, are not", async () => {
    const broken = threadedScreener({ worker: join(tmpdir(), "no-such-worker.js") });
    expect(await ask(memoryStorage(), broken)).toMatchObject({ status: 503, screenings: false });
    await broken.close();
    const closed = threadedScreener({ worker: built("server/web/screeningWorker.ts") });
    await closed.close();
    expect(await ask(memoryStorage(), closed)).toMatchObject({ status: 503, screenings: false });
  });

  test("threads that are busy are ready, and are not asked", async () => {
    const busy = {
      load: () => ({ running: 2, waiting: 64 }),
      responds: () => Promise.reject(new Error("asked")),
    };
    expect(await ask(memoryStorage(), busy)).toMatchObject({ status: 200, screenings: true });
  });

  test("many who ask cause one look at the disk in two seconds", async () => {
    let now = 0;
    let writes = 0;
    const storage = memoryStorage();
    const counted: Storage = {
      ...storage,
      write: (path, content) => {
        writes += 1;
        return storage.write(path, content);
      },
    };
    const ready = readiness(counted, idle, () => now);
    await Promise.all(Array.from({ length: 100 }, ready));
    expect(writes).toBe(1);
    now += 2001;
    await ready();
    expect(writes).toBe(2);
  });
});
