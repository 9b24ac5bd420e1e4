import { join } from "node:path";
import { pino } from "pino";
import { caseStore } from "./files/cases.js";
import { readDemos } from "./files/demos.js";
import { register } from "./files/register.js";
import { folderStorage } from "./files/storage.js";
import { isOpen, projectRoot, readSettings } from "./settings.js";
import { createApp } from "./web/app.js";
import { serverOf } from "./web/connections.js";
import { readiness } from "./web/health.js";
import { createLog } from "./web/log.js";
import { longScreenings } from "./web/longScreenings.js";
import { threadedScreener } from "./web/screener.js";

const grace_ms = 4000;
const unencrypted =
  "What goes between here and the browsers, the password too, is not encrypted: put a proxy in front.";

const read = readSettings(process.env);
if (!read.ok) {
  for (const fault of read.faults) process.stderr.write(`${fault}\n`);
  process.exit(2);
}
const { settings } = read;
const log = createLog(pino.destination({ fd: 2, sync: true }));
const storage = folderStorage(settings.dataFolder);
await storage.sweep("cases");
const sheets = register(storage);
for (const sentence of await sheets.start()) log.warn(sentence);

const screener = threadedScreener({
  ceiling_s: settings.screenSeconds,
  onTrouble: (error) => log.error({ err: error }),
});
const app = createApp(settings, {
  cases: caseStore(storage),
  demos: await readDemos(folderStorage(join(projectRoot, "scenarios"))),
  register: sheets,
  screener,
  screenings: longScreenings(screener, log),
  ready: readiness(storage, screener),
  log,
});

const server = serverOf(app);
server.once("error", (error) => {
  process.stderr.write(`The server cannot listen on ${settings.host}:${settings.port}: ${error.message}\n`);
  process.exit(1);
});
server.listen(settings.port, settings.host, () => {
  const address = server.address();
  const port = typeof address === "object" && address !== null ? address.port : settings.port;
  const host = settings.host.includes(":") ? `[${settings.host}]` : settings.host;
  process.stdout.write(`Thermal Window listens on http://${host}:${port}\n`);
  if (isOpen(settings.host)) log.warn(unencrypted);
});

/** Finishes what is under way, gives up on the rest after a few seconds. */
function stop(): void {
  server.close(() => screener.close().then(() => process.exit(0)));
  // Connections that are kept for a next request become idle one after the other.
  setInterval(() => server.closeIdleConnections(), 50).unref();
  setTimeout(() => process.exit(0), grace_ms).unref();
}

process.on("SIGTERM", stop);
process.on("SIGINT", stop);
