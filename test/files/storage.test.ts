import { mkdtemp, readdir, rm, utimes, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { folderStorage } from "../../server/files/storage.js";

let folder: string;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), "storage-"));
});

afterEach(async () => {
  await rm(folder, { recursive: true });
});

describe("storage", () => {
  test("what was written is read again, and replaced as a whole", async () => {
    const storage = folderStorage(folder);
    await storage.write("cases/one.json", "first, and longer than the second");
    await storage.write("cases/one.json", "second");
    expect(await storage.read("cases/one.json")).toBe("second");
    expect(await readdir(join(folder, "cases"))).toEqual(["one.json"]);
  });

  test("a file or a folder that is not there is an answer", async () => {
    const storage = folderStorage(join(folder, "never-made"));
    expect(await storage.read("cases/one.json")).toBeNull();
    expect(await storage.list("cases")).toEqual([]);
    await storage.remove("cases/one.json");
    await storage.sweep("cases");
  });

  test("of twenty that create the same name at once, exactly one succeeds and its content stands", async () => {
    const storage = folderStorage(folder);
    const outcomes = await Promise.all(
      Array.from({ length: 20 }, (_, index) => storage.create("same.json", `content ${index}`)),
    );
    expect(outcomes.filter((created) => created)).toHaveLength(1);
    expect(await storage.read("same.json")).toBe(`content ${outcomes.indexOf(true)}`);
    expect(await readdir(folder)).toEqual(["same.json"]);
  });

  test("a write that fails leaves the old file and nothing unfinished", async () => {
    const storage = folderStorage(folder);
    await storage.write("taken/inside.json", "a folder stands where the file would go");
    await expect(storage.write("taken", "content")).rejects.toThrow();
    expect(await readdir(folder)).toEqual(["taken"]);
  });

  test("unfinished files are not listed, and swept once they are an hour old", async () => {
    const storage = folderStorage(folder);
    const [old, fresh] = [".0123456789abcdef.part", ".fedcba9876543210.part"];
    for (const name of [old, fresh, "kept.json"]) await writeFile(join(folder, name), "x");
    const before = new Date(Date.now() - 2 * 3_600_000);
    for (const name of [old, "kept.json"]) await utimes(join(folder, name), before, before);
    expect(await storage.list(".")).toEqual(["kept.json"]);
    await storage.sweep(".");
    expect(await readdir(folder)).toEqual([fresh, "kept.json"]);
  });
});
