import { existsSync } from "node:fs";
import chromium from "@sparticuz/chromium";
import { type Browser, chromium as driver } from "playwright-core";

/** What keeps the browser from calling home, which would only cost time. */
const quiet = [
  "--no-sandbox",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
  "--no-first-run",
  "--disable-quic",
];

/** Starts the browser that CHROME_PATH names, or else the one that comes with the packages. */
export async function startBrowser(): Promise<Browser> {
  const named = process.env.CHROME_PATH;
  if (named !== undefined && !existsSync(named)) {
    throw new Error(
      `CHROME_PATH is ${named}, where no file stands. Name the program file of Chrome or Chromium.`,
    );
  }
  try {
    const executablePath = named ?? (await chromium.executablePath());
    return await driver.launch({ executablePath, args: [...quiet] });
  } catch (error) {
    throw new Error(
      "No browser starts for the browser tests: the packed Chromium runs on 64-bit Linux only. " +
        "Install Chrome or Chromium and set CHROME_PATH to its program file.",
      { cause: error },
    );
  }
}
