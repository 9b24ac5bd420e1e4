import { once } from "node:events";
import { mkdtempSync, rmSync } from "node:fs";
import { mkdir, writeFile } from "node:fs/promises";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { register } from "../../server/files/register.js";
import { checkChain } from "../../server/files/registerChain.js";
import { factsOf, isFilable } from "../../server/files/registerFacts.js";
import { folderStorage } from "../../server/files/storage.js";
import { recordBytes } from "../../server/records/attach.js";
import { screen } from "../../server/screening/screen.js";
import { renderSheet } from "../../server/sheet/render.js";
import { memoryStorage } from "../files/memoryStorage.js";
import { plainSheet, ticking } from "../files/registerSheets.js";
import { testApp } from "../web/testApp.js";
import { demo } from "./cases.js";
import { type Bench, type Line, ms } from "./measure.js";

const many = 5000;

/** Times something that is waited for, after a warm-up; the median in ms. */
async function median(work: () => Promise<unknown>, runs: number): Promise<number> {
  await work();
  const times: number[] = [];
  for (let run = 0; run < runs; run += 1) {
    const start = performance.now();
    await work();
    times.push(performance.now() - start);
  }
  return times.sort((one, other) => one - other)[Math.floor(runs / 2)] ?? 0;
}

/** A register of many sheets of no substance on the disk. It is made in memory first: forcing each file to the disk would take minutes. */
async function manyFiled(folder: string): Promise<void> {
  const files: [string, string | Uint8Array][] = [];
  const memory = memoryStorage();
  const noted = {
    ...memory,
    write: (path: string, content: string | Uint8Array) => {
      files.push([path, content]);
      return memory.write(path, content);
    },
    create: (path: string, content: string | Uint8Array) => {
      files.push([path, content]);
      return memory.create(path, content);
    },
  };
  const sheets = register(noted, ticking());
  for (let sheet = 1; sheet <= many; sheet += 1) {
    await sheets.file(plainSheet({ record: `B-${sheet}`, vessel: `V-${sheet % 40}`, stop: sheet % 7 === 0 }));
  }
  for (const path of new Set(files.map(([each]) => dirname(each))))
    await mkdir(join(folder, path), { recursive: true });
  for (const [path, content] of files) await writeFile(join(folder, path), content);
}

/** Filing and finding. */
export const registerBench: Bench = {
  title: `Register of ${many} filed sheets`,
  async run() {
    const folder = mkdtempSync(join(tmpdir(), "register-bench-"));
    try {
      await manyFiled(folder);
      return await figures(folder);
    } finally {
      rmSync(folder, { recursive: true });
    }
  },
};

async function figures(folder: string): Promise<Line[]> {
  const storage = folderStorage(folder);
  const start = await median(() => register(storage).start(), 3);
  const chain = await median(() => checkChain(storage), 3);
  const sheets = register(storage, ticking());
  await sheets.start();
  const server = testApp(undefined, undefined, sheets).app.listen(0, "127.0.0.1");
  await once(server, "listening");
  try {
    const { port } = server.address() as AddressInfo;
    const page = (path: string) => async () => (await fetch(`http://127.0.0.1:${port}${path}`)).text();
    const within = (what: string, figure: number, bound: number): Line => ({
      what,
      figure: ms(figure),
      bound: { text: `below ${bound} ms`, met: figure < bound },
    });
    return [
      { what: "start: reading every entry", figure: ms(start) },
      within("the list's first page, asked for over the network", await median(page("/register"), 40), 100),
      within("its last page", await median(page("/register?page=50"), 40), 100),
      within("a search that finds one sheet", await median(page("/register?record=b-4321"), 40), 100),
      { what: "all of it as CSV", figure: ms(await median(page("/register.csv"), 10)) },
      { what: "following the chain from the first entry to the last", figure: ms(chain) },
      { what: "filing a drawn sheet, three files forced to the disk", figure: ms(await filing(folder)) },
    ];
  } finally {
    server.close();
  }
}

async function filing(folder: string): Promise<number> {
  const { document, model, digest } = demo("acylation");
  if (!isFilable(document)) throw new Error("The demo case names no batch record.");
  const findings = screen(model, { digest, depth: "full" });
  const pdf = await renderSheet({ document, model, findings, paper: "A4" });
  const sheets = register(folderStorage(folder));
  let sheet = 0;
  return median(() => {
    sheet += 1;
    return sheets.file({
      facts: { ...factsOf(document, findings), record: `DEMO-${sheet}` },
      caseDigest: digest,
      findings,
      supersedes: null,
      draw: async (place) => ({ pdf, record: recordBytes(document, findings, place) }),
    });
  }, 20);
}
