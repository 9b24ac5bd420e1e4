import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import { setTimeout as pause } from "node:timers/promises";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { type Screener, threadedScreener } from "../../server/web/screener.js";
import { built } from "../build.js";
import { demoDocument, testApp } from "../web/testApp.js";
import { violations } from "./accessibility.js";
import { settled, type Visit } from "./visit.js";

/** Flows of screenings that take some seconds: the worker spends a quarter of one on each failure. */
export function progress(visit: Visit): void {
  let screener: Screener;
  let server: Server;
  /** of a case of five seconds, and of one of one and a half */
  let [long, short] = ["", ""];

  beforeAll(async () => {
    screener = threadedScreener({ worker: built("test/web/slowWorker.ts") });
    const { app, cases } = testApp(undefined, screener);
    const document = demoDocument("hydrolysis");
    const [failure] = document.failures as Record<string, unknown>[];
    const [first, second] = await Promise.all(
      [20, 6].map((length) => {
        const failures = Array.from({ length }, (_, i) => ({ ...failure, name: `Failure ${i}` }));
        return cases.create({ ...document, failures });
      }),
    );
    await new Promise<void>((ready) => {
      server = app.listen(0, "127.0.0.1", () => ready());
    });
    const { port } = server.address() as AddressInfo;
    [long, short] = [first, second].map(({ id }) => `http://127.0.0.1:${port}/cases/${id}`);
  });

  afterAll(async () => {
    server?.close();
    await screener?.close();
  });

  /** Gives the case another digest, so that its findings are not those of another test. */
  async function change(page: Page, mass: string): Promise<void> {
    await page.locator('[name="/mixture/mass"]').fill(mass);
  }

  async function idle(): Promise<void> {
    for (let i = 0; i < 150 && screener.load().running > 0; i += 1) await pause(20);
    expect(screener.load().running).toBe(0);
  }

  describe("a screening of over a second, with script", () => {
    test("shows how far it is beside the quick findings, which the full ones then replace", async () => {
      const page = await visit(long);
      const bar = page.locator("#progress progress");
      await bar.waitFor();
      expect(await page.locator(".numbers").count()).toBe(1);
      const first = Number(await bar.getAttribute("value"));
      await page.waitForFunction(
        (before) => (document.querySelector("progress")?.value ?? 0) > before + 5,
        first,
      );
      expect(await violations(page)).toEqual([]);
      await settled(page);
      expect(await page.locator("#figure-failures").count()).toBe(1);
      await page.context().close();
    });

    test("is cancelled by its button, and begun anew by the other", async () => {
      const page = await visit(long);
      await change(page, "901 kg");
      await page.waitForFunction(() => document.querySelector("#pending:not(:has(progress))") !== null);
      await page.getByRole("button", { name: "Screen", exact: true }).click();
      await page.getByRole("button", { name: "Cancel", exact: true }).click();
      await page.getByText("The screening was cancelled.").waitFor();
      await idle();
      expect(await page.locator('[name="/mixture/mass"]').inputValue()).toBe("901 kg");
      await page.getByRole("button", { name: "Screen", exact: true }).click();
      await page.locator("#progress").waitFor();
      await page.context().close();
    });

    test("is given up when the case changes under it", async () => {
      const page = await visit(long);
      await change(page, "902 kg");
      await page.waitForFunction(() => document.querySelector("#pending:not(:has(progress))") !== null);
      await page.getByRole("button", { name: "Screen", exact: true }).click();
      await page.locator("#progress").waitFor();
      await change(page, "903 kg");
      await page.locator("#progress").waitFor({ state: "detached" });
      await idle();
      expect(await page.locator("#pending").count()).toBe(1);
      await page.context().close();
    });
  });

  describe("a screening of over a second, without script", () => {
    const plain = { javaScriptEnabled: false };

    test("shows how far it is on a page that comes anew by itself, and ends as the case", async () => {
      const page = await visit(long, plain);
      await change(page, "904 kg");
      await page.getByRole("button", { name: "Screen", exact: true }).click();
      const seen: string[] = [];
      for (; (await page.locator(".verdict").count()) === 0; await pause(100)) {
        const bar = page.locator("progress");
        seen.push((await bar.getAttribute("value", { timeout: 300 }).catch(() => null)) ?? "");
      }
      expect(new Set(seen.filter((value) => value !== "")).size).toBeGreaterThan(1);
      expect(await page.locator("#pending").count()).toBe(0);
      expect(await page.locator('[name="/mixture/mass"]').inputValue()).toBe("904 kg");
      await page.goBack();
      expect(await page.locator('[name="/mixture/mass"]').inputValue()).toBe("904 kg");
      await page.context().close();
    });

    test("is cancelled by its button, with what was typed kept", async () => {
      const page = await visit(long, plain);
      await change(page, "905 kg");
      await page.getByRole("button", { name: "Screen", exact: true }).click();
      await page.getByRole("button", { name: "Cancel", exact: true }).click();
      await page.getByText("The screening was cancelled.").waitFor();
      expect(await page.locator('[name="/mixture/mass"]').inputValue()).toBe("905 kg");
      await idle();
      await page.context().close();
    });
  });

  test.each([true, false])(
    "the sheet comes when its screening is done (script: %s)",
    async (javaScriptEnabled) => {
      const page = await visit(short, { javaScriptEnabled });
      await change(page, javaScriptEnabled ? "906 kg" : "907 kg");
      const download = page.waitForEvent("download");
      await page.getByRole("button", { name: /^Sheet/ }).click();
      expect((await download).suggestedFilename()).toMatch(/\.pdf$/);
      expect(page.url()).toContain("/screenings/");
      await page.getByText("The file is ready.").waitFor();
      if (javaScriptEnabled) expect(await violations(page)).toEqual([]);
      await page.context().close();
    },
  );

  test("the page of a screening is cancelled with script too, and axe-core finds nothing on it", async () => {
    const page = await visit(long);
    await change(page, "908 kg");
    await page.getByRole("button", { name: /^Sheet/ }).click();
    await page.waitForURL(/\/screenings\//);
    expect(await violations(page)).toEqual([]);
    await page.getByRole("button", { name: "Cancel", exact: true }).click();
    await page.getByText("The screening was cancelled.").waitFor();
    await idle();
    await page.context().close();
  });
}
