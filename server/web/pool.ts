import { Piscina } from "piscina";
import { askToStop, type Control, createControl, fractionDone } from "./poolControl.js";
import { overloaded, stopping, tooLong } from "./unavailable.js";

export interface PoolOptions {
  /** built file whose exported functions the workers run */
  readonly worker: string;
  readonly threads: number;
  /** pieces of work that may wait; more are refused */
  readonly longestQueue: number;
  /** the longest that one piece may take once it runs */
  readonly ceiling_s: number;
  /** told of a thread that broke while it had nothing to do */
  readonly onTrouble?: (error: unknown) => void;
}

/** What a worker's function is called with. */
export interface Order<Task> {
  readonly task: Task;
  readonly control: Control;
}

/** How far a piece of work is. */
export interface Standing {
  /** pieces of work that wait before it; null once it runs */
  readonly before: number | null;
  /** the part of it that is done, 0 to 1 */
  readonly fraction: number;
}

export interface Job<Result> {
  readonly result: Promise<Result>;
  standing(): Standing;
}

/** Worker threads, and the queue before them. */
export interface Pool {
  /**
   * @param name of the worker's function
   * @param task its argument, which must survive structured cloning
   * @param signal takes the work out of the queue, or ends it
   * @throws Unavailable where too much waits already
   */
  run<Result>(name: string, task: unknown, signal: AbortSignal): Job<Result>;
  /** pieces of work in the threads and before them */
  load(): { readonly running: number; readonly waiting: number };
  /** Ends what runs and refuses what waits. */
  close(): Promise<void>;
}

interface Entry {
  readonly name: string;
  readonly task: unknown;
  readonly control: Control;
  readonly done: (result: unknown) => void;
  readonly fail: (error: unknown) => void;
}

/** A worker that was asked to stop and does not is ended after this, and another one started. */
const grace_ms = 1000;

/**
 * A worker that wants more than this ends, rather than the server. Without the second limit each worker keeps some
 * 50 MB of what it has thrown away.
 */
const memory = { maxOldGenerationSizeMb: 256, maxYoungGenerationSizeMb: 16 };

/**
 * Threads with a queue of their own, first come, first served. Work that is not wanted any more, or that reaches the
 * ceiling, is asked to stop, which keeps the thread and what it has compiled; a thread that does not listen is ended.
 * Either way the caller has its answer at once, and the next piece starts when a thread is really free.
 */
export function createPool({ worker, threads, longestQueue, ceiling_s, onTrouble }: PoolOptions): Pool {
  // Workers stand back where a page and a screening want the same processor.
  const piscina = new Piscina({
    filename: worker,
    minThreads: 1,
    maxThreads: threads,
    idleTimeout: 60_000,
    niceIncrement: 5,
    resourceLimits: memory,
  });
  piscina.on("error", (error) => onTrouble?.(error));
  const queue: Entry[] = [];
  /** how to end each piece that runs */
  const running = new Map<Entry, (reason: unknown) => void>();
  let closed = false;

  async function start(entry: Entry): Promise<void> {
    const ended = new AbortController();
    let grace: NodeJS.Timeout | undefined;
    const stop = (reason: unknown): void => {
      entry.fail(reason);
      askToStop(entry.control);
      grace ??= setTimeout(() => ended.abort(), grace_ms);
    };
    const ceiling = setTimeout(() => stop(tooLong(ceiling_s)), 1000 * ceiling_s);
    running.set(entry, stop);
    try {
      const order: Order<unknown> = { task: entry.task, control: entry.control };
      entry.done(await piscina.run(order, { name: entry.name, signal: ended.signal }));
    } catch (error) {
      entry.fail(error);
    } finally {
      clearTimeout(ceiling);
      clearTimeout(grace);
      running.delete(entry);
      startNext();
    }
  }

  function startNext(): void {
    while (!closed && running.size < threads) {
      const entry = queue.shift();
      if (entry === undefined) return;
      void start(entry);
    }
  }

  function giveUp(entry: Entry, reason: unknown): void {
    const place = queue.indexOf(entry);
    if (place >= 0) queue.splice(place, 1);
    entry.fail(reason);
    running.get(entry)?.(reason);
  }

  return {
    run<Result>(name: string, task: unknown, signal: AbortSignal): Job<Result> {
      signal.throwIfAborted();
      if (closed) throw stopping();
      if (queue.length >= longestQueue) throw overloaded();
      const control = createControl();
      const { promise, resolve, reject } = deferred<Result>();
      const entry: Entry = {
        name,
        task,
        control,
        done: (result) => resolve(result as Result),
        fail: reject,
      };
      const leave = (): void => giveUp(entry, signal.reason);
      const stay = (): void => signal.removeEventListener("abort", leave);
      signal.addEventListener("abort", leave);
      promise.then(stay, stay);
      queue.push(entry);
      startNext();
      return {
        result: promise,
        standing() {
          const place = queue.indexOf(entry);
          return { before: place < 0 ? null : place, fraction: fractionDone(control) };
        },
      };
    },
    load: () => ({ running: running.size, waiting: queue.length }),
    close() {
      closed = true;
      for (const entry of [...queue, ...running.keys()]) giveUp(entry, stopping());
      return piscina.destroy();
    },
  };
}

function deferred<Value>() {
  let resolve: (value: Value) => void = () => undefined;
  let reject: (reason: unknown) => void = () => undefined;
  const promise = new Promise<Value>((yes, no) => {
    [resolve, reject] = [yes, no];
  });
  return { promise, resolve, reject };
}
