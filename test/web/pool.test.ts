import { setTimeout as pause } from "node:timers/promises";
import { afterEach, describe, expect, test } from "vitest";
import { createPool, type Pool } from "../../server/web/pool.js";
import { Unavailable } from "../../server/web/unavailable.js";
import { built } from "../build.js";

const worker = built("test/web/poolWorker.ts");
const forever = new AbortController().signal;

let pool: Pool;
afterEach(() => pool.close());

function opened(options: Partial<Parameters<typeof createPool>[0]> = {}): Pool {
  pool = createPool({ worker, threads: 1, longestQueue: 4, ceiling_s: 20, ...options });
  return pool;
}

function counter() {
  const turns = new SharedArrayBuffer(4);
  return { turns, taken: () => Atomics.load(new Int32Array(turns), 0) };
}

/** Waits until something holds, and fails the test where it never does. */
async function until(holds: () => boolean): Promise<void> {
  for (let i = 0; i < 500; i += 1) {
    if (holds()) return;
    await pause(20);
  }
  throw new Error(`Never came to hold: ${holds}`);
}

function echoed(): Promise<string> {
  return pool.run<string>("echo", "still here", forever).result;
}

describe("a pool of threads", () => {
  test("work that reaches the ceiling has a clear answer, and the thread does the next piece", async () => {
    const { turns, taken } = counter();
    const long = opened({ ceiling_s: 0.5 }).run("obedient", { turns, of: 1e9 }, forever);
    await expect(long.result).rejects.toThrow(/ended after 0.5 s/);
    expect(await echoed()).toBe("still here, still here");
    const after = taken();
    expect(after).toBeGreaterThan(0);
    await pause(50);
    expect(taken()).toBe(after);
  });

  test("work that does not listen is ended with its thread, and another thread does the next piece", async () => {
    const { turns, taken } = counter();
    const long = opened({ ceiling_s: 0.5 }).run("deaf", { turns }, forever);
    await expect(long.result).rejects.toBeInstanceOf(Unavailable);
    expect(await echoed()).toBe("still here, still here");
    const after = taken();
    expect(after).toBeGreaterThan(0);
    await pause(50);
    expect(taken()).toBe(after);
  });

  test.each(["dies", "breaks", "swells"])("a thread that %s costs its own work alone", async (how) => {
    const broken = opened().run(how, null, forever).result;
    await expect(broken).rejects.toThrow(/exited|defect|memory/i);
    expect(await echoed()).toBe("still here, still here");
    expect(pool.load()).toEqual({ running: 0, waiting: 0 });
  });

  test("a pool survives a crash in every thread while others wait", async () => {
    opened({ threads: 2, longestQueue: 10 });
    const crashes = Array.from({ length: 4 }, () => pool.run("dies", null, forever).result.catch(String));
    const echoes = Array.from({ length: 4 }, echoed);
    expect(await Promise.all(echoes)).toHaveLength(4);
    expect((await Promise.all(crashes)).every((each) => /exited/.test(String(each)))).toBe(true);
  });

  test("work that nobody wants any more stops, and its caller hears so at once", async () => {
    const { turns, taken } = counter();
    const gone = new AbortController();
    const long = opened().run("obedient", { turns, of: 1e9 }, gone.signal).result;
    await until(() => taken() > 10);
    const before = performance.now();
    gone.abort();
    await expect(long).rejects.toThrow(/abort/i);
    expect(performance.now() - before).toBeLessThan(100);
    await until(() => pool.load().running === 0);
    const after = taken();
    await pause(100);
    expect(taken()).toBe(after);
  });

  test("work that waits and is given up is never begun", async () => {
    const first = counter();
    const second = counter();
    const gone = new AbortController();
    opened();
    const long = pool.run("obedient", { turns: first.turns, of: 200 }, forever).result;
    const waiting = pool.run("obedient", { turns: second.turns, of: 200 }, gone.signal).result;
    gone.abort();
    await expect(waiting).rejects.toThrow(/abort/i);
    expect(await long).toBe("done");
    expect(await echoed()).toBe("still here, still here");
    expect(first.taken()).toBe(200);
    expect(second.taken()).toBe(0);
  });

  test("what waits is done in the order in which it came, and knows its place", async () => {
    const { turns } = counter();
    opened();
    const order: number[] = [];
    const jobs = [0, 1, 2, 3].map((i) => {
      const job = pool.run("obedient", { turns, of: 20 }, forever);
      job.result.then(
        () => order.push(i),
        () => undefined,
      );
      return job;
    });
    expect(jobs.map((job) => job.standing().before)).toEqual([null, 0, 1, 2]);
    await Promise.all(jobs.map((job) => job.result));
    expect(order).toEqual([0, 1, 2, 3]);
  });

  test("progress appears, never falls, and comes near to the end", async () => {
    const { turns } = counter();
    const job = opened().run("obedient", { turns, of: 400 }, forever);
    const seen = [job.standing().fraction];
    let done = false;
    const result = job.result.then(() => {
      done = true;
    });
    while (!done) {
      seen.push(job.standing().fraction);
      await pause(5);
    }
    await result;
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    expect(new Set(seen).size).toBeGreaterThan(10);
    expect(seen.at(-1)).toBeGreaterThan(0.9);
  });

  test("more than may wait is refused with a time to come back", () => {
    const { turns } = counter();
    opened();
    const ask = () => void pool.run("deaf", { turns }, forever).result.catch(() => undefined);
    for (let i = 0; i < 5; i += 1) ask();
    expect(ask).toThrow(Unavailable);
    expect(ask).toThrow(expect.objectContaining({ status: 503, retryAfter_s: 60 }));
    expect(pool.load()).toEqual({ running: 1, waiting: 4 });
  });

  test("closing refuses what waits and ends what runs", async () => {
    const { turns, taken } = counter();
    opened();
    const [runs, waits] = [0, 1].map(() => pool.run("deaf", { turns }, forever).result.catch(String));
    await until(() => taken() > 0);
    await pool.close();
    expect(await runs).toContain("being stopped");
    expect(await waits).toContain("being stopped");
    const after = taken();
    await pause(50);
    expect(taken()).toBe(after);
    expect(() => pool.run("echo", "", forever)).toThrow(/being stopped/);
  });
});
