import type { BrowserContextOptions, Page } from "playwright-core";

/** Opens a page of its own of the running program, as a new visitor would. */
export type Visit = (path: string, options?: BrowserContextOptions) => Promise<Page>;

/** Waits until failures and draws have been computed and shown. */
export async function settled(page: Page): Promise<void> {
  await page.locator("#pending").waitFor({ state: "detached" });
}
