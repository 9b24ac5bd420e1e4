import { spawn } from "node:child_process";
import { once } from "node:events";
import { cp, mkdir, mkdtemp, readFile, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { backupCommand } from "../../server/cli/backupCommand.js";
import { backUp, backupName } from "../../server/files/backup.js";
import { caseStore } from "../../server/files/cases.js";
import { register } from "../../server/files/register.js";
import { checkChain } from "../../server/files/registerChain.js";
import { places } from "../../server/files/registerEntry.js";
import { folderStorage } from "../../server/files/storage.js";
import { built } from "../build.js";
import { plainSheet, ticking } from "./registerSheets.js";

let folder: string;
let data: string;
let copy: string;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), "backup-"));
  data = join(folder, "data");
  copy = join(folder, "copy");
});

afterEach(() => rm(folder, { recursive: true }));

async function run(target: string, dataFolder = data) {
  let [out, err] = ["", ""];
  const streams = {
    out: (text: string) => {
      out += text;
    },
    err: (text: string) => {
      err += text;
    },
  };
  const status = await backupCommand([target], { DATA_DIR: dataFolder }, streams);
  return { status, out, err };
}

async function twoSheetsAndACase() {
  const storage = folderStorage(data);
  const sheets = register(storage, ticking());
  for (const record of ["B-1", "B-2"]) await sheets.file(plainSheet({ record }));
  const { id } = await caseStore(storage).create({ title: "Kept" });
  return { storage, sheets, id };
}

test("a copy holds cases and sheets, and a program that starts on it finds them", async () => {
  const { id } = await twoSheetsAndACase();
  const { status, out, err } = await run(copy);
  expect({ status, err }).toEqual({ status: 0, err: "" });
  expect(out).toContain("1 case, 2 filed sheets, 2 entries");
  const restored = join(folder, "restored");
  await cp(copy, restored, { recursive: true });
  const sheets = register(folderStorage(restored), ticking());
  expect(await sheets.start()).toEqual([]);
  expect((await sheets.fresh()).sheets()).toHaveLength(2);
  expect(await sheets.file(plainSheet({ record: "B-3" }))).toMatchObject({ entry: { number: 3 } });
  expect(await caseStore(folderStorage(restored)).read(id)).toMatchObject({ document: { title: "Kept" } });
  expect(JSON.parse(await readFile(join(copy, backupName), "utf8"))).toMatchObject({
    entries: 2,
    faults: [],
  });
});

test("a copy taken while two processes file and a case is saved is whole", async () => {
  const program = built("test/files/registerFiling.ts");
  const { storage, id } = await twoSheetsAndACase();
  const children = ["P", "Q"].map((name) =>
    spawn(process.execPath, [program, data, name, "100000"], { stdio: ["ignore", "pipe", "inherit"] }),
  );
  const ended = children.map((child) => once(child, "close"));
  let saving = true;
  const cases = caseStore(storage);
  const saved = (async () => {
    for (let revision = 1; saving; revision += 1) {
      await cases.save(id, revision, { document: { title: "Kept", revision } });
    }
  })();
  try {
    await Promise.all(children.map((child) => once(child.stdout, "data")));
    const reached = async () => (await register(storage).fresh()).last();
    for (const name of ["first", "second", "third"]) {
      while ((await reached()) < 60) await new Promise((resolve) => setTimeout(resolve, 20));
      const before = await reached();
      const backup = await backUp(storage, folderStorage(join(copy, name)), new Date());
      expect(backup.faults).toEqual([]);
      expect(backup.entries).toBeGreaterThanOrEqual(before);
      expect(await reached(), "filing went on").toBeGreaterThan(backup.entries);
      const copied = await caseStore(folderStorage(join(copy, name))).read(id);
      expect(copied).toMatchObject({ document: { title: "Kept" } });
    }
  } finally {
    saving = false;
    await saved;
    for (const child of children) child.kill("SIGKILL");
    await Promise.all(ended);
  }
});

test("a copy that was interrupted lists nothing that it does not hold, and does not say that it is done", async () => {
  const { storage } = await twoSheetsAndACase();
  const target = folderStorage(copy);
  let writes = 0;
  const full = {
    ...target,
    write: async (path: string, content: string | Uint8Array) => {
      writes += 1;
      if (writes > 5) throw Object.assign(new Error("full"), { code: "ENOSPC" });
      await target.write(path, content);
    },
  };
  await expect(backUp(storage, full, new Date())).rejects.toMatchObject({ code: "ENOSPC" });
  expect((await checkChain(target, { sheet: "all" })).faults).toEqual([]);
  expect(await target.read(backupName)).toBeNull();
});

test("a register that is not whole is copied and named, with another exit status", async () => {
  const { storage, sheets } = await twoSheetsAndACase();
  const [sheet] = (await sheets.fresh()).sheets();
  await storage.write(places.pdf(sheet?.sheet ?? { files: "" }), "%PDF of another kind");
  const { status, err } = await run(copy);
  expect(status).toBe(1);
  expect(err).toContain("The PDF of sheet 2 was changed");
  expect(await folderStorage(copy).list(places.entries)).toHaveLength(2);
});

test("folders that will not do are refused and left as they are", async () => {
  await twoSheetsAndACase();
  await mkdir(copy);
  await writeFile(join(copy, "other.txt"), "someone's");
  expect(await run(copy)).toMatchObject({ status: 2, err: expect.stringContaining("is not empty") });
  expect(await readFile(join(copy, "other.txt"), "utf8")).toBe("someone's");
  expect(await run(join(data, "copy"))).toMatchObject({
    status: 2,
    err: expect.stringContaining("DATA_DIR"),
  });
  expect(await run(data)).toMatchObject({ status: 2 });
  expect(await run("")).toMatchObject({ status: 2, err: expect.stringContaining("usage") });
  expect(await run("--all")).toMatchObject({ status: 2 });
  expect(await run(join(copy, "other.txt", "below"))).toMatchObject({ status: 1 });
  expect(await run(join(folder, "new"), join(folder, "wrong"))).toMatchObject({
    status: 2,
    err: expect.stringContaining("holds nothing"),
  });
});
