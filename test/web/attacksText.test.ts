import type { Browser, Page } from "playwright-core";
import request from "supertest";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { figuresOf } from "../../server/charts/figures.js";
import { drawSvg } from "../../server/charts/svg.js";
import type { Findings } from "../../server/screening/findings.js";
import { startBrowser } from "../browser/browser.js";
import { completeCase, edited, everyChoice } from "../case/completeCases.js";
import { openPdf, pageTexts } from "../sheet/readPdf.js";
import { filled } from "./filled.js";
import { testApp } from "./testApp.js";

/** Breaks out of attributes, elements and PDF strings, where something lets it; the number tells the field. */
function attack(field: number): string {
  return `${field}"'></title></textarea></option></svg>)>><x-mark onclick=alert(${field})></x-mark><script>alert(${field})</script><img src=x onerror=alert(${field})>`;
}

/** Pointers of all texts in a document. */
function textsIn(value: unknown, pointer = ""): readonly string[] {
  if (typeof value === "string") return [pointer];
  if (typeof value !== "object" || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => textsIn(inner, `${pointer}/${key}`));
}

/** A document with an attack in each of these texts. */
function attacked(document: unknown, pointers: readonly string[]): unknown {
  return pointers.reduce<unknown>((made, pointer, field) => edited(made, pointer, attack(field)), document);
}

/** Texts that may say anything: the case is still whole with an attack in them. */
function freeTexts(document: unknown): readonly string[] {
  return textsIn(document).filter((pointer) => readCase(edited(document, pointer, attack(0))).ok);
}

const { app, cases } = testApp();
const whole = completeCase();
const free = freeTexts(whole);
const marked = attacked(whole, free);

let browser: Browser;
let page: Page;
let alerts = 0;

beforeAll(async () => {
  browser = await startBrowser();
  page = await browser.newPage();
  page.on("dialog", (dialog) => {
    alerts += 1;
    return dialog.dismiss();
  });
});
afterAll(() => browser?.close());

/** Parses a page as a browser does, without the policy that would keep a script from running. */
async function expectHarmless(html: string, shown: readonly number[]): Promise<void> {
  await page.setContent(html, { waitUntil: "domcontentloaded" });
  const found = await page.evaluate(() => ({
    made: document.querySelectorAll("x-mark, img, script:not([src]), [onclick], [onerror]").length,
    text: [
      document.documentElement.textContent,
      ...[...document.querySelectorAll("input")].map((each) => each.value),
    ].join("\n"),
  }));
  expect.soft([found.made, alerts]).toEqual([0, 0]);
  for (const field of shown) expect.soft(found.text, String(field)).toContain(attack(field));
}

const indices = (pointers: readonly unknown[]) => pointers.map((_, index) => index);

