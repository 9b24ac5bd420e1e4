import { spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtemp, readdir, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { setTimeout as delay } from "node:timers/promises";
import { expect, test } from "vitest";
import { caseStore } from "../../server/files/cases.js";
import { folderStorage } from "../../server/files/storage.js";
import { built } from "../build.js";

test("a kill -9 in the middle of a save leaves a whole case, and the next save works", async () => {
  const program = built("test/files/saveForever.ts");
  const folder = await mkdtemp(join(tmpdir(), "killed-"));
  const cases = caseStore(folderStorage(folder));
  const { id } = await cases.create({ text: "0", revision: 0 });

  let killedInside = 0;
  let revision = 1;
  for (let round = 0; round < 12; round += 1) {
    const child = spawn(process.execPath, [program, folder, id, String(revision)]);
    const ended = once(child, "exit");
    await once(child.stdout, "data");
    await delay(15 + 17 * round);
    child.kill("SIGKILL");
    expect(await ended).toEqual([null, "SIGKILL"]);

    const left = await readdir(join(folder, "cases"));
    if (left.some((name) => name.endsWith(".part"))) killedInside += 1;
    const found = await cases.read(id);
    expect(found).not.toBeNull();
    const document = found?.document as { text: string; revision: number };
    expect(document.revision === 0 || document.text.length === 8_000_000).toBe(true);
    expect(new Set(document.text).size).toBe(1);
    revision = found?.revision ?? 0;
  }

  expect(revision).toBeGreaterThan(1);
  expect(killedInside).toBeGreaterThan(0);
  expect(await cases.save(id, revision, { document: { text: "after" } })).toMatchObject({ saved: true });
  await rm(folder, { recursive: true });
});
