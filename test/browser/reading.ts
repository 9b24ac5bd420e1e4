import { describe, expect, test } from "vitest";
import { settled, type Visit } from "./visit.js";

/** Figures that answer a pointer. */
export function reading(visit: Visit): void {
  describe.each([
    ["at a desk", 1280],
    ["on a telephone", 360],
  ])("a pointer over a figure, %s", (_, width) => {
    test("is answered with a row of its table, the one at its place", async () => {
      const page = await visit("/demos/ring-closure", { viewport: { width, height: 800 } });
      await settled(page);
      const figure = page.locator("#figure-tmrad");
      const plot = figure.locator("svg:visible");
      await plot.scrollIntoViewIfNeeded();
      const output = figure.locator(".reading");
      const box = await plot.boundingBox();
      const sides = (await plot.getAttribute("data-frame"))?.split(" ").map(Number) ?? [];
      const viewed = Number((await plot.getAttribute("viewBox"))?.split(" ")[2]);
      const [left = 0, right = 0, top = 0, bottom = 0] = sides;
      if (box === null) throw new Error("The plot is not in sight");
      const scale = box.width / viewed;
      const y = box.y + (scale * (top + bottom)) / 2;
      const rows = figure.locator("tbody tr");
      const answerAt = async (x: number) => {
        await page.mouse.move(box.x + scale * x, y);
        return (await output.textContent()) ?? "";
      };
      expect(await output.textContent()).toBe("");
      const [first, last] = [await answerAt(left + 1), await answerAt(right - 1)];
      const cell = async (at: number) => (await rows.nth(at).locator("td").first().textContent()) ?? "";
      expect(first).toContain(`Temperature, °C: ${await cell(0)} ·`);
      expect(last).toContain("TMRad:");
      expect(last).not.toBe(first);
      expect(await plot.locator(".pointed").count()).toBe(1);
      await page.mouse.move(1, 1);
      expect(await output.textContent()).toBe("");
      expect(await plot.locator(".pointed").count()).toBe(0);
      await page.context().close();
    });

    test("over the cooling failures is answered with the temperature of each of them", async () => {
      const page = await visit("/demos/acylation", { viewport: { width, height: 800 } });
      await settled(page);
      const figure = page.locator("#figure-failures");
      const plot = figure.locator("svg:visible");
      await plot.hover();
      const told = (await figure.locator(".reading").textContent()) ?? "";
      expect(told).toMatch(/ after the failure · 1 .+: (\d+\.\d °C|has passed MTT)/);
      await page.context().close();
    });
  });
}
