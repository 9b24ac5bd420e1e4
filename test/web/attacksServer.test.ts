import { Agent, type IncomingMessage, request } from "node:http";
import { connect } from "node:net";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { type ServedProcess, serveProcess } from "./servedProcess.js";
import { demoDocument } from "./testApp.js";

let server: ServedProcess;
let slow: Promise<Ending>[];

beforeAll(async () => {
  server = await serveProcess();
  // Cut off after a while, so they are begun before everything else and looked at last.
  slow = [
    trickle(
      "POST /api/screen HTTP/1.1\r\nHost: localhost\r\nContent-Type: application/json\r\nContent-Length: 900\r\n\r\n{",
    ),
    trickle(
      "POST /cases/new HTTP/1.1\r\nHost: localhost\r\nContent-Type: application/x-www-form-urlencoded\r\nTransfer-Encoding: chunked\r\n\r\n500\r\n",
    ),
    trickle("GET / HTTP/1.1\r\nHost: localhost\r\nX-Slow: "),
  ];
});

afterAll(async () => {
  expect(await server.stop()).toBe(0);
});

interface Ending {
  /** status line of what was answered; "" where nothing was */
  readonly said: string;
  readonly after_s: number;
}

/** Sends the beginning of a request, then one byte each half second. */
function trickle(beginning: string): Promise<Ending> {
  const start = performance.now();
  const socket = connect(server.port, "127.0.0.1");
  let said = "";
  socket.write(beginning);
  socket.on("data", (text) => {
    said += text;
  });
  const timer = setInterval(() => socket.write(" "), 500);
  return new Promise((resolve) => {
    socket.on("error", () => undefined);
    socket.on("close", () => {
      clearInterval(timer);
      resolve({ said: said.split("\r\n")[0] ?? "", after_s: (performance.now() - start) / 1000 });
    });
  });
}

const agent = new Agent({ keepAlive: true, maxSockets: 200 });

/** Status of an answer, its body thrown away. */
function ask(path: string, method = "GET", body?: string, type = "application/json"): Promise<number> {
  return new Promise((resolve, reject) => {
    const headers = { "content-type": type };
    const asking = request({ port: server.port, path, method, agent, headers }, (answer) => {
      answer.resume().on("end", () => resolve(answer.statusCode ?? 0));
    });
    asking.on("error", reject).end(body);
  });
}

function countOf(statuses: readonly number[]): ReadonlyMap<number, number> {
  const counts = new Map<number, number>();
  for (const status of statuses) counts.set(status, (counts.get(status) ?? 0) + 1);
  return counts;
}

interface Uploaded {
  readonly status: number;
  readonly sent_bytes: number;
}

/** Sends a gigabyte as fast as the server takes it, until it has answered or closes. */
function uploadGigabyte(path: string, headers: Readonly<Record<string, string>>): Promise<Uploaded> {
  const chunk = Buffer.alloc(65_536, 32);
  return new Promise((resolve) => {
    let answered: IncomingMessage | null = null;
    let sent_bytes = 0;
    const asking = request({ port: server.port, path, method: "POST", agent: false, headers });
    const settle = () => resolve({ status: answered?.statusCode ?? 0, sent_bytes });
    asking.on("response", (answer) => {
      answered = answer;
      settle();
      answer.resume();
      asking.destroy();
    });
    asking.on("error", settle);
    const more = () => {
      while (answered === null && !asking.destroyed) {
        if (sent_bytes >= 2 ** 30) return asking.end();
        sent_bytes += chunk.length;
        if (!asking.write(chunk)) return asking.once("drain", more);
      }
      return asking;
    };
    more();
  });
}

/**
 * As `uploadGigabyte`, again where the connection was reset before the answer was read: a sender that does not
 * listen can lose it so (RFC 9112, section 9.6).
 */
async function answeredUpload(path: string, headers: Readonly<Record<string, string>>): Promise<Uploaded> {
  let upload = await uploadGigabyte(path, headers);
  for (let again = 0; again < 4 && upload.status === 0; again += 1)
    upload = await uploadGigabyte(path, headers);
  return upload;
}

/** What the sender has handed over when it learns of the refusal depends on how busy the machine is: far below all. */
const quarter = 2 ** 28;

