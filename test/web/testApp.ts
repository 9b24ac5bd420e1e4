import { join } from "node:path";
import { type CaseStore, caseStore } from "../../server/files/cases.js";
import { readDemos } from "../../server/files/demos.js";
import { type Register, register } from "../../server/files/register.js";
import { folderStorage } from "../../server/files/storage.js";
import { projectRoot, type Settings } from "../../server/settings.js";
import { createApp } from "../../server/web/app.js";
import { createLog } from "../../server/web/log.js";
import { longScreenings } from "../../server/web/longScreenings.js";
import { directScreener, type Screener } from "../../server/web/screener.js";
import { memoryStorage } from "../files/memoryStorage.js";

/** A server for this machine alone. */
const settings: Settings = {
  port: 0,
  host: "127.0.0.1",
  publicHosts: [],
  accessHash: null,
  dataFolder: "",
  screenSeconds: 30,
};

export const demos = await readDemos(folderStorage(join(projectRoot, "scenarios")));

/** The document of a demo case, to change and send. */
export function demoDocument(name = "ring-closure"): Record<string, unknown> {
  const demo = demos.find((each) => each.name === name);
  if (demo === undefined) throw new Error(`There is no demo case ${name}.`);
  return structuredClone(demo.document) as Record<string, unknown>;
}

/** The application over cases and a register in memory, screening in this thread unless said. */
export function testApp(
  cases: CaseStore = caseStore(memoryStorage()),
  screener: Screener = directScreener(),
  sheets: Register = register(memoryStorage()),
  changed: Partial<Settings> = {},
) {
  const logged: string[] = [];
  const log = createLog({ write: (line: string) => logged.push(line) });
  const screenings = longScreenings(screener, log);
  const ready = async () => ({ storage: true, screenings: true });
  const services = { cases, demos, register: sheets, screener, screenings, ready, log };
  const app = createApp({ ...settings, ...changed }, services);
  return { app, cases, sheets, logged };
}
