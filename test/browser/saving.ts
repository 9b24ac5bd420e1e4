import { describe, expect, test } from "vitest";
import type { Visit } from "./visit.js";

/** Flows of saving, opening and keeping cases. */
export function saving(visit: Visit): void {
  describe.each([
    ["with script", true],
    ["without script", false],
  ])("%s", (_, javaScriptEnabled) => {
    test("a demo becomes a case of one's own, survives a reload, and is archived", async () => {
      const page = await visit("/demos/hydrolysis", { javaScriptEnabled });
      const title = `Mine ${javaScriptEnabled}`;
      await page.locator('[name="/title"]').fill(title);
      await page.getByRole("button", { name: "Save", exact: true }).click();
      await page.waitForURL(/\/cases\/[a-z2-9]{12}$/);
      await page.reload();
      expect(await page.locator('[name="/title"]').inputValue()).toBe(title);
      await page.goto("/");
      await page.getByRole("button", { name: `Archive ${title}` }).click();
      await page.getByText(/^Archived \(/).click();
      await page.getByRole("button", { name: `Restore ${title}` }).click();
      await page.getByRole("button", { name: `Archive ${title}` }).waitFor();
      await page.context().close();
    });

    test("a second tab cannot save over the first, and keeps what was typed in it", async () => {
      const first = await visit("/demos/hydrolysis", { javaScriptEnabled });
      await first.getByRole("button", { name: "Save", exact: true }).click();
      await first.waitForURL(/\/cases\/[a-z2-9]{12}$/);
      const second = await first.context().newPage();
      await second.goto(first.url());
      await first.locator('[name="/mixture/mass"]').fill("810 kg");
      await first.getByRole("button", { name: "Save", exact: true }).click();
      await first.getByText(/^Saved /).waitFor();
      await second.locator('[name="/mixture/mass"]').fill("820 kg");
      await second.getByRole("button", { name: "Save", exact: true }).click();
      await second.getByRole("heading", { name: /newer copy/ }).waitFor();
      expect(await second.getByRole("row", { name: /Mixture: mass/ }).textContent()).toMatch(
        /820 kg\s*810 kg/,
      );
      expect(await second.locator('[name="/mixture/mass"]').inputValue()).toBe("820 kg");
      await second.getByRole("button", { name: "Save", exact: true }).click();
      await second.waitForURL(first.url());
      expect(await second.locator('[name="/mixture/mass"]').inputValue()).toBe("820 kg");
      await first.context().close();
    });

    test("a case file is opened", async () => {
      const page = await visit("/", { javaScriptEnabled });
      const document = {
        format: "thermal-window/case-1",
        title: "From a file",
        mixture: { mass: "3 kg" },
      };
      await page.getByLabel("A case document (JSON)").setInputFiles({
        name: "case.json",
        mimeType: "application/json",
        buffer: Buffer.from(JSON.stringify(document)),
      });
      await page.getByRole("button", { name: "Open" }).click();
      expect(await page.locator('[name="/title"]').inputValue()).toBe("From a file");
      expect(await page.locator('[name="/mixture/mass"]').inputValue()).toBe("3 kg");
      expect(await page.locator("#faults").count()).toBe(1);
      await page.context().close();
    });
  });
}
