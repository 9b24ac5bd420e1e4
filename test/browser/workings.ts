import { describe, expect, test } from "vitest";
import type { Visit } from "./visit.js";

const field = "/vessel/heatTransferArea";

// Invented vessel.
const dimensions = {
  innerDiameter: "1400 mm",
  wallThickness: "12 mm",
  fillVolume: "1.5 m^3",
  jacketLower: "0.1 m",
  jacketUpper: "1.2 m",
};

/** Flows of filling a field from its working, with and without script. */
export function workings(visit: Visit): void {
  describe("working out the area", () => {
    test.each([true, false])("fills the field and takes it back, script: %s", async (javaScriptEnabled) => {
      const page = await visit("/demos/ring-closure", { javaScriptEnabled });
      const control = (key: string) => page.locator(`[name="${field}From/${key}"]`);
      await page.getByRole("button", { name: /from the vessel's dimensions/ }).click();
      await control("bottom").selectOption("kloepper");
      if (!javaScriptEnabled) await page.getByRole("button", { name: "Update the form" }).click();
      await control("innerDiameter").waitFor();
      for (const [key, text] of Object.entries(dimensions)) await control(key).fill(text);
      const typed = await page.locator(`[name="${field}"]`).inputValue();
      const table = page.locator("#working-at-vessel-heatTransferArea table");
      // With script the working stands there while someone types, and nothing is filled yet.
      if (javaScriptEnabled) {
        await table.waitFor();
        expect(await page.locator(`[name="${field}"]`).inputValue()).toBe(typed);
      }
      await page.getByRole("button", { name: "Work out the area" }).click();
      await page.getByRole("button", { name: `Undo: back to ${typed}` }).waitFor();
      expect(await page.locator(`[name="${field}/value"], [name="${field}"]`).first().inputValue()).toBe(
        "4.55 m^2",
      );
      expect(await table.textContent()).toContain("4.557 m²");
      await page.getByRole("button", { name: /^Undo/ }).click();
      await page.getByRole("button", { name: /^Undo/ }).waitFor({ state: "detached" });
      expect(await page.locator(`[name="${field}"]`).inputValue()).toBe(typed);
      await page.context().close();
    });

    test("says while someone types that the field no longer follows", async () => {
      const page = await visit("/demos/ring-closure");
      await page.getByRole("button", { name: /from the vessel's dimensions/ }).click();
      await page.locator(`[name="${field}From/bottom"]`).selectOption("kloepper");
      await page.locator(`[name="${field}From/innerDiameter"]`).waitFor();
      for (const [key, text] of Object.entries(dimensions)) {
        await page.locator(`[name="${field}From/${key}"]`).fill(text);
      }
      await page.getByRole("button", { name: "Work out the area" }).click();
      const working = page.locator("#working-at-vessel-heatTransferArea");
      await working.getByText("which follows from this").waitFor();
      await page.locator(`[name="${field}From/fillVolume"]`).fill("1 m^3");
      await working.getByText("one of the two has changed since").waitFor();
      await page.locator(".caution", { hasText: "INPUT_MOVED" }).waitFor();
      await page.context().close();
    });
  });
}
