import type { Page } from "playwright-core";
import { describe, expect, test } from "vitest";
import { violations } from "./accessibility.js";
import type { Visit } from "./visit.js";

async function typeBatchRecord(page: Page, record: string): Promise<void> {
  await page.locator('[name="/batch/record"]').fill(record);
}

/** From the page of a case to a reviewed and superseded sheet, as a person would. */
export function filing(visit: Visit): void {
  describe.each([
    ["with", true],
    ["without", false],
  ] as const)("%s script", (word, javaScriptEnabled) => {
    test("a sheet is filed, asked about, superseded, reviewed, found and verified", async () => {
      const page = await visit("/demos/hydrolysis", { javaScriptEnabled });
      await typeBatchRecord(page, `R-${word}`);
      await page.getByRole("button", { name: "File this sheet" }).click();
      await page.waitForURL(/\/register\/\d+$/);
      await page.getByText("This sheet stands").waitFor();
      const first = page.url();

      await page.getByRole("link", { name: "Open its case, for a new revision" }).click();
      await page.locator('[name="/title"]').fill(`Second thoughts ${word}`);
      await page.getByRole("button", { name: "File this sheet" }).click();
      await page.getByRole("heading", { name: "Not filed yet: there is a sheet already" }).waitFor();
      expect(await page.locator('[name="/title"]').inputValue()).toBe(`Second thoughts ${word}`);
      await page.getByRole("button", { name: /^File it as revision 2/ }).click();
      await page.waitForURL((url) => /\/register\/\d+$/.test(url.pathname) && url.href !== first);

      await page.getByLabel("Reviewer, and qualification").fill("R. Reader");
      await page.getByLabel("Day of the review").fill("2026-03-07");
      await page.getByLabel("Conclusion").selectOption("objection");
      await page.getByRole("button", { name: "Enter the review" }).click();
      await page.getByText("What is the objection?").waitFor();
      await page.getByLabel("Remark, conditions").fill("Cooling was never measured.");
      await page.getByRole("button", { name: "Enter the review" }).click();
      await page.getByText("Reviewed, objection").waitFor();

      await page.getByRole("button", { name: "Verify this sheet" }).click();
      await page.getByRole("heading", { name: /^Verified: .* stands in this register/ }).waitFor();

      await page.getByRole("link", { name: "Register", exact: true }).click();
      await page.getByLabel("Title").fill(`thoughts ${word}`);
      await page.getByRole("button", { name: "Search" }).click();
      await page.getByRole("heading", { name: /^1 of \d+ sheets$/ }).waitFor();
      await page.context().close();
    });
  });

  test.each(["light", "dark"] as const)(
    "axe-core finds nothing on its pages in the %s scheme",
    async (colorScheme) => {
      const page = await visit("/demos/hydrolysis", { colorScheme });
      await typeBatchRecord(page, `R-${colorScheme}`);
      await page.getByRole("button", { name: "File this sheet" }).click();
      await page.waitForURL(/\/register\/\d+$/);
      expect(await violations(page)).toEqual([]);
      await page.getByRole("button", { name: "Enter the review" }).click();
      await page.getByText("Who reviewed the sheet?").waitFor();
      expect(await violations(page)).toEqual([]);
      await page.goto("/demos/hydrolysis");
      await typeBatchRecord(page, `R-${colorScheme}`);
      await page.getByRole("button", { name: "File this sheet" }).click();
      await page.getByRole("heading", { name: "Not filed yet: there is a sheet already" }).waitFor();
      expect(await violations(page)).toEqual([]);
      for (const path of ["/register", "/register?from=soon", "/verify"]) {
        await page.goto(path);
        expect(await violations(page), path).toEqual([]);
      }
      await page.getByRole("button", { name: "Verify", exact: true }).click();
      await page.getByText("Choose a sheet").waitFor();
      expect(await violations(page)).toEqual([]);
      await page.context().close();
    },
  );

  test("no page of the register is wider than a small screen", async () => {
    const page = await visit("/demos/hydrolysis", { viewport: { width: 360, height: 740 } });
    await typeBatchRecord(page, "R-narrow");
    await page.getByRole("button", { name: "File this sheet" }).click();
    await page.waitForURL(/\/register\/\d+$/);
    for (const path of [new URL(page.url()).pathname, "/register", "/verify"]) {
      await page.goto(path);
      expect(await page.evaluate(() => document.documentElement.scrollWidth), path).toBeLessThanOrEqual(360);
    }
    await page.context().close();
  });
}
