import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { readFileSync } from "node:fs";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { built } from "../build.js";

/** The built server as a process of its own, over an empty folder. */
export interface ServedProcess {
  readonly port: number;
  /** The most memory that it ever held, MB; null where the system does not tell. */
  peak_MB(): number | null;
  isAlive(): boolean;
  /** Asks it to end. @returns its exit status */
  stop(): Promise<number | null>;
}

export async function serveProcess(): Promise<ServedProcess> {
  const folder = await mkdtemp(join(tmpdir(), "served-"));
  const child = spawn(process.execPath, [built("server/main.ts")], {
    env: { ...process.env, DATA_DIR: folder, PORT: "0", HOST: "127.0.0.1" },
    stdio: ["ignore", "pipe", "ignore"],
  });
  const ended = once(child, "exit");
  const [line] = await Promise.race([once(child.stdout, "data"), ended]);
  return {
    port: Number(/:(\d+)\s/.exec(String(line))?.[1]),
    peak_MB: () => peakOf(child),
    isAlive: () => child.exitCode === null && child.signalCode === null,
    async stop() {
      child.kill("SIGTERM");
      await ended;
      await rm(folder, { recursive: true });
      return child.exitCode;
    },
  };
}

/** Linux keeps the high-water mark of resident memory, VmHWM, in proc(5). */
function peakOf({ pid }: ChildProcess): number | null {
  if (process.platform !== "linux") return null;
  const kB = /^VmHWM:\s+(\d+) kB$/m.exec(readFileSync(`/proc/${pid}/status`, "utf8"))?.[1];
  return Number(kB) / 1024;
}
