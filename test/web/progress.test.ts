import { once } from "node:events";
import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import { setTimeout as pause } from "node:timers/promises";
import { pino } from "pino";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { formOf, formValues } from "../../server/case/form.js";
import { readCase } from "../../server/case/read.js";
import { longScreenings } from "../../server/web/longScreenings.js";
import { type Screener, threadedScreener } from "../../server/web/screener.js";
import { built } from "../build.js";
import { demoDocument, testApp } from "./testApp.js";

/** A case that takes two and a half seconds, or ten times less. */
function timedCase(title: string, failures: 1 | 10 = 10): Record<string, unknown> {
  const document = demoDocument("hydrolysis");
  const [failure] = document.failures as Record<string, unknown>[];
  return {
    ...document,
    title,
    failures: Array.from({ length: failures }, (_, i) => ({ ...failure, name: `Failure ${i}` })),
  };
}

function form(document: unknown, extra: Readonly<Record<string, string>> = {}): URLSearchParams {
  return new URLSearchParams([...formValues(formOf(document)), ...Object.entries(extra)]);
}

const worker = built("test/web/slowWorker.ts");
const screener = threadedScreener({ worker });
const impatient = threadedScreener({ worker, ceiling_s: 2 });
const servers: Server[] = [];
let address: string;
let hurried: string;

async function serve(served: Screener): Promise<string> {
  const server = testApp(undefined, served).app.listen(0, "127.0.0.1");
  servers.push(server);
  await once(server, "listening");
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
}

beforeAll(async () => {
  address = await serve(screener);
  hurried = await serve(impatient);
});

afterAll(async () => {
  for (const server of servers) server.close();
  await Promise.all([screener.close(), impatient.close()]);
});

/** Presses a button of the form and returns the address to which the answer leads. */
async function press(
  at: string,
  document: unknown,
  action = "screen",
): Promise<{ readonly status: number; readonly next: string }> {
  const answer = await fetch(`${at}/cases/new`, {
    method: "POST",
    body: form(document, { do: action }),
    redirect: "manual",
  });
  return { status: answer.status, next: `${at}${answer.headers.get("location")}` };
}

async function page(at: string): Promise<{ readonly status: number; readonly text: string }> {
  const answer = await fetch(at);
  return { status: answer.status, text: await answer.text() };
}

const refreshes = '<noscript><meta http-equiv="refresh"';

/** Asks for a page, as one without script does, until it is not that of a screening under way. */
async function refreshed(at: string) {
  const shares: number[] = [];
  for (;;) {
    const { status, text } = await page(at);
    if (!text.includes(refreshes)) return { shares, status, text };
    shares.push(Number(/<progress max="100" value="(\d+)"/.exec(text)?.[1] ?? 0));
    await pause(100);
  }
}

interface Told {
  readonly event: string;
  readonly data: { percent?: number | null; text?: string | null; done?: boolean };
}

/** The events of a screening, until the server ends them. */
async function events(at: string, onEvent: (told: Told) => void = () => undefined): Promise<readonly Told[]> {
  const answer = await fetch(at);
  expect(answer.headers.get("content-type")).toContain("text/event-stream");
  const told: Told[] = [];
  let rest = "";
  const decoder = new TextDecoder();
  for await (const chunk of answer.body ?? []) {
    rest += decoder.decode(chunk as Uint8Array, { stream: true });
    const blocks = rest.split("\n\n");
    rest = blocks.pop() ?? "";
    for (const block of blocks) {
      const match = /^event: (\w+)\ndata: (.*)$/.exec(block);
      if (match === null) continue;
      const each: Told = { event: match[1], data: JSON.parse(match[2]) };
      told.push(each);
      onEvent(each);
    }
  }
  return told;
}

async function idle(of: Screener): Promise<void> {
  for (let i = 0; i < 300; i += 1) {
    if (of.load().running === 0) return;
    await pause(20);
  }
  throw new Error("The threads never came to rest.");
}

