import { readFile } from "node:fs/promises";
import type { Page } from "playwright-core";
import { describe, expect, test } from "vitest";
import { formOf, formValues } from "../../server/case/form.js";
import { pageTexts } from "../sheet/readPdf.js";
import { demoDocument } from "../web/testApp.js";
import type { Visit } from "./visit.js";

async function mtsr(page: Page): Promise<string> {
  const place = page.locator(".numbers div", { hasText: "MTSR reached" }).locator("dd");
  return (await place.textContent()) ?? "";
}

/** What a person sees of every control that is not empty. */
async function typed(page: Page): Promise<Record<string, string>> {
  return page.locator("#inputs").evaluate((form) => {
    const controls = [...(form as HTMLFormElement).elements] as HTMLInputElement[];
    return Object.fromEntries(controls.map(({ name, value }) => [name, value]));
  });
}

/** Flows of editing a case, with and without script. */
export function editing(visit: Visit): void {
  describe("with script", () => {
    test("a demo is opened, its temperature is changed, and the findings follow the typing", async () => {
      const page = await visit("/");
      await page.getByRole("link", { name: /Ring closure/ }).click();
      const before = await mtsr(page);
      await page.getByLabel("Process temperature").first().fill("60 degC");
      await page.waitForFunction(
        (old) => !document.querySelector("#outcome")?.textContent?.includes(old),
        before,
      );
      expect(Number.parseFloat(await mtsr(page))).toBeCloseTo(Number.parseFloat(before) - 25, 1);
      expect(await page.locator("#state").textContent()).toContain("Changed");
      await page.context().close();
    });

    test("an emptied field has its fault beside it, and it goes when the field is filled again", async () => {
      const page = await visit("/demos/ring-closure");
      const mass = page.locator('[name="/mixture/mass"]');
      await mass.fill("");
      await page.locator("#at-mixture-mass-fault:not(:empty)").waitFor();
      expect(await mass.getAttribute("aria-invalid")).toBe("true");
      expect(await page.locator("#findings").getAttribute("class")).toContain("stale");
      expect(await page.locator("#faults").textContent()).toContain("One field needs another look");
      await mass.fill("1900 kg");
      await page.locator("#faults").waitFor({ state: "detached" });
      expect(await page.locator("#at-mixture-mass-fault").textContent()).toBe("");
      expect(await mass.getAttribute("aria-invalid")).toBeNull();
      await page.context().close();
    });

    test("a quantity is read back in the SI as it is typed, and not where it cannot be read", async () => {
      const page = await visit("/demos/ring-closure");
      const read = page.locator("#at-reaction-temperature-read");
      const temperature = page.locator('[name="/reaction/temperature"]');
      expect(await read.textContent()).toMatch(/^= 3\d\d\.15 K$/);
      await temperature.fill("36.5 degC");
      await read.getByText("= 309.65 K", { exact: true }).waitFor();
      await temperature.fill("36.5");
      await page.locator("#at-reaction-temperature-read:empty").waitFor({ state: "attached" });
      await page.context().close();
    });

    test("a failure is added without a new page, and the cursor stands in its first field", async () => {
      const page = await visit("/demos/hydrolysis");
      await page.locator('[name="/mixture/mass"]').fill("801 kg");
      await page.getByRole("button", { name: /^Add.*Failure/ }).click();
      await page.locator('[name="/failures/1/name"]').waitFor();
      expect(await page.evaluate(() => document.activeElement?.getAttribute("name"))).toBe(
        "/failures/1/name",
      );
      expect(await page.locator('[name="/mixture/mass"]').inputValue()).toBe("801 kg");
      await page.context().close();
    });

    test("a choice brings the fields that it calls for", async () => {
      const page = await visit("/demos/hydrolysis");
      await page.locator('[name="/reaction/operation"]').selectOption("semibatch");
      await page.locator('[name="/reaction/feed/duration"]').waitFor();
      await page.context().close();
    });

    test("going back finds what was typed, with its findings", async () => {
      const page = await visit("/demos/ring-closure");
      const before = await mtsr(page);
      await page.locator('[name="/reaction/temperature"]').fill("61 degC");
      await page.waitForFunction(
        (old) => !document.querySelector("#outcome")?.textContent?.includes(old),
        before,
      );
      await page.goto("/");
      await page.goBack();
      expect(await page.locator('[name="/reaction/temperature"]').inputValue()).toBe("61 degC");
      await page.waitForFunction(
        (old) => !document.querySelector("#outcome")?.textContent?.includes(old),
        before,
      );
      await page.context().close();
    });
  });

  describe("without script", () => {
    const plain = { javaScriptEnabled: false };

    test("a demo is opened, its temperature is changed, and Screen gives other findings", async () => {
      const page = await visit("/", plain);
      await page.getByRole("link", { name: /Ring closure/ }).click();
      const before = await mtsr(page);
      await page.locator('[name="/reaction/temperature"]').fill("60 degC");
      await page.getByRole("button", { name: "Screen" }).click();
      expect(Number.parseFloat(await mtsr(page))).toBeCloseTo(Number.parseFloat(before) - 25, 1);
      await page.context().close();
    });

    test("an emptied field has its fault beside it, the list leads to it, the rest is kept", async () => {
      const page = await visit("/demos/ring-closure", plain);
      await page.locator('[name="/vessel/coolant/temperature"]').fill("15 bananas");
      await page.locator('[name="/mixture/mass"]').fill("");
      await page.getByRole("button", { name: "Screen" }).click();
      expect(await page.locator("#at-mixture-mass-fault").textContent()).toContain("missing");
      expect(await page.locator('[name="/vessel/coolant/temperature"]').inputValue()).toBe("15 bananas");
      expect(await page.locator('[name="/reaction/rateConstant/rows/4/temperature"]').inputValue()).toBe(
        "78 degC",
      );
      await page.locator("#faults").getByRole("link", { name: "Mixture: mass" }).click();
      expect(page.url()).toContain("#at-mixture-mass");
      await page.context().close();
    });

    test("Enter in a field screens, and does not remove or add anything", async () => {
      const page = await visit("/demos/ring-closure", plain);
      await page.locator('[name="/reaction/temperature"]').fill("62 degC");
      await page.locator('[name="/reaction/temperature"]').press("Enter");
      await page.waitForLoadState();
      const { "/reaction/temperature": temperature, ...rest } = await typed(page);
      const demo = await visit("/demos/ring-closure", plain);
      const { "/reaction/temperature": _, ...before } = await typed(demo);
      expect(temperature).toBe("62 degC");
      expect(rest).toEqual(before);
      await demo.context().close();
      await page.context().close();
    });

    test("a failure is added and removed by buttons", async () => {
      const page = await visit("/demos/hydrolysis", plain);
      await page.getByRole("button", { name: /^Add.*Failure/ }).click();
      await page.locator('[name="/failures/1/name"]').waitFor();
      await page.locator('[name="do"][value="remove:/failures/1"]').click();
      await page.locator('[name="/failures/1/name"]').waitFor({ state: "detached" });
      await page.context().close();
    });
  });

  test.each([true, false])("a case is typed into the blank form (script: %s)", async (javaScriptEnabled) => {
    const page = await visit("/cases/new", { javaScriptEnabled });
    await page.getByRole("button", { name: /^Add.*Failure/ }).click();
    await page.locator('[name="/failures/0/name"]').waitFor();
    const demo = formValues(formOf(demoDocument("hydrolysis")));
    for (const [name, value] of demo.filter(([, text]) => text !== "")) {
      const control = page.locator(`[name="${name}"], [name="${name.replace(/\/value$/, "")}"]`).first();
      if ((await control.evaluate((each) => each.tagName)) === "SELECT") await control.selectOption(value);
      else
        await control.evaluate((each, text) => {
          (each as HTMLInputElement).value = text;
        }, value);
    }
    await page.getByRole("button", { name: "Screen" }).click();
    await page.locator(".verdict").waitFor();
    const there = await visit("/demos/hydrolysis", { javaScriptEnabled });
    expect(await mtsr(page)).toBe(await mtsr(there));
    await there.context().close();
    await page.context().close();
  });

  test("the sheet is downloaded and holds the MTSR of the page", async () => {
    const page = await visit("/demos/ring-closure");
    const value = await mtsr(page);
    const [download] = await Promise.all([
      page.waitForEvent("download"),
      page.getByRole("button", { name: /^Sheet/ }).click(),
    ]);
    expect(download.suggestedFilename()).toMatch(/^ring-closure.*\.pdf$/);
    const text = (await pageTexts(await readFile(await download.path()))).join("\n");
    expect(text).toContain("MTSR");
    expect(text).toContain(value);
    await page.context().close();
  });
}
