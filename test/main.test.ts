import { spawn, spawnSync } from "node:child_process";
import { once } from "node:events";
import { mkdtemp, readFile, rm } from "node:fs/promises";
import { connect } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, describe, expect, test } from "vitest";
import { projectRoot } from "../server/settings.js";
import { built } from "./build.js";

const program = built("server/main.ts");
const folder = await mkdtemp(join(tmpdir(), "served-"));
afterAll(() => rm(folder, { recursive: true }));

function start(environment: Readonly<Record<string, string>>) {
  const child = spawn(process.execPath, [program], {
    env: { ...process.env, DATA_DIR: folder, PORT: "0", ...environment },
  });
  const ended = once(child, "exit");
  return { child, ended };
}

describe("the server as a process", () => {
  test("says its address, serves, and ends within 5 s of SIGTERM though a screening is under way", async () => {
    const { child, ended } = start({});
    const [line] = await once(child.stdout, "data");
    const address = /http:\/\/127\.0\.0\.1:\d+/.exec(String(line))?.[0] ?? "";
    expect((await fetch(address)).status).toBe(200);
    const case_ = await readFile(join(projectRoot, "scenarios/acylation.json"), "utf8");
    const screening = fetch(`${address}/api/screen`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: case_,
    }).then(
      () => "answered",
      () => "cut off",
    );
    await new Promise((resolve) => setTimeout(resolve, 300));
    const before = Date.now();
    child.kill("SIGTERM");
    expect((await ended)[0]).toBe(0);
    expect(Date.now() - before).toBeLessThan(5000);
    expect(["answered", "cut off"]).toContain(await screening);
  });

  test("ends within 5 s of SIGTERM though clients keep their connections open, idle, slow or silent", async () => {
    const { child, ended } = start({});
    const [line] = await once(child.stdout, "data");
    const port = Number(/:(\d+)\s/.exec(String(line))?.[1]);
    const head = "HTTP/1.1\r\nHost: localhost\r\n";
    const beginnings = ["", "GE", `POST /open ${head}Content-Length: 90\r\n\r\n`, `GET /health ${head}\r\n`];
    const sockets = beginnings.map((beginning) => {
      const socket = connect(port, "127.0.0.1");
      socket.on("error", () => undefined);
      socket.write(beginning);
      return socket;
    });
    await new Promise((resolve) => setTimeout(resolve, 300));
    const before = Date.now();
    child.kill("SIGTERM");
    expect((await ended)[0]).toBe(0);
    expect(Date.now() - before).toBeLessThan(5000);
    for (const socket of sockets) socket.destroy();
  });

  test("does not serve others without an access password, and says how to make one", async () => {
    const { child, ended } = start({ HOST: "0.0.0.0" });
    let said = "";
    child.stderr.on("data", (text) => {
      said += text;
    });
    expect((await ended)[0]).toBe(2);
    expect(said).toContain("npm run --silent access-hash");
  });

  test("with the line that the command prints it serves others, who must sign in", async () => {
    const made = spawnSync(process.execPath, [built("server/cli/accessHash.ts")], {
      input: "four words that part\n",
      encoding: "utf8",
    });
    const ACCESS_HASH = made.stdout.trim().replace("ACCESS_HASH=", "");
    const { child, ended } = start({ HOST: "0.0.0.0", ACCESS_HASH });
    const [line] = await once(child.stdout, "data");
    const address = `http://127.0.0.1:${/:(\d+)\s/.exec(String(line))?.[1]}`;
    const ask = (password: string) =>
      fetch(`${address}/api/case-schema`, {
        headers: { authorization: `Basic ${Buffer.from(`x:${password}`).toString("base64")}` },
      });
    expect((await fetch(address, { redirect: "manual" })).headers.get("location")).toBe("/sign-in");
    expect([(await ask("four words")).status, (await ask("four words that part")).status]).toEqual([
      401, 200,
    ]);
    child.kill("SIGTERM");
    await ended;
  });

  test("refuses a port that is none, and says what would do", async () => {
    const { child, ended } = start({ PORT: "web" });
    let said = "";
    child.stderr.on("data", (text) => {
      said += text;
    });
    expect((await ended)[0]).toBe(2);
    expect(said).toContain('PORT is "web"');
  });

  test("says so where another program has the port", async () => {
    const first = start({});
    const [line] = await once(first.child.stdout, "data");
    const port = /:(\d+)\s/.exec(String(line))?.[1] ?? "";
    const second = start({ PORT: port });
    let said = "";
    second.child.stderr.on("data", (text) => {
      said += text;
    });
    expect((await second.ended)[0]).toBe(1);
    expect(said).toContain(`cannot listen on 127.0.0.1:${port}`);
    first.child.kill("SIGTERM");
    await first.ended;
  });
});
