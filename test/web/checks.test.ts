import express from "express";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { checksLine, runChecks } from "../../server/screening/checks/all.js";
import { notice } from "../../server/screening/notice.js";
import { checksPages } from "../../server/web/checksPages.js";
import { testApp } from "./testApp.js";

/** What the page is made of, without drawing it. */
async function pageOf(run?: Parameters<typeof checksPages>[0]) {
  const app = express();
  let page: unknown;
  app.use((_request, response, next) => {
    response.render = (_name: string, options?: object) => {
      page = options;
      response.end();
    };
    next();
  });
  app.use(checksPages(run));
  await request(app).get("/checks").expect(200);
  return JSON.stringify(page);
}

describe("the page of checks", () => {
  test("shows every check with source, both figures, difference and verdict", async () => {
    const { text } = await request(testApp().app).get("/checks").expect(200);
    const checks = runChecks().flatMap((group) => group.checks);
    expect(text.split("<td>agrees</td>").length - 1).toBe(checks.length);
    for (const { source } of runChecks())
      expect(text).toContain(source.replaceAll("'", "&#39;").replaceAll("&", "&amp;"));
    expect(text).toContain(checksLine());
    expect(text).toContain(notice);
    expect(text).toContain("467.992");
    expect(text).toContain("6.21×10¹²");
    expect(text).not.toContain("DIFFERS");
    expect(text).not.toMatch(/NaN|Infinity|undefined/);
  });

  test("says so where one does not agree, or gives no number at all", async () => {
    const [first, ...rest] = runChecks();
    const broken = {
      ...first,
      checks: first.checks.map((check) => ({
        ...check,
        computed: Number.NaN,
        difference: Number.NaN,
        agrees: false,
      })),
    };
    const page = await pageOf(() => [broken, ...rest]);
    expect(page).toContain(`"failed":${first.checks.length}`);
    expect(page).toContain("no number");
    expect(await pageOf()).toContain('"failed":0');
  });

  test("takes less than 300 ms once the checks have run", async () => {
    const { app } = testApp();
    await request(app).get("/checks");
    const started = performance.now();
    await request(app).get("/checks");
    expect(performance.now() - started).toBeLessThan(300);
  });
});
