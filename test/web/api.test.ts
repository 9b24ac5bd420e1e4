import request from "supertest";
import { describe, expect, test } from "vitest";
import { brokenDocuments } from "../case/brokenDocuments.js";
import { demoDocument, testApp } from "./testApp.js";

const { app } = testApp();
const screenText = (text: string) =>
  request(app).post("/api/screen").set("Content-Type", "application/json").send(text);

/** Texts that a number which went wrong leaves behind. */
const wrongNumbers = /\bNaN\b|Infinity|\bundefined\b/;

describe("POST /api/screen", () => {
  test("a case is answered with findings, the notice first", async () => {
    const answer = await request(app).post("/api/screen").send(demoDocument());
    expect(answer.status).toBe(200);
    expect(answer.type).toBe("application/json");
    expect(Object.keys(answer.body).slice(0, 2)).toEqual(["format", "notice"]);
    expect(answer.body.temperatures.mtsr_K).toBeGreaterThan(answer.body.temperatures.process_K);
    expect(answer.text).not.toMatch(wrongNumbers);
  });

  test("quick findings leave out failures and draws, and change nothing else", async () => {
    const full = await request(app).post("/api/screen").send(demoDocument());
    const quick = await request(app).post("/api/screen?parts=quick").send(demoDocument());
    expect(quick.body.failures).toBeNull();
    expect(quick.body.uncertainty).toBeNull();
    expect(quick.body.temperatures).toEqual(full.body.temperatures);
  });

  test("over 200 broken documents: each gets 422 and faults with pointers", async () => {
    expect(brokenDocuments.length).toBeGreaterThanOrEqual(200);
    for (const broken of brokenDocuments) {
      const answer = await screenText(JSON.stringify(broken.document));
      expect.soft([broken.name, answer.status]).toEqual([broken.name, 422]);
      expect.soft(answer.type).toBe("application/problem+json");
      expect.soft(answer.body).toMatchObject({ type: "about:blank", status: 422 });
      expect.soft(answer.body.faults.length).toBeGreaterThan(0);
      expect.soft(answer.text, broken.name).not.toMatch(/\bNaN\b|\bundefined\b/);
      for (const fault of answer.body.faults) {
        expect.soft(fault.pointer).toMatch(/^(\/.*)?$/s);
        expect.soft(fault.message).not.toBe("");
      }
    }
  });

  test("what is not JSON gets 400", async () => {
    for (const text of ["", "{", "{'title': 1}", "NaN", '{"title": "a"} x', "\u0000"]) {
      const answer = await screenText(text);
      expect.soft([text, answer.status, answer.type]).toEqual([text, 400, "application/problem+json"]);
      expect.soft(answer.body.faults).toHaveLength(1);
    }
  });

  test("JSON that is no case gets 422", async () => {
    for (const text of ["null", "[]", "3", '"text"', "{}", '{"__proto__": {"title": "x"}}']) {
      const answer = await screenText(text);
      expect.soft([text, answer.status]).toEqual([text, 422]);
    }
  });

  test("3 MB gets 413, and so does a case just over 256 KiB", async () => {
    for (const size of [3_000_000, 256 * 1024]) {
      const text = JSON.stringify({ ...demoDocument(), title: "x".repeat(size) });
      const answer = await screenText(text);
      expect([answer.status, answer.type]).toEqual([413, "application/problem+json"]);
    }
  });

  test("a small body that unpacks to 3 MB gets 413", async () => {
    const { gzipSync } = await import("node:zlib");
    const packed = gzipSync(JSON.stringify({ title: "x".repeat(3_000_000) }));
    const answer = await request(app)
      .post("/api/screen")
      .set("Content-Type", "application/json")
      .set("Content-Encoding", "gzip")
      .serialize((body: unknown) => body as string)
      .send(packed);
    expect(answer.status).toBe(413);
  });

  test("another type gets 415, with or without a body", async () => {
    for (const type of ["text/plain", "application/x-www-form-urlencoded", "application/xml"]) {
      const answer = await request(app).post("/api/screen").set("Content-Type", type).send("title=x");
      expect([answer.status, answer.type]).toEqual([415, "application/problem+json"]);
    }
    expect((await request(app).post("/api/screen")).status).toBe(415);
    const packed = await screenText("{}").set("Content-Encoding", "zap");
    expect(packed.status).toBe(415);
  });

  test("another method and another part are named", async () => {
    const get = await request(app).get("/api/screen");
    expect([get.status, get.headers.allow]).toEqual([405, "POST"]);
    const part = await request(app).post("/api/screen?parts=some").send(demoDocument());
    expect([part.status, part.body.detail]).toEqual([400, expect.stringContaining("quick")]);
  });
});

describe("POST /api/sheet", () => {
  test("a case is answered with a PDF, the same bytes for the same case", async () => {
    const ask = () => request(app).post("/api/sheet").responseType("blob").send(demoDocument());
    const [first, second] = [await ask(), await ask()];
    expect([first.status, first.type]).toEqual([200, "application/pdf"]);
    expect(first.body.subarray(0, 5).toString()).toBe("%PDF-");
    expect(second.body.equals(first.body)).toBe(true);
  });

  test("a broken case gets its faults, not a sheet", async () => {
    const answer = await request(app)
      .post("/api/sheet")
      .send({ ...demoDocument(), mixture: {} });
    expect([answer.status, answer.type]).toEqual([422, "application/problem+json"]);
    expect(answer.body.faults.map((fault: { pointer: string }) => fault.pointer)).toContain("/mixture/mass");
  });
});

test("GET /api/case-schema gives a JSON Schema", async () => {
  const answer = await request(app).get("/api/case-schema");
  expect(answer.status).toBe(200);
  expect(JSON.parse(answer.text)).toMatchObject({ type: "object" });
});
