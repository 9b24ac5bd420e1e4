import request from "supertest";
import { describe, expect, test } from "vitest";
import { notice } from "../../server/screening/notice.js";
import { glossary } from "../../server/words/glossary.js";
import { demos, testApp } from "./testApp.js";

const { app } = testApp();
const page = async (path: string): Promise<string> => (await request(app).get(path).expect(200)).text;
const wrongNumbers = /\bNaN\b|Infinity|\bundefined\b|\[object /;

describe("the glossary", () => {
  test("has each term under its anchor, its formula in MathML", async () => {
    const text = await page("/glossary");
    const terms = glossary.flatMap((group) => group.terms);
    expect(terms.length).toBeGreaterThan(60);
    for (const { id } of terms) expect(text).toContain(`id="${id}"`);
    expect(text.split("<mfrac>").length).toBeGreaterThan(15);
    expect(text).not.toMatch(wrongNumbers);
  });

  test("is where the links of a case lead", async () => {
    const anchors = new Set(glossary.flatMap((group) => group.terms).map(({ id }) => id));
    for (const { name } of demos) {
      const links = [...(await page(`/demos/${name}`)).matchAll(/href="\/glossary#([^"]+)"/g)].map(
        ([, id]) => id,
      );
      expect(links.length).toBeGreaterThan(15);
      for (const link of links) expect(anchors).toContain(link);
    }
  });
});

test("every page leads to glossary, checks and interface", async () => {
  for (const path of ["/", "/cases/new", "/glossary", "/checks", "/interface"]) {
    const text = await page(path);
    for (const link of ["/glossary", "/checks", "/interface"]) expect(text).toContain(`href="${link}"`);
  }
});

test("pages that show results carry the notice", async () => {
  for (const path of ["/checks", "/interface"]) expect(await page(path)).toContain(notice);
});

describe("the working of a case", () => {
  test("stands on its page with equations and numbers put in", async () => {
    const text = await page("/demos/acylation");
    const working = text.slice(text.indexOf('id="working"'));
    expect(working.split('class="method"').length).toBeGreaterThan(11);
    expect(working).toContain("<math>");
    // MTSR by hand: 308.15 + 395.73985 × 118 000/(3.5463197×10⁶) = 321.32 K
    expect(working).toMatch(/<mn>321\.32<\/mn>/);
    expect(working).not.toMatch(wrongNumbers);
  });

  test("comes with the findings while one types", async () => {
    const { formOf, formValues } = await import("../../server/case/form.js");
    const body = new URLSearchParams(formValues(formOf(demos[0]?.document))).toString();
    const answer = await request(app).post("/findings?parts=quick").send(body).expect(200);
    expect(answer.text).toContain('id="working"');
  });
});