describe("a script in a text", () => {
  test("the check itself notices one that is let through", async () => {
    await page.setContent(`<p title="${attack(1)}">`);
    expect(await page.locator("x-mark, img, script").count()).toBe(3);
    await expect.poll(() => alerts).toBe(2);
    alerts = 0;
  });

  test("every free text is among those that are attacked", () => {
    expect(free).toEqual(
      expect.arrayContaining([
        "/title",
        "/batch/record",
        "/batch/step",
        "/batch/vessel",
        "/batch/preparedBy",
        "/reaction/name",
        "/reaction/reactants/A/name",
        "/reaction/rateConstant/activationEnthalpy/source",
        "/failures/0/name",
        "/slips/0/name",
      ]),
    );
  });

  test("any free text, on the page of a whole case with its full findings", async () => {
    const { text } = await request(app)
      .post("/cases/new")
      .send(filled(marked, { do: "screen" }));
    expect(text).toContain("<svg");
    await expectHarmless(text, indices(free));
  });

  test("any text at all, on the page of a case that is refused for it", async () => {
    for (const document of everyChoice().filter((_, index) => index % 4 === 0)) {
      const texts = textsIn(document).filter((pointer) => pointer !== "/format");
      const { id } = await cases.create(attacked(document, texts));
      const { text } = await request(app).get(`/cases/${id}`).expect(200);
      expect(text).toContain("another look");
      await expectHarmless(text, [0]);
    }
  });

  test("in the lists, the register, a review, a conflict, a comparison and what is sought for", async () => {
    const { id } = await cases.create(marked);
    const other = await cases.create(whole);
    const ask = async (path: string) => (await request(app).get(path)).text;
    const send = async (path: string, body: string) => (await request(app).post(path).send(body)).text;
    await expectHarmless(await ask("/"), [free.indexOf("/title")]);
    await cases.save(id, 1, { document: whole });
    await expectHarmless(await send(`/cases/${id}`, filled(marked, { do: "save", revision: "1" })), []);
    await cases.save(id, 2, { document: marked });
    const pair = `first=cases/${id}&second=cases/${other.id}`;
    await expectHarmless(await ask(`/compare?parts=quick&${pair}`), [free.indexOf("/title")]);

    await request(app).post("/cases/new/file").send(filled(marked)).expect(303);
    const review = {
      reviewer: attack(1),
      reviewedOn: "2026-02-03",
      conclusion: "objection",
      remark: attack(2),
    };
    await request(app).post("/register/1/reviews").send(new URLSearchParams(review).toString()).expect(303);
    await expectHarmless(await ask("/register"), [free.indexOf("/title"), free.indexOf("/batch/record")]);
    await expectHarmless(await ask("/register/1"), [1, 2]);
    await expectHarmless(await send("/cases/new/file", filled(marked)), [free.indexOf("/title")]);
    const typed = encodeURIComponent(attack(3));
    await expectHarmless(await ask(`/register?title=${typed}&from=${typed}&record=${typed}`), [3]);
    await expectHarmless(await ask(`/cases/${typed}`), []);
    await expectHarmless(await send("/register/1/reviews", `reviewer=${typed}&remark=${typed}`), [3]);
    const opened = await request(app).post("/open").field("text", attack(4));
    await expectHarmless(opened.text, [4]);
  });

  test("in every drawing, read as a document of its own", async () => {
    const findings = await findingsOf(marked);
    const drawings = figuresOf(findings)
      .map(drawSvg)
      .join("")
      .split(/(?=<svg)/);
    expect(drawings.join("")).toContain("&lt;x-mark");
    const found = await page.evaluate(
      (texts) =>
        texts.flatMap((text) => {
          const drawing = new DOMParser().parseFromString(text, "image/svg+xml");
          const names = [...drawing.querySelectorAll("*")].flatMap((each) => [
            each.localName,
            ...each.getAttributeNames(),
          ]);
          return names.filter((name) => /^(on.*|script|img|x-mark|foreignObject|parsererror)$/i.test(name));
        }),
      drawings,
    );
    expect(drawings.length).toBeGreaterThan(10);
    expect(found).toEqual([]);
  });

  test("on the sheet, it is printed as it was typed, and the PDF does nothing", async () => {
    const answer = await request(app)
      .post("/api/sheet")
      .responseType("blob")
      .send(marked as object)
      .expect(200);
    const printed = (await pageTexts(answer.body)).join("").replace(/\s/g, "");
    for (const [field, pointer] of free.entries()) {
      expect.soft(printed, pointer).toContain(attack(field).replace(/\s/g, ""));
    }
    const pdf = await openPdf(answer.body);
    expect([await pdf.getJSActions(), await pdf.getOpenAction(), await pdf.getFieldObjects()]).toEqual([
      null,
      null,
      null,
    ]);
    for (let number = 1; number <= pdf.numPages; number += 1) {
      const annotations = await (await pdf.getPage(number)).getAnnotations();
      expect(annotations.filter((each) => each.url !== undefined || each.actions != null)).toEqual([]);
    }
    await pdf.destroy();
  });

  test("in answers to programs it stays data: browsers are told not to take them for pages", async () => {
    const send = (document: unknown) =>
      request(app)
        .post("/api/screen")
        .send(document as object);
    for (const document of [marked, attacked(whole, textsIn(whole).slice(0, 20))]) {
      const { headers } = await send(document);
      expect(headers["content-type"]).toMatch(/^application\/(problem\+)?json/);
      expect(headers["x-content-type-options"]).toBe("nosniff");
    }
  });
});

async function findingsOf(document: unknown): Promise<Findings> {
  const answer = await request(app)
    .post("/api/screen")
    .send(document as object);
  return answer.body;
}