/** The result while typing, with the address of its events where it takes longer. */
async function typed(
  document: unknown,
  parts = "full",
): Promise<{ readonly text: string; readonly events: string | null }> {
  const answer = await fetch(`${address}/findings?parts=${parts}`, { method: "POST", body: form(document) });
  const text = await answer.text();
  const path = /data-events="([^"]+)"/.exec(text)?.[1];
  return { text, events: path === undefined ? null : `${address}${path}` };
}

describe("what a page with the quick findings is answered", () => {
  test("is how far the rest is and nothing that it shows already, and in the end all findings", async () => {
    const document = timedCase("The rest");
    const first = await typed(document, "rest");
    expect(first.events).not.toBeNull();
    expect(first.text).toContain('id="pending"');
    expect(first.text).not.toContain("<figure");
    await events(first.events ?? "");
    const last = await typed(document, "rest");
    expect(last.events).toBeNull();
    expect(last.text).toContain('id="outcome"');
    expect(last.text).not.toContain("Not computed yet");
  });
});

describe("a screening of over a second, without script", () => {
  test("shows its progress on a page that refreshes itself, and ends as the page of the case", async () => {
    const { status, next } = await press(address, timedCase("Refreshed"));
    expect(status).toBe(303);
    const first = await page(next);
    expect(first.text).toContain("Cancel");
    expect(first.text).toContain("Refreshed");
    const { shares, status: end, text } = await refreshed(next);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(shares.at(-1)).toBeGreaterThan(shares[0]);
    expect(end).toBe(200);
    expect(text).toContain("MTSR");
    expect(text).toContain('value="Refreshed"');
    expect(text).not.toContain("Not computed yet");
  });

  test("is cancelled by its button, stops, and keeps what was typed", async () => {
    const { next } = await press(address, timedCase("Cancelled here"));
    const answer = await fetch(`${next}/cancel`, { method: "POST" });
    const text = await answer.text();
    expect(answer.status).toBe(200);
    expect(text).toContain("The screening was cancelled.");
    expect(text).toContain("Not computed yet");
    expect(text).toContain('value="Cancelled here"');
    await idle(screener);
  });

  test("leads to the sheet where that was asked for", async () => {
    const { next } = await press(address, timedCase("With its sheet"), "sheet");
    const { text } = await refreshed(next);
    expect(text).toContain(`<meta http-equiv="refresh" content="0; url=${new URL(next).pathname}/file">`);
    const sheet = await fetch(`${next}/file`);
    expect(sheet.headers.get("content-type")).toBe("application/pdf");
    expect(sheet.headers.get("content-disposition")).toContain("with-its-sheet");
    expect(
      Buffer.from(await sheet.arrayBuffer())
        .subarray(0, 5)
        .toString(),
    ).toBe("%PDF-");
  });
});

describe("a screening of over a second, with script", () => {
  test("tells its progress as events, and is at hand at their end", async () => {
    const document = timedCase("Events");
    const begun = await typed(document);
    expect(begun.text).toContain("No stop so far");
    const told = await events(begun.events ?? "");
    const shares = told.flatMap(({ data }) => (typeof data.percent === "number" ? [data.percent] : []));
    expect(shares.length).toBeGreaterThan(2);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(told.at(-1)).toEqual({ event: "end", data: { done: true, text: null } });
    const done = await typed(document);
    expect(done.events).toBeNull();
    expect(done.text).not.toContain("Not computed yet");
  });

  test("is cancelled by its button while events are listened to", async () => {
    const begun = await typed(timedCase("Cancelled there"));
    const at = begun.events ?? "";
    let asked = false;
    const told = await events(at, () => {
      if (!asked) void fetch(at.replace(/events$/, "cancel"), { method: "POST", redirect: "manual" });
      asked = true;
    });
    expect(told.at(-1)).toEqual({
      event: "end",
      data: { done: false, text: "The screening was cancelled." },
    });
    await idle(screener);
  });
});

