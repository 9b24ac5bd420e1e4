import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtemp, readdir, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { setTimeout as delay } from "node:timers/promises";
import { afterAll, beforeAll, expect, test } from "vitest";
import { register } from "../../server/files/register.js";
import { checkChain } from "../../server/files/registerChain.js";
import { folderStorage } from "../../server/files/storage.js";
import { built } from "../build.js";

/** Kills in the long run of this test; the short one has enough to hit every step of filing. */
const kills = Number(process.env.REGISTER_KILLS ?? 40);

/** Processes that wait for a busy disk and for each other need time. */
const patience = { timeout: 60_000 + 4_000 * kills };

let program: string;
let folder: string;

beforeAll(async () => {
  program = built("test/files/registerFiling.ts");
  folder = await mkdtemp(join(tmpdir(), "register-"));
});

afterAll(() => rm(folder, { recursive: true }));

interface Filing {
  readonly child: ChildProcess;
  readonly ended: Promise<unknown[]>;
  /** number and digest of the PDF of every sheet that the process says it filed */
  readonly told: () => readonly (readonly [number, string])[];
}

function filing(into: string, name: string, count: number): Filing {
  const child = spawn(process.execPath, [program, into, name, String(count)], {
    stdio: ["ignore", "pipe", "inherit"],
  });
  let text = "";
  child.stdout?.on("data", (chunk: Buffer) => {
    text += chunk.toString();
  });
  return {
    child,
    ended: once(child, "close"),
    told: () => [...text.matchAll(/^(\d+) (\w{64})\n/gm)].map((line) => [Number(line[1]), line[2] ?? ""]),
  };
}

test(
  "500 sheets filed by four processes at once get 500 numbers, none twice, none missing",
  patience,
  async () => {
    const into = join(folder, "at-once");
    const filings = ["A", "B", "C", "D"].map((name) => filing(into, name, 125));
    for (const { ended } of filings) expect(await ended).toEqual([0, null]);

    const numbers = filings.flatMap(({ told }) => told().map(([number]) => number));
    expect(numbers.toSorted((a, b) => a - b)).toEqual(Array.from({ length: 500 }, (_, index) => index + 1));
    const storage = folderStorage(into);
    expect(await checkChain(storage, { sheet: "all" })).toEqual({ upTo: 500, faults: [] });
    const sheets = (await register(storage).fresh()).sheets();
    const expected = ["A", "B", "C", "D"].flatMap((name) =>
      Array.from({ length: 125 }, (_, index) => `${name}-${index + 1}`),
    );
    expect(sheets.map(({ sheet }) => sheet.record).toSorted()).toEqual(expected.toSorted());
    expect(await readdir(join(into, "register/sheets"))).toHaveLength(1000);
  },
);

test(
  `${kills} kills at random moments lose nothing that was filed and list nothing half filed`,
  patience,
  async () => {
    const into = join(folder, "killed");
    const told = new Map<number, string>();
    let inside = 0;
    for (let round = 0; round < kills; round += 2) {
      // Two at once, so that a kill also meets a number that is being fought for.
      const pair = ["A", "B"].map((name) => filing(into, `${name}${round}`, 1_000_000));
      await Promise.all(
        pair.map(async ({ child, ended }) => {
          if (child.stdout !== null) await once(child.stdout, "data");
          await delay(60 * Math.random());
          child.kill("SIGKILL");
          expect(await ended).toEqual([null, "SIGKILL"]);
        }),
      );
      for (const [number, digest] of pair.flatMap((each) => each.told())) {
        expect(told.has(number), `number ${number} was given twice`).toBe(false);
        told.set(number, digest);
      }
      const sheets = (await register(folderStorage(into)).fresh()).sheets();
      const left = await readdir(join(into, "register/sheets"));
      if (left.length > 2 * sheets.length || left.some((name) => name.endsWith(".part"))) inside += 1;
    }

    const storage = folderStorage(into);
    const after = register(storage);
    expect(await after.start()).toEqual([]);
    const { faults, upTo } = await checkChain(storage, { sheet: "all" });
    expect(faults).toEqual([]);
    const listed = new Map(
      (await after.fresh()).sheets().map(({ sheet }) => [sheet.number, sheet.digests.pdf]),
    );
    for (const [number, digest] of told) expect(listed.get(number), `number ${number}`).toBe(digest);
    // At most the sheet that each process was filing when it was killed is there without having been told.
    expect(upTo - told.size).toBeLessThanOrEqual(kills);
    expect(told.size).toBeGreaterThan(kills);
    expect(inside).toBeGreaterThan(0);
  },
);
