import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import type { Browser, BrowserContextOptions, Page } from "playwright-core";
import { afterAll, beforeAll } from "vitest";
import { threadedScreener } from "../../server/web/screener.js";
import { built } from "../build.js";
import { testApp } from "../web/testApp.js";
import { accessibility } from "./accessibility.js";
import { beginnings } from "./beginnings.js";
import { startBrowser } from "./browser.js";
import { editing } from "./editing.js";
import { measures } from "./measures.js";
import { progress } from "./progress.js";
import { reading } from "./reading.js";
import { filing } from "./register.js";
import { saving } from "./saving.js";
import { workings } from "./workings.js";

const screener = threadedScreener({ worker: built("server/web/screeningWorker.ts") });
let server: Server;
let browser: Browser;

beforeAll(async () => {
  browser = await startBrowser();
  await new Promise<void>((ready) => {
    server = testApp(undefined, screener).app.listen(0, "127.0.0.1", () => ready());
  });
});

afterAll(async () => {
  await browser?.close();
  server?.close();
  await screener.close();
});

async function visit(path: string, options: BrowserContextOptions = {}): Promise<Page> {
  const { port } = server.address() as AddressInfo;
  const context = await browser.newContext({
    baseURL: `http://127.0.0.1:${port}`,
    ...options,
  });
  const page = await context.newPage();
  await page.goto(path);
  return page;
}

// One browser serves all of them: starting it takes longer than most of what they check.
editing(visit);
saving(visit);
accessibility(visit);
measures(visit);
workings(visit);
progress(visit);
filing(visit);
beginnings(visit);
reading(visit);