describe("work that nobody waits for", () => {
  test("a request that is gone stops its work, within the first second and after it", async () => {
    for (const after_ms of [300, 1500]) {
      const gone = new AbortController();
      const answer = fetch(`${address}/api/screen`, {
        method: "POST",
        headers: { "content-type": "application/json" },
        body: JSON.stringify(timedCase(`Gone after ${after_ms} ms`)),
        signal: gone.signal,
      }).catch(String);
      await pause(after_ms);
      expect(screener.load().running).toBe(1);
      gone.abort();
      await answer;
      await idle(screener);
    }
  });

  test("a screening whose page was closed is given up, one that is looked after is not", async () => {
    const log = pino({ level: "silent" });
    const screenings = longScreenings(screener, log, 200);
    const begin = (title: string) => {
      const read = readCase(timedCase(title));
      if (!read.ok) throw new Error(JSON.stringify(read.faults));
      const screening = screenings.begin({ model: read.model, digest: read.digest, depth: "full" }, null);
      screenings.keep(screening);
      return screening;
    };
    const [left, refreshing, listened] = ["Left", "Refreshing", "Listened to"].map(begin);
    const leave = listened.watch();
    for (let i = 0; i < 8; i += 1) {
      await pause(60);
      refreshing.look();
    }
    expect([left, refreshing, listened].map((each) => each.course().kind)).toEqual([
      "cancelled",
      "running",
      "running",
    ]);
    leave();
    await pause(300);
    expect([refreshing, listened].map((each) => each.course().kind)).toEqual(["cancelled", "cancelled"]);
    await idle(screener);
  });
});

describe("the ceiling", () => {
  test("programs are answered with 503 and a plain sentence, and the next case is screened", async () => {
    const answer = await fetch(`${hurried}/api/screen`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(timedCase("Too long")),
    });
    expect(answer.status).toBe(503);
    expect(answer.headers.get("content-type")).toContain("application/problem+json");
    expect(await answer.json()).toMatchObject({
      status: 503,
      detail: expect.stringContaining("ended after 2 s"),
    });
    const next = await fetch(`${hurried}/api/screen`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(timedCase("Short enough", 1)),
    });
    expect(next.status).toBe(200);
    expect(await next.json()).toMatchObject({ failures: [{ name: "Failure 0" }] });
  });

  test("people get the page of their case with the sentence, and what they typed", async () => {
    const { next } = await press(hurried, timedCase("Too long for the page"));
    const { status, text } = await refreshed(next);
    expect(status).toBe(503);
    expect(text).toContain("ended after 2 s");
    expect(text).toContain('value="Too long for the page"');
  });
});

test("more than may wait is refused with a time to come back, for programs and for people", async () => {
  const gone = new AbortController();
  const refused: Response[] = [];
  const asked = Array.from({ length: 75 }, async (_, i) => {
    const answer = await fetch(`${address}/api/screen`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(timedCase(`Burst ${i}`)),
      signal: gone.signal,
    });
    if (answer.status === 503) refused.push(answer);
  });
  const ended = Promise.allSettled(asked);
  for (let i = 0; i < 200 && refused.length === 0; i += 1) await pause(20);
  const [first] = refused;
  expect(first.headers.get("retry-after")).toBe("60");
  expect(await first.json()).toMatchObject({ status: 503, detail: expect.stringContaining("Too many") });
  const shown = await fetch(`${address}/cases/new`, {
    method: "POST",
    body: form(timedCase("One too many"), { do: "screen" }),
  });
  expect(shown.status).toBe(503);
  expect(shown.headers.get("retry-after")).toBe("60");
  const text = await shown.text();
  expect(text).toContain("Too many screenings are under way.");
  expect(text).toContain('value="One too many"');
  gone.abort();
  await ended;
  await idle(screener);
  expect(screener.load()).toEqual({ running: 0, waiting: 0 });
});
