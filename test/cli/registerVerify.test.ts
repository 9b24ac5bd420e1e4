import { mkdtemp, readFile, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, test } from "vitest";
import { readCaseText } from "../../server/case/read.js";
import { verifyCommand } from "../../server/cli/verifyCommand.js";
import { register } from "../../server/files/register.js";
import { places } from "../../server/files/registerEntry.js";
import { factsOf, isFilable } from "../../server/files/registerFacts.js";
import { folderStorage } from "../../server/files/storage.js";
import { recordBytes } from "../../server/records/attach.js";
import { screen } from "../../server/screening/screen.js";
import { projectRoot } from "../../server/settings.js";
import { renderSheet } from "../../server/sheet/render.js";
import { ticking } from "../files/registerSheets.js";

let folder: string;
const path = (name: string) => join(folder, name);

async function verify(name: string, data: string) {
  let [out, err] = ["", ""];
  const streams = {
    out: (text: string) => {
      out += text;
    },
    err: (text: string) => {
      err += text;
    },
  };
  const status = await verifyCommand([path(name)], streams, { DATA_DIR: path(data) });
  return { status, out, err };
}

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "verify-"));
  // The demo case that is screened the quickest: the register is what is tried here.
  const read = readCaseText(await readFile(join(projectRoot, "scenarios/hydrolysis.json"), "utf8"));
  if (!read.ok || !isFilable(read.document)) throw new Error("The demo case cannot be filed.");
  const { document, model, digest } = read;
  const findings = screen(model, { digest, depth: "full" });
  const sheets = register(folderStorage(path("data")), ticking());
  for (const supersedes of [null, 1]) {
    await sheets.file({
      facts: factsOf(document, findings),
      caseDigest: digest,
      findings,
      supersedes,
      draw: async (filing) => ({
        pdf: await renderSheet({ document, model, findings, paper: "A4", filing }),
        record: recordBytes(document, findings, filing),
      }),
    });
  }
  const filed = (await sheets.fresh()).sheets();
  for (const { sheet } of filed)
    await writeFile(path(`${sheet.number}.pdf`), (await sheets.pdf(sheet)) ?? "");
  await writeFile(path("printed.pdf"), await renderSheet({ document, model, findings, paper: "A4" }));
});

afterAll(() => rm(folder, { recursive: true }));

test("a filed sheet verifies, in the register and with the chain up to it", async () => {
  const { status, out, err } = await verify("1.pdf", "data");
  expect({ status, err }).toEqual({ status: 0, err: "" });
  expect(out).toContain("register: In this register as No. 1, revision 1");
  expect(out).toContain("It was superseded by No. 2.");
  expect(out).toContain("chain: The register is whole from its first entry to entry 1.");
});

test("a sheet that was only printed verifies, and is said not to be in the register", async () => {
  const { status, out } = await verify("printed.pdf", "data");
  expect(status).toBe(0);
  expect(out).toContain(
    "register: Not in this register: the sheet says itself that it was printed without being filed.",
  );
});

test("where there is no register none is asked", async () => {
  const { status, out } = await verify("1.pdf", "nothing");
  expect(status).toBe(0);
  expect(out).toContain("register: not asked, for DATA_DIR holds none");
});

test("a changed entry, a swap and a removal refuse the sheet, each with its sentence", async () => {
  const storage = folderStorage(path("data"));
  const one = (await storage.read(places.entry(1))) ?? "";
  const two = (await storage.read(places.entry(2))) ?? "";

  await storage.write(
    places.entry(1),
    one.replace('"kind":"sheet","number":1,', '"kind":"sheet","number":1, '),
  );
  const changed = await verify("2.pdf", "data");
  expect(changed.status).toBe(1);
  expect(changed.err).toContain("chain: Entry 2 does not follow from entry 1: one of the two was changed.");

  await storage.write(places.entry(1), two);
  await storage.write(places.entry(2), one);
  const swapped = await verify("2.pdf", "data");
  expect(swapped.status).toBe(1);
  expect(swapped.err).toContain(
    "chain: In the place of entry 1 stands entry 2: entries were swapped or renamed.",
  );
  expect(swapped.out).toContain("NOT verified");

  await storage.write(places.entry(2), two);
  await storage.remove(places.entry(1));
  const removed = await verify("2.pdf", "data");
  expect(removed.status).toBe(1);
  expect(removed.err).toContain("chain: Entry 1 is missing: it was removed.");

  await storage.write(places.entry(1), one);
  await storage.remove(places.entry(2));
  const last = await verify("2.pdf", "data");
  expect(last.status).toBe(1);
  expect(last.err).toContain(
    "register: The sheet says that it was filed as No. 2, revision 2. This register holds no sheet",
  );
});
