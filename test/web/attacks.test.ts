import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { createServer, request as rawRequest, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import request from "supertest";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { caseStore } from "../../server/files/cases.js";
import { register } from "../../server/files/register.js";
import { folderStorage } from "../../server/files/storage.js";
import { type Route, routesOf } from "./routes.js";
import { demoDocument, testApp } from "./testApp.js";

/** What is asked of every server, and tells nothing that it holds. */
const signs = ["/health", "/ready"];

/** A route with something in the place of each identifier. */
function filledIn({ path }: Route, identifier: string): string {
  return path.replace(/:\w+/g, identifier);
}

describe("a foreign site", () => {
  const { app, cases } = testApp();
  const routes = routesOf(app).filter((route) => !signs.includes(route.path));

  test("whose name resolves to this machine reads and writes nothing, at any address", async () => {
    expect(routes.length).toBeGreaterThan(20);
    for (const route of routes) {
      const path = filledIn(route, "1");
      const answer = await request(app)[route.method](path).set("Host", "rebound.example:3000");
      expect.soft([route.method, path, answer.status]).toEqual([route.method, path, 421]);
    }
  });

  test("cannot have a visitor's browser send anything, by Origin or by Sec-Fetch-Site", async () => {
    const writes = routes.filter((route) => route.method === "post");
    expect(writes.length).toBeGreaterThan(8);
    for (const route of writes) {
      const path = filledIn(route, "1");
      const post = () => request(app).post(path).set("Host", "127.0.0.1:3000").type("form").send("do=save");
      for (const [name, value] of [
        ["Origin", "https://evil.example"],
        ["Origin", "null"],
        ["Sec-Fetch-Site", "cross-site"],
        ["Sec-Fetch-Site", "same-site"],
      ] as const) {
        const answer = await post().set(name, value);
        expect.soft([path, name, value, answer.status]).toEqual([path, name, value, 403]);
      }
    }
    expect(await cases.list()).toEqual([]);
  });

  test("may not read an answer: nothing is shared across origins", async () => {
    for (const path of ["/", "/api/case-schema", "/health"]) {
      const { headers } = await request(app).get(path).set("Origin", "https://evil.example");
      expect(Object.keys(headers).filter((name) => name.startsWith("access-control"))).toEqual([]);
      expect(headers["cross-origin-resource-policy"]).toBe("same-origin");
    }
  });
});

describe("an identifier that is a path", () => {
  const secret = "Batch 13, not for everyone";
  let folder: string;
  let server: Server;
  let routes: readonly Route[];

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), "paths-"));
    const storage = folderStorage(join(folder, "data"));
    const cases = caseStore(storage);
    const { id } = await cases.create({ ...demoDocument(), title: secret });
    // The same outside the folder of cases, where only a path would lead.
    const stray = { format: "thermal-window/saved-1", savedAt: "", document: { title: "Stray secret" } };
    for (const place of [folder, join(folder, "data")]) {
      await writeFile(join(place, "abcdefghjkmn-000001.json"), JSON.stringify(stray));
    }
    const { app } = testApp(cases, undefined, register(storage));
    routes = routesOf(app).filter((route) => route.path.includes(":"));
    server = createServer(app);
    await new Promise<void>((ready) => server.listen(0, "127.0.0.1", ready));
    expect((await ask("get", `/cases/${id}`)).text).toContain(secret);
  });

  afterAll(async () => {
    server.close();
    await rm(folder, { recursive: true });
  });

  /** Sends a path as it stands: other clients would put it in order first. */
  function ask(method: Route["method"], path: string): Promise<{ status: number; text: string }> {
    const { port } = server.address() as AddressInfo;
    return new Promise((resolve, reject) => {
      const asking = rawRequest({ port, path, method, agent: false }, (answer) => {
        let text = "";
        answer.on("data", (chunk) => {
          text += chunk;
        });
        answer.on("end", () => resolve({ status: answer.statusCode ?? 0, text }));
      });
      asking.on("error", reject).end();
    });
  }

  test.each([
    "..",
    "../..",
    "../abcdefghjkmn",
    "..%2fabcdefghjkmn",
    "%2e%2e%2f%2e%2e%2fabcdefghjkmn",
    "..%5cabcdefghjkmn",
    "....//abcdefghjkmn",
    "..;/abcdefghjkmn",
    "abcdefghjkmn%00",
    "..%c0%afabcdefghjkmn",
    "%252e%252e%252fabcdefghjkmn",
    "../../../../../../etc/passwd",
    "..%2f..%2f..%2f..%2f..%2fetc%2fpasswd",
    "1%2f..%2f..",
    "__proto__",
    "-1",
    "1e9",
    "a".repeat(4000),
  ])("%s leads nowhere, in any place of any route", async (identifier) => {
    expect(routes.length).toBeGreaterThan(10);
    for (const route of routes) {
      const path = filledIn(route, identifier);
      const { status, text } = await ask(route.method, path);
      expect.soft([route.method, path, status]).toEqual([route.method, path, status === 400 ? 400 : 404]);
      expect.soft(text).not.toMatch(/root:|secret|not for everyone|node_modules|server\/web/);
    }
    const sides = `first=cases/${identifier}&second=demos/${identifier}`;
    const { status, text } = await ask("get", `/compare?${sides}`);
    expect(status).toBe(404);
    expect(text).not.toMatch(/root:|secret/);
  });

  test.each([
    "/../package.json",
    "/page.css/../../package.json",
    "/fonts/../../package.json",
    "/%2e%2e/package.json",
    "/fonts/..%2f..%2fpackage.json",
    "//etc/passwd",
    "/public/page.css",
    "/.git/config",
  ])("no file is served by its path: %s", async (path) => {
    const { status, text } = await ask("get", path);
    expect(status).toBe(404);
    expect(text).not.toMatch(/"name"|root:|repositoryformatversion/);
  });
});
