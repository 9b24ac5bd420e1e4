import { setTimeout as pause } from "node:timers/promises";
import type { Order } from "../../server/web/pool.js";
import { reportTo } from "../../server/web/poolControl.js";

/** Shared with the test, which sees in it whether the work still goes on. */
interface Turns {
  readonly turns: SharedArrayBuffer;
}

function turn(turns: SharedArrayBuffer): number {
  return Atomics.add(new Int32Array(turns), 0, 1);
}

/** Answers at once. */
export function echo({ task }: Order<string>): string {
  return `${task}, ${task}`;
}

/** Takes as many turns as it is told, and reports each. */
export function obedient({ task, control }: Order<Turns & { readonly of: number }>): string {
  const report = reportTo(control);
  for (let i = 0; i < task.of; i += 1) {
    report(i / task.of);
    turn(task.turns);
    spend(1);
  }
  return "done";
}

/** Takes turns for ever and listens to nobody. */
export function deaf({ task }: Order<Turns>): string {
  for (;;) {
    turn(task.turns);
    spend(1);
  }
}

/** Ends its thread. */
export async function dies(): Promise<void> {
  await pause(5);
  process.exit(3);
}

/** Throws outside what the pool awaits. */
export async function breaks(): Promise<void> {
  setImmediate(() => {
    throw new Error("A defect");
  });
  await pause(5000);
}

/** Fills the memory of its thread. */
export function swells(): number {
  const full: number[][] = [];
  for (;;) full.push(new Array<number>(100_000).fill(full.length));
}

/** Keeps the thread busy, ms. */
function spend(time: number): void {
  const end = performance.now() + time;
  while (performance.now() < end);
}
