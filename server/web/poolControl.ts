import type { Progress } from "../screening/progress.js";

/**
 * Two numbers that a worker thread shares with the thread that serves pages: whether the work is still wanted, and
 * how much of it is done. A busy worker reads no messages, but it can read these.
 */
export type Control = SharedArrayBuffer;

const stopField = 0;
const doneField = 1;
const whole = 10_000;

export function createControl(): Control {
  return new SharedArrayBuffer(2 * Int32Array.BYTES_PER_ELEMENT);
}

/** Asks the worker to stop at its next report of progress. */
export function askToStop(control: Control): void {
  Atomics.store(new Int32Array(control), stopField, 1);
}

/** The part that is done, 0 to 1. */
export function fractionDone(control: Control): number {
  return Atomics.load(new Int32Array(control), doneField) / whole;
}

/** The worker's side: notes how far the work is, and throws where it is not wanted any more. */
export function reportTo(control: Control): Progress {
  const shared = new Int32Array(control);
  return (fraction) => {
    Atomics.store(shared, doneField, Math.round(fraction * whole));
    if (Atomics.load(shared, stopField) !== 0) throw new Error("The work is not wanted any more.");
  };
}
