import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, describe, expect, test } from "vitest";
import { screenCommand } from "../../server/cli/screenCommand.js";
import { verifyCommand } from "../../server/cli/verifyCommand.js";
import { notice } from "../../server/screening/notice.js";
import { built } from "../build.js";
import { inventedDocument } from "../sheet/invented.js";

const folder = mkdtempSync(join(tmpdir(), "thermal-window-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function file(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

const good = file("case.json", JSON.stringify(inventedDocument));

type Command = typeof screenCommand;

async function run(
  command: Command,
  ...args: string[]
): Promise<{ status: number; out: string; err: string }> {
  let out = "";
  let err = "";
  const status = await command(args, {
    out: (text) => {
      out += text;
    },
    err: (text) => {
      err += text;
    },
  });
  return { status, out, err };
}

describe("screen", () => {
  test("prints a summary with the notice, the temperatures with units, the window and the cautions", async () => {
    const { status, out, err } = await run(screenCommand, good);
    expect({ status, err }).toEqual({ status: 0, err: "" });
    expect(out.replace(/\s+/g, " ")).toContain(notice);
    for (const text of [
      "MTSR ",
      "MTT ",
      "78.0 °C",
      "T_D24 ",
      "Temperature window",
      "Criticality class",
      "PRESSURE",
    ]) {
      expect(out).toContain(text);
    }
    expect(Math.max(...out.split("\n").map((line) => line.length))).toBeLessThanOrEqual(96);
  });

  test("prints the findings and nothing else with --json", async () => {
    const { status, out, err } = await run(screenCommand, good, "--json");
    expect({ status, err }).toEqual({ status: 0, err: "" });
    expect(JSON.parse(out)).toMatchObject({ format: "thermal-window/findings-1", notice });
  });

  test("writes a sheet that verifies, beside the summary or the findings", async () => {
    const pdf = join(folder, "out.pdf");
    const { status, out } = await run(screenCommand, good, "--pdf", pdf, "--paper", "letter");
    expect(status).toBe(0);
    expect(out).toContain(`Sheet written to ${pdf}`);
    expect(readFileSync(pdf).toString("latin1")).toContain("/MediaBox [0 0 612 792]");
    expect((await run(screenCommand, good, "--json", "--pdf", pdf)).out).toMatch(/^\{[\s\S]*\}\n$/);
    const verified = await run(verifyCommand, pdf);
    expect(verified).toMatchObject({ status: 0, err: "" });
    expect(verified.out).toContain("Verified");
  });

  test("names every fault of a refused case on a line of its own, pointer first", async () => {
    const broken = {
      ...inventedDocument,
      mixture: { ...inventedDocument.mixture, mass: "-3 kg\n\u001b[2J" },
      surplus: 1,
    };
    const { status, out, err } = await run(screenCommand, file("broken.json", JSON.stringify(broken)));
    expect({ status, out }).toEqual({ status: 1, out: "" });
    const lines = err.trimEnd().split("\n");
    expect(lines.map((line) => line.split(": ")[0]).sort()).toEqual(["/mixture/mass", "/surplus"]);
    expect(err).not.toContain("\u001b");
  });

  test("refuses what is not JSON or too long with a fault", async () => {
    for (const [name, content] of [
      ["text.json", "mass = 3"],
      ["empty.json", ""],
      ["long.json", `"${"x".repeat(300_000)}"`],
      ["huge.json", new Uint8Array(3_000_000).fill(0x20)],
      ["bytes.json", new Uint8Array([0xff, 0xfe, 0x00])],
    ] as const) {
      const { status, out, err } = await run(screenCommand, file(name, content));
      expect([name, status, out]).toEqual([name, 1, ""]);
      expect(err).toMatch(/^: .+\n$/);
    }
  });

  test("answers a wrong call with its usage", async () => {
    for (const args of [
      [],
      [good, good],
      ["--paper", "a3", good],
      ["--nonsense", good],
      [good, "--pdf"],
      [good, "--pdf", ""],
    ]) {
      const { status, out, err } = await run(screenCommand, ...args);
      expect([args, status, out]).toEqual([args, 2, ""]);
      expect(err).toContain("usage: npm run --silent screen");
    }
  });

  test("says in words why a file cannot be read or written", async () => {
    for (const [args, reason] of [
      [[join(folder, "none.json")], "there is no such file"],
      [[folder], "it is a folder"],
      [[join(good, "below.json")], "is not a folder"],
      [[good, "--pdf", folder], "cannot write"],
    ] as const) {
      const { status, err } = await run(screenCommand, ...args);
      expect([args, status]).toEqual([args, 2]);
      expect(err).toContain(reason);
      expect(err).not.toContain("    at ");
    }
  });

  test("runs as a program of its own with the same answers", () => {
    const program = built("server/cli/screen.ts");
    const findings = spawnSync(process.execPath, [program, good, "--json"], { encoding: "utf8" });
    expect([findings.status, findings.stderr]).toEqual([0, ""]);
    expect(JSON.parse(findings.stdout)).toMatchObject({ notice });
    const usage = spawnSync(process.execPath, [program], { encoding: "utf8" });
    expect([usage.status, usage.stdout]).toEqual([2, ""]);
  });
});

describe("verify", () => {
  test("refuses a changed sheet: what is wrong on standard error, the verdict in a sentence", async () => {
    const pdf = join(folder, "sheet.pdf");
    await run(screenCommand, good, "--pdf", pdf);
    const bytes = readFileSync(pdf);
    const middle = Math.floor(bytes.length / 2);
    bytes.writeUInt8(bytes.readUInt8(middle) ^ 1, middle);
    const { status, out, err } = await run(verifyCommand, file("changed.pdf", bytes));
    expect(status).toBe(1);
    expect(err).toMatch(/^(record|pages): .+\n$/);
    expect(out).toContain("NOT verified");
  });

  test("answers a wrong call with its usage, and a missing file in words", async () => {
    expect(await run(verifyCommand)).toMatchObject({ status: 2, out: "" });
    expect(await run(verifyCommand, "one", "two")).toMatchObject({ status: 2 });
    expect((await run(verifyCommand, join(folder, "none.pdf"))).err).toContain("there is no such file");
    expect(await run(verifyCommand, good)).toMatchObject({ status: 1 });
  });
});