describe("the running server under attack", () => {
  test.each(["/api/screen", "/cases/new", "/open", "/verify", "/nowhere"])(
    "a gigabyte for %s is refused by its announced length, before it is sent",
    async (path) => {
      const upload = await answeredUpload(path, { "content-length": String(2 ** 30) });
      expect(upload.status).toBe(413);
      expect(upload.sent_bytes).toBeLessThan(quarter);
    },
  );

  test.each([
    ["/api/screen", "application/json"],
    ["/cases/new", "application/x-www-form-urlencoded"],
    ["/open", "multipart/form-data; boundary=x"],
    ["/verify", "multipart/form-data; boundary=x"],
  ])("a gigabyte for %s of unknown length is refused once it is too long", async (path, type) => {
    const upload = await answeredUpload(path, { "content-type": type, "transfer-encoding": "chunked" });
    expect(upload.status).toBe(413);
    expect(upload.sent_bytes).toBeLessThan(quarter);
  });

  test("twenty such gigabytes at once, to pages that read them and pages that do not, are refused alike", async () => {
    const paths = ["/api/screen", "/cases/new", "/verify", "/findings"];
    const type = { "content-type": "application/x-www-form-urlencoded", "transfer-encoding": "chunked" };
    const uploads = Array.from({ length: 20 }, (_, index) => uploadGigabyte(paths[index % 4] ?? "", type));
    const statuses = new Set((await Promise.all(uploads)).map((upload) => upload.status));
    // 415 from the interface that takes JSON only, which answers before it reads.
    expect([...statuses].every((status) => [413, 415, 422, 400, 503].includes(status))).toBe(true);
    expect(server.isAlive()).toBe(true);
  });

  test("forty uploads of 4 MB at once are read, or told to come back, and none brings the server down", async () => {
    const head = '--x\r\nContent-Disposition: form-data; name="file"; filename="a.pdf"\r\n\r\n%PDF-1.7\n';
    const body = head + "A".repeat(4_000_000);
    const type = "multipart/form-data; boundary=x";
    const uploads = Array.from({ length: 40 }, () => ask("/verify", "POST", `${body}\r\n--x--\r\n`, type));
    const counts = countOf(await Promise.all(uploads));
    expect((counts.get(200) ?? 0) + (counts.get(503) ?? 0)).toBe(40);
    expect(counts.get(200)).toBeGreaterThan(0);
  });

  test("whoever asks before sending a gigabyte is told not to", async () => {
    const [answer, continued] = await new Promise<[number, boolean]>((resolve, reject) => {
      let went = false;
      const headers = { expect: "100-continue", "content-length": String(2 ** 30) };
      const asking = request({
        port: server.port,
        path: "/api/screen",
        method: "POST",
        headers,
        agent: false,
      });
      asking.on("continue", () => {
        went = true;
      });
      asking.on("response", (response) => {
        resolve([response.statusCode ?? 0, went]);
        asking.destroy();
      });
      asking.on("error", reject);
      asking.flushHeaders();
    });
    expect([answer, continued]).toEqual([413, false]);
  });

  test("and whoever asks before sending a case is told to, and answered", async () => {
    const body = JSON.stringify(demoDocument());
    const status = await new Promise<number>((resolve, reject) => {
      const headers = {
        expect: "100-continue",
        "content-type": "application/json",
        "content-length": String(Buffer.byteLength(body)),
      };
      const path = "/api/screen?parts=quick";
      const asking = request({ port: server.port, path, method: "POST", headers, agent: false });
      asking.on("continue", () => asking.end(body));
      asking.on("response", (response) => resolve(response.resume().statusCode ?? 0));
      asking.on("error", reject);
      asking.flushHeaders();
    });
    expect(status).toBe(200);
  });

  test("10,000 requests at once are answered or told to wait, and life goes on", async () => {
    const paths = ["/", "/register", "/cases/new", "/verify", "/nowhere"];
    const body = JSON.stringify(demoDocument());
    const burst = Array.from({ length: 10_000 }, (_, index) =>
      index % 20 === 0
        ? ask("/api/screen?parts=quick", "POST", body)
        : ask(paths[index % paths.length] ?? "/"),
    );
    const alive = await ask("/health");
    const counts = countOf(await Promise.all(burst));
    agent.destroy();
    expect(alive).toBe(200);
    expect([...counts.keys()].sort()).toEqual([200, 404, 429]);
    expect((counts.get(200) ?? 0) + (counts.get(404) ?? 0)).toBeGreaterThanOrEqual(700);
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(await ask("/")).toBe(200);
  });

  test("who sends too slowly is answered with 408 and cut off", async () => {
    for (const { said, after_s } of await Promise.all(slow)) {
      expect(said).toBe("HTTP/1.1 408 Request Timeout");
      expect(after_s).toBeLessThan(30);
    }
  });

  test("after all of that it is ready, and never held 400 MB", async () => {
    expect(server.isAlive()).toBe(true);
    expect(await ask("/ready")).toBe(200);
    const peak_MB = server.peak_MB();
    if (peak_MB !== null) expect(peak_MB).toBeLessThan(400);
  });
});
