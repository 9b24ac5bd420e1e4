import request from "supertest";
import { describe, expect, test } from "vitest";
import { createSessions, session_s } from "../../server/web/accessSessions.js";
import { accessHash, password } from "../knownPassword.js";
import { routesOf } from "./routes.js";
import { demoDocument, testApp } from "./testApp.js";

/** Open in the sense of what needs no password: no contents. */
const free = ["/health", "/ready", "/sign-in", "/sign-out"];

function guardedApp(publicHosts: readonly string[] = []) {
  return testApp(undefined, undefined, undefined, { accessHash, publicHosts }).app;
}

const app = guardedApp();

const signIn = (typed: string, to = "/", on = app) =>
  request(on)
    .post("/sign-in")
    .send(new URLSearchParams({ password: typed, to }).toString());

/** The cookie of an answer, without its attributes. */
function cookieOf(answer: request.Response): string {
  return String(answer.headers["set-cookie"]).split(";")[0] ?? "";
}

describe("without having signed in", () => {
  test("every route leads to the sign-in page, refuses, or holds no contents", async () => {
    const routes = routesOf(app).filter((route) => !free.includes(route.path));
    expect(routes.length).toBeGreaterThan(20);
    for (const { method, path } of routes) {
      const answer = await request(app)[method](path);
      const expected = path.startsWith("/api/") ? 401 : method === "get" ? 303 : 403;
      expect.soft([method, path, answer.status]).toEqual([method, path, expected]);
      if (expected === 303) expect.soft(answer.headers.location).toMatch(/^\/sign-in(\?to=%2F|$)/);
    }
  });

  test("an address that does not exist gives itself away no more than one that does", async () => {
    expect((await request(app).get("/cases/abcdefghjkmn")).status).toBe(303);
    expect((await request(app).get("/nowhere")).status).toBe(303);
  });

  test("what was typed and sent is not lost: sign in beside it, then send it again", async () => {
    const answer = await request(app).post("/cases/new").send("do=save&%2Ftitle=Typed").expect(403);
    expect(answer.text).toContain("Signed out meanwhile");
    expect(answer.text).toContain('target="_blank"');
    expect(answer.text).not.toContain("Sign out");
  });

  test("style sheets and the signs of life are there", async () => {
    const page = await request(app).get("/sign-in").expect(200);
    const style = /href="(\/page\.css[^"]*)"/.exec(page.text)?.[1] ?? "";
    await request(app).get(style).expect(200);
    await request(app).get("/health").expect(200);
    await request(app).get("/ready").expect(200);
  });
});

describe("signing in", () => {
  test("the password leads to the page that was asked for, with a cookie for this site alone", async () => {
    const asked = await request(app).get("/register?title=a%20b").expect(303);
    const page = await request(app).get(String(asked.headers.location)).expect(200);
    expect(page.text).toContain('name="to" value="/register?title=a%20b"');
    const answer = await signIn(password, "/register?title=a%20b").expect(303);
    expect(answer.headers.location).toBe("/register?title=a%20b");
    const cookie = String(answer.headers["set-cookie"]);
    expect(cookie).toMatch(/; HttpOnly/);
    expect(cookie).toMatch(/; SameSite=Lax/);
    expect(cookie).toMatch(new RegExp(`; Max-Age=${session_s};`));
    expect(cookie).not.toMatch(/Secure|Domain/);
    const home = await request(app).get("/").set("Cookie", cookieOf(answer)).expect(200);
    expect(home.headers["cache-control"]).toBe("private, no-cache");
    expect(home.text).toContain("Sign out");
    await request(app).post("/api/screen").set("Cookie", cookieOf(answer)).send(demoDocument()).expect(200);
  });

  test("another password gives no cookie, and the page says so", async () => {
    const answer = await signIn(`${password}r`, "/register").expect(403);
    expect(answer.text).toContain("That is not the access password.");
    expect(answer.text).toContain('name="to" value="/register"');
    expect(answer.text).not.toContain(password);
    expect(answer.headers["set-cookie"]).toBeUndefined();
    expect((await signIn("")).text).toContain("Type the access password.");
    expect((await request(app).post("/sign-in")).status).toBe(422);
  });

  test.each([
    "//evil.example",
    "/\\evil.example",
    "/\t/evil.example",
    "/.//evil.example",
    "https://evil.example/",
    "javascript:alert(1)",
    "http:evil.example",
    "http://[",
  ])("a page elsewhere, %s, is not led to", async (to) => {
    expect((await signIn(password, to)).headers.location).toMatch(/^\/(?![/\\])(?!.*evil)/);
  });

  test("signing out ends the session, though someone kept the cookie", async () => {
    const cookie = cookieOf(await signIn(password));
    const out = await request(app).post("/sign-out").set("Cookie", cookie).expect(303);
    expect(out.headers.location).toBe("/sign-in");
    expect(cookieOf(out)).toBe("thermal-window-access=");
    expect(out.headers["clear-site-data"]).toBe('"cache"');
    await request(app).get("/").set("Cookie", cookie).expect(303);
  });

  test("cookies of another process, altered ones and nonsense are none", async () => {
    const cookie = cookieOf(await signIn(password));
    await request(app).get("/").set("Cookie", `other=1; ${cookie}`).expect(200);
    const later = cookie.replace(/=\d+/, "=99999999999999");
    const foreign = cookieOf(await signIn(password, "/", guardedApp()));
    for (const each of [later, foreign, `${cookie}x`, `${cookie}.x`, "thermal-window-access=..", "a=b"]) {
      await request(app).get("/").set("Cookie", each).expect(303);
    }
  });
});

