import { describe, expect, test } from "vitest";
import type { Visit } from "./visit.js";

// Invented figures, with commas that may part thousands.
const doubtful = "T [K]\tk [1/h]\n320\t1,234\n330\t2,345\n340\t3,456";

/** Flows of filling the form with more than one field at once: pasted rows, failures to begin with. */
export function beginnings(visit: Visit): void {
  describe.each([
    ["with script", true],
    ["without script", false],
  ])("%s", (_, javaScriptEnabled) => {
    test("rows are pasted, the comma is asked about, and the answer puts them in the table", async () => {
      const page = await visit("/demos/ring-closure", { javaScriptEnabled });
      const rows = page.locator("#at-reaction-rateConstant-rows");
      await rows.getByText("Paste rows from a spreadsheet").click();
      await rows.locator("textarea").fill(doubtful);
      await rows.getByLabel(/^Rows already there/).selectOption("replace");
      await rows.getByRole("button", { name: /^Take the rows over/ }).click();
      await rows.getByText("Which is it?").waitFor();
      expect(await rows.locator("textarea").inputValue()).toBe(doubtful);
      await rows.getByRole("button", { name: /^The comma is the decimal sign/ }).click();
      await rows.getByText("3 rows taken over.").waitFor();
      expect(await rows.locator("textarea").inputValue()).toBe("");
      const k = page.locator('[name="/reaction/rateConstant/rows/2/rateConstant"]');
      expect(await k.inputValue()).toBe("3.456 1/h");
      expect(await page.locator('[name="/reaction/rateConstant/rows/3/temperature"]').inputValue()).toBe("");
      await page.context().close();
    });

    test("two identical rows are told beside the table, and gone when one of them is changed", async () => {
      const page = await visit("/demos/ring-closure", { javaScriptEnabled });
      const rows = page.locator("#at-reaction-rateConstant-rows");
      await rows.getByText("Paste rows from a spreadsheet").click();
      await rows.locator("textarea").fill("50 degC;2.05e-6 s^-1");
      await rows.getByRole("button", { name: /^Take the rows over/ }).click();
      const fault = rows.getByText("is the same as row 1; a measurement counts once");
      await fault.waitFor();
      await page.locator('[name="/reaction/rateConstant/rows/5/temperature"]').fill("51 degC");
      if (!javaScriptEnabled) await page.getByRole("button", { name: "Update the form" }).click();
      await fault.waitFor({ state: "detached" });
      await page.context().close();
    });

    test("a failure is begun from a starting point and screened", async () => {
      const page = await visit("/demos/hydrolysis", { javaScriptEnabled });
      await page.getByText("Add a failure from a starting point").click();
      await page.getByRole("button", { name: "Half the heat transfer" }).click();
      await page.locator('[name="/failures/1/name"]').waitFor();
      expect(await page.locator('[name="/failures/1/name"]').inputValue()).toBe("Half the heat transfer");
      await page.getByRole("button", { name: "Screen" }).click();
      await page.locator(".told-table", { hasText: "Half the heat transfer" }).waitFor();
      await page.context().close();
    });

    test("two cases are chosen on the first page and held against each other", async () => {
      const page = await visit("/", { javaScriptEnabled });
      await page.getByLabel("First case").selectOption("demos/acylation");
      await page.getByLabel("Second case").selectOption("demos/hydrolysis");
      await page.getByRole("button", { name: "Compare" }).click();
      await page.locator("#failures-apart").waitFor();
      expect(await page.locator("#figure-compare-windows .figure").count()).toBeGreaterThan(0);
      expect(await page.locator("#inputs-apart").textContent()).toMatch(/Inputs that differ \(\d+\)/);
      await page.context().close();
    });
  });
}
