import { spawnSync } from "node:child_process";
import { randomBytes } from "node:crypto";
import { mkdtempSync, rmSync } from "node:fs";
import { readdir } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { register } from "../../server/files/register.js";
import { checkChain } from "../../server/files/registerChain.js";
import { places } from "../../server/files/registerEntry.js";
import { folderStorage, type Storage } from "../../server/files/storage.js";
import { memoryStorage } from "./memoryStorage.js";
import { plainSheet, ticking } from "./registerSheets.js";

function refusal(code: string): Error {
  return Object.assign(new Error(`${code}: refused`), { code });
}

/** Storage that refuses the call of that number among those that write, counted from 1. */
function refusing(storage: Storage, at: number, code: string): Storage {
  let calls = 0;
  const guarded =
    <Arguments extends unknown[], Result>(work: (...args: Arguments) => Promise<Result>) =>
    async (...args: Arguments): Promise<Result> => {
      calls += 1;
      if (calls === at) throw refusal(code);
      return work(...args);
    };
  return { ...storage, write: guarded(storage.write), create: guarded(storage.create) };
}

describe("a disk that is full or refuses", () => {
  test.each([
    [1, "ENOSPC"],
    [2, "ENOSPC"],
    [3, "ENOSPC"],
    [1, "EACCES"],
    [3, "EROFS"],
    [2, "EIO"],
  ])("at write %i with %s files nothing and leaves nothing; the next filing works", async (at, code) => {
    const storage = memoryStorage();
    await register(storage, ticking()).file(plainSheet({ record: "B-1" }));
    const sheets = register(refusing(storage, at, code), ticking());
    await expect(sheets.file(plainSheet({ record: "B-2" }))).rejects.toMatchObject({ code });
    expect(await storage.list(places.entries)).toHaveLength(1);
    expect(await storage.list(places.sheets)).toHaveLength(2);
    expect(await sheets.file(plainSheet({ record: "B-2" }))).toMatchObject({ entry: { number: 2 } });
    expect(await checkChain(storage, { sheet: "all" })).toEqual({ upTo: 2, faults: [] });
  });

  test("that refuses only after the entry took its name leaves the sheet filed and whole", async () => {
    const storage = memoryStorage();
    const sheets = register(
      {
        ...storage,
        create: async (path, content) => {
          await storage.create(path, content);
          throw refusal("EIO");
        },
      },
      ticking(),
    );
    await expect(sheets.file(plainSheet())).rejects.toMatchObject({ code: "EIO" });
    expect((await sheets.fresh()).last()).toBe(1);
    expect(await checkChain(storage, { sheet: "all" })).toEqual({ upTo: 1, faults: [] });
  });

  test("does not keep a register with a torn last entry closed", async () => {
    const storage = memoryStorage();
    await register(storage, ticking()).file(plainSheet());
    await storage.write(places.entry(2), "{ half");
    const unmoved = register({ ...storage, move: () => Promise.reject(refusal("EROFS")) }, ticking());
    expect(await unmoved.start()).toEqual([expect.stringContaining("Entry 2 is torn, and the disk refuses")]);
    expect((await unmoved.fresh()).sheets()).toHaveLength(1);
    const moved = register(refusing(storage, 1, "ENOSPC"), ticking());
    expect(await moved.start()).toEqual([expect.stringContaining("could not be entered")]);
    expect((await moved.fresh()).last()).toBe(1);
  });

  test("a review that cannot be written is not entered", async () => {
    const storage = memoryStorage();
    const sheets = register(refusing(storage, 4, "ENOSPC"), ticking());
    await sheets.file(plainSheet());
    const review = {
      reviewer: "B",
      reviewedOn: "2026-02-03",
      conclusion: "objection",
      remark: null,
    } as const;
    await expect(sheets.review(1, review)).rejects.toMatchObject({ code: "ENOSPC" });
    expect(await sheets.review(1, review)).toMatchObject({ number: 2 });
  });
});

test("a real disk of 1 MB fills up: everything filed before is whole, nothing is half filed, nothing is left over", async () => {
  const folder = mkdtempSync(join(tmpdir(), "full-"));
  const mounted = spawnSync("mount", ["-t", "tmpfs", "-o", "size=1m", "tmpfs", folder], { encoding: "utf8" });
  try {
    if (mounted.status !== 0) {
      // Only a privileged process may mount; then the cases above have to do.
      expect(mounted.error ?? mounted.stderr).toMatchObject(
        /permission|denied|only root|ENOENT|must be superuser/i,
      );
      return;
    }
    const storage = folderStorage(folder);
    const sheets = register(storage, ticking());
    const big = (record: string) => {
      const sheet = plainSheet({ record });
      const pdf = randomBytes(90_000);
      return { ...sheet, draw: async () => ({ pdf, record: Buffer.from(sheet.facts.record) }) };
    };
    let filed = 0;
    const fill = async () => {
      for (; filed < 100; filed += 1) await sheets.file(big(`B-${filed}`));
    };
    await expect(fill()).rejects.toMatchObject({ code: "ENOSPC" });
    expect(filed).toBeGreaterThan(5);
    await expect(sheets.file(big("once more"))).rejects.toMatchObject({ code: "ENOSPC" });

    const again = register(storage, ticking());
    expect(await again.start()).toEqual([]);
    expect((await again.fresh()).sheets()).toHaveLength(filed);
    expect(await checkChain(storage, { sheet: "all", upTo: filed - 1 })).toEqual({
      upTo: filed - 1,
      faults: [],
    });
    expect(await readdir(join(folder, places.sheets))).toHaveLength(2 * filed);
    expect(await readdir(join(folder, places.entries))).toHaveLength(filed);
  } finally {
    if (mounted.status === 0) spawnSync("umount", [folder]);
    rmSync(folder, { recursive: true });
  }
});