describe("a session", () => {
  test("ends after its time, and is forgotten by those who signed out", () => {
    let now = 1_000_000;
    const sessions = createSessions(() => now);
    const [kept, left] = [sessions.begin(), sessions.begin()];
    sessions.end(left);
    expect([sessions.holds(kept), sessions.holds(left), sessions.holds(undefined)]).toEqual([
      true,
      false,
      false,
    ]);
    now += 1000 * session_s - 1;
    expect(sessions.holds(kept)).toBe(true);
    now += 1;
    expect(sessions.holds(kept)).toBe(false);
  });
});

describe("guessing", () => {
  test("is slowed down for one address, and not for the others", async () => {
    const behind = guardedApp(["screening.example"]);
    const from = (address: string, typed: string) =>
      signIn(typed, "/", behind).set("X-Forwarded-For", `198.51.100.1, ${address}`);
    for (let tries = 0; tries < 5; tries += 1) await from("203.0.113.5", `wrong ${tries}`).expect(403);
    const refused = await from("203.0.113.5", password).expect(429);
    expect(Number(refused.headers["retry-after"])).toBeGreaterThan(20);
    expect(refused.text).toMatch(/The next one can be tried in \d+ s\./);
    await from("203.0.113.6", password).expect(303);
  });

  test("an address that no proxy vouches for counts for nothing", async () => {
    const alone = guardedApp();
    for (let tries = 0; tries < 5; tries += 1) {
      await signIn(`wrong ${tries}`, "/", alone).set("X-Forwarded-For", `203.0.113.${tries}`).expect(403);
    }
    await signIn(password, "/", alone).set("X-Forwarded-For", "203.0.113.9").expect(429);
  });
});

describe("programs", () => {
  const screen = (on = app) => request(on).post("/api/screen?parts=quick");
  const basic = (typed: string) => `Basic ${Buffer.from(`any:${typed}`).toString("base64")}`;

  test("are told how to send the password, and send it with each request", async () => {
    const asked = await screen().send(demoDocument()).expect(401);
    expect(asked.headers["www-authenticate"]).toMatch(/^Basic realm=/);
    expect([asked.type, asked.body.status]).toEqual(["application/problem+json", 401]);
    await screen().set("Authorization", basic(password)).send(demoDocument()).expect(200);
    await request(app).get("/").set("Authorization", basic(password)).expect(200);
  });

  test.each(["Basic", "Basic =", "Basic a2V5", "Bearer x", basic("wrong one, but long"), basic("")])(
    "%s is no password",
    async (header) => {
      await screen().set("Authorization", header).send(demoDocument()).expect(401);
      await request(app).get("/").set("Authorization", header).expect(401);
    },
  );

  test("one that guesses is slowed down, one that knows is not", async () => {
    const alone = guardedApp();
    const send = (typed: string) => screen(alone).set("Authorization", basic(typed)).send(demoDocument());
    await send(password).expect(200);
    const guesses = Array.from({ length: 8 }, (_, guess) => send(`guess ${guess}`));
    const statuses = (await Promise.all(guesses)).map((answer) => answer.status);
    expect(statuses.filter((status) => status === 401)).toHaveLength(5);
    expect(statuses.filter((status) => status === 429)).toHaveLength(3);
    await send(password).expect(200);
  });
});

describe("forwarded requests", () => {
  const headers = [
    ["Forwarded", "for=203.0.113.5"],
    ["X-Forwarded-For", "203.0.113.5"],
    ["X-Forwarded-Proto", "https"],
    ["X-Forwarded-Host", "localhost"],
    ["X-Real-IP", "203.0.113.5"],
    ["Via", "1.1 proxy"],
  ] as const;

  test.each(headers)(
    "%s: a server without a password refuses, and says how to set one",
    async (name, value) => {
      const open = testApp().app;
      for (const { method, path } of routesOf(open)) {
        if (free.includes(path)) continue;
        const answer = await request(open)[method](path).set(name, value);
        expect.soft([path, answer.status]).toEqual([path, 403]);
        expect.soft(answer.text).toMatch(/npm run --silent access-hash.*ACCESS_HASH.*PUBLIC_HOST/);
      }
    },
  );

  test.each(headers)("%s: one with a password lets people sign in", async (name, value) => {
    await request(app).get("/").set(name, value).expect(303);
    await signIn(password).set(name, value).expect(303);
  });

  test("behind a proxy that encrypts, the cookie is for encrypted connections only", async () => {
    const behind = guardedApp(["screening.example"]);
    const answer = await signIn(password, "/", behind)
      .set("Host", "screening.example")
      .set("Origin", "https://screening.example")
      .set("X-Forwarded-Proto", "https")
      .expect(303);
    expect(String(answer.headers["set-cookie"])).toMatch(/; Secure/);
    await request(behind).get("/").set("Host", "other.example").expect(421);
  });
});
