import request from "supertest";
import { describe, expect, test } from "vitest";
import { filled } from "./filled.js";
import { demoDocument, testApp } from "./testApp.js";

describe("markup in what is typed", () => {
  const markup = `"><script>alert(1)</script><b onmouseover='x'>&amp;`;

  test("is text on every page, in attributes and in drawings", async () => {
    const { app, cases } = testApp();
    const document = { ...demoDocument(), title: markup };
    const { id } = await cases.create(document);
    for (const { text } of [
      await request(app).get("/"),
      await request(app).get(`/cases/${id}`),
      await request(app).post("/findings").send(filled(document)),
      await request(app)
        .post(`/cases/${id}`)
        .send(filled({ ...document, mixture: { mass: markup } }, { do: "save", revision: "9" })),
    ]) {
      expect(text).not.toContain("<script>alert");
      expect(text).not.toContain("<b on");
    }
    const opened = await request(app).post("/open").field("text", markup);
    expect(opened.text).not.toContain("<script>alert");
  });

  test("is text in every field of a case at once, and in the drawings that name them", async () => {
    const { app } = testApp();
    const everywhere = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(everywhere);
      if (typeof value !== "object" || value === null) return typeof value === "string" ? markup : value;
      return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, everywhere(each)]));
    };
    const broken = await request(app)
      .post("/open")
      .field("text", JSON.stringify(everywhere(demoDocument())));
    expect(broken.text.split("&lt;script&gt;").length).toBeGreaterThan(20);
    expect(broken.text).not.toContain("<script>alert");
    const named = demoDocument("hydrolysis");
    const failures = (named.failures as Record<string, unknown>[]).map((each) => ({ ...each, name: markup }));
    const drawn = await request(app)
      .post("/cases/new")
      .send(filled({ ...named, failures }, { do: "screen" }))
      .expect(200);
    const drawings = drawn.text.match(/<svg class="figure[\s\S]*?<\/svg>/g) ?? [];
    expect(drawings.join("")).toContain("&lt;script&gt;");
    expect(drawn.text).not.toContain("<script>alert");
    expect(drawn.text).not.toContain("<b on");
  });

  test("in the address of a missing page is not repeated", async () => {
    const { text } = await request(testApp().app).get("/cases/%3Cscript%3Ealert(1)").expect(404);
    expect(text).not.toContain("alert");
  });
});
