import express from "express";
import request from "supertest";
import { describe, expect, test } from "vitest";
import { headers, ownHostOnly, ownOriginWrites } from "../../server/web/security.js";

function guarded(host: string) {
  const app = express();
  app.use(headers(), ownHostOnly([host]), ownOriginWrites());
  app.all("/api/any", (_request, response) => {
    response.send("answered");
  });
  return app;
}

describe("the host check", () => {
  test.each(["127.0.0.1:3000", "localhost", "LOCALHOST:80", "[::1]:3000", "reactor.example:443"])(
    "%s is this server",
    async (host) => {
      await request(guarded("reactor.example")).get("/api/any").set("Host", host).expect(200);
    },
  );

  test.each([
    "evil.example",
    "127.0.0.1.evil.example",
    "localhost.evil.example:3000",
    "127.0.0.1@evil.example",
    "0.0.0.0",
    "10.0.0.7:3000",
  ])("%s is refused, reading and writing", async (host) => {
    const app = guarded("127.0.0.1");
    for (const method of ["get", "post"] as const) {
      const answer = await request(app)[method]("/api/any").set("Host", host);
      expect(answer.status).toBe(421);
      expect(answer.type).toBe("application/problem+json");
    }
  });
});

describe("the origin check", () => {
  const app = guarded("127.0.0.1");

  test("a page of this server and a program may write", async () => {
    const write = () => request(app).post("/api/any").set("Host", "127.0.0.1:3000");
    await write().expect(200);
    await write().set("Origin", "http://127.0.0.1:3000").expect(200);
    await write().set("Sec-Fetch-Site", "same-origin").expect(200);
    await write().set("Origin", "https://127.0.0.1:3000").expect(200);
  });

  test.each(["http://evil.example", "http://127.0.0.1:4000", "http://localhost:3000", "null", "nonsense"])(
    "a write from %s is refused",
    async (origin) => {
      await request(app).post("/api/any").set("Host", "127.0.0.1:3000").set("Origin", origin).expect(403);
    },
  );

  test.each(["cross-site", "same-site"])("a write that the browser calls %s is refused", async (site) => {
    await request(app).post("/api/any").set("Sec-Fetch-Site", site).expect(403);
    await request(app).delete("/api/any").set("Sec-Fetch-Site", site).expect(403);
    await request(app).get("/api/any").set("Sec-Fetch-Site", site).expect(200);
  });
});

describe("the headers", () => {
  test("nothing inline, nothing from elsewhere, no frames", async () => {
    const { headers } = await request(guarded("127.0.0.1")).get("/api/any");
    const policy = headers["content-security-policy"] ?? "";
    expect(policy).toContain("default-src 'none'");
    expect(policy).not.toMatch(/unsafe|https?:|data:|\*/);
    expect(policy).toContain("frame-ancestors 'none'");
    expect(headers["x-content-type-options"]).toBe("nosniff");
    expect(headers["x-powered-by"]).toBeUndefined();
  });

  test("browsers name this server as the origin of its own forms", async () => {
    const { headers } = await request(guarded("127.0.0.1")).get("/api/any");
    expect(headers["referrer-policy"]).toBe("same-origin");
  });
});
