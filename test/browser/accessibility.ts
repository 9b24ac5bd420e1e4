import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { AxeResults } from "axe-core";
import type { Page } from "playwright-core";
import { describe, expect, test } from "vitest";
import { settled, type Visit } from "./visit.js";

const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

/** What axe-core finds on a page. */
export async function violations(page: Page): Promise<readonly string[]> {
  await page.evaluate(axe);
  const { violations } = await page.evaluate<AxeResults>("axe.run({ resultTypes: ['violations'] })");
  return violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html} (${nodes.length})`);
}

/** What axe-core finds on the pages, in both colour schemes. */
export function accessibility(visit: Visit): void {
  describe.each(["light", "dark"] as const)("axe-core finds nothing in the %s scheme", (colorScheme) => {
    test.each([
      "/",
      "/cases/new",
      "/glossary",
      "/checks",
      "/interface",
      "/register",
      "/verify",
      "/demos/ring-closure",
      "/demos/acylation",
      "/cases/none",
      "/compare?first=demos/ring-closure&second=demos/acylation",
    ])("on %s", async (path) => {
      const page = await visit(path, { colorScheme });
      await settled(page);
      await page.evaluate(() => {
        for (const each of document.querySelectorAll("details")) each.open = true;
      });
      expect(await violations(page)).toEqual([]);
      await page.context().close();
    });

    test("on a case with faults, and on one that a newer copy stands against", async () => {
      const page = await visit("/demos/hydrolysis", { colorScheme });
      await page.locator('[name="/mixture/mass"]').fill("");
      await page.getByRole("button", { name: "Save", exact: true }).click();
      await page.waitForURL(/\/cases\/[a-z2-9]{12}$/);
      expect(await page.locator("#faults").count()).toBe(1);
      expect(await violations(page)).toEqual([]);
      const other = await page.context().newPage();
      await other.goto(page.url());
      await other.locator('[name="/mixture/mass"]').fill("5 kg");
      await other.getByRole("button", { name: "Save", exact: true }).click();
      await other.getByText(/^Saved /).waitFor();
      await page.getByRole("button", { name: "Save", exact: true }).click();
      await page.getByRole("heading", { name: /newer copy/ }).waitFor();
      expect(await violations(page)).toEqual([]);
      await page.context().close();
    });
  });
}
