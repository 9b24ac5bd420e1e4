import { describe, expect, test } from "vitest";
import { accessHashCommand } from "../server/cli/accessHashCommand.js";
import { hashPassword, isPassword, passwordHashText, readPasswordHash } from "../server/password.js";
import { accessHash, password } from "./knownPassword.js";

describe("the hash of a password", () => {
  const run = async (args: readonly string[], typed: string | null) => {
    const said = { out: "", err: "" };
    const status = await accessHashCommand(args, async () => typed, {
      out: (text) => {
        said.out += text;
      },
      err: (text) => {
        said.err += text;
      },
    });
    return { ...said, status };
  };

  test("the command prints the line that the server reads", async () => {
    const typed = "four words that part";
    const { out, err, status } = await run([], typed);
    expect([status, err]).toEqual([0, ""]);
    const text = /^ACCESS_HASH=([\w:-]+)\n$/.exec(out)?.[1] ?? "";
    const hash = readPasswordHash(text);
    if (hash === null) throw new Error("the hash cannot be read");
    expect(await isPassword(typed, hash)).toBe(true);
    expect(await isPassword(`${typed} `, hash)).toBe(false);
    expect(out).not.toBe((await run([], typed)).out);
  });

  test("the command refuses what will not do, and prints nothing then", async () => {
    expect(await run([], "eleven char")).toMatchObject({
      status: 1,
      out: "",
      err: /11 characters; 12 or more/,
    });
    expect(await run([], null)).toMatchObject({ status: 1, out: "" });
    expect(await run([], "x".repeat(2000))).toMatchObject({ status: 1, out: "" });
    expect(await run([password], null)).toMatchObject({ status: 2, out: "" });
  });

  test("agrees with the test vector of the standard", async () => {
    expect(await isPassword(password, accessHash)).toBe(true);
    expect(await isPassword(`${password}!`, accessHash)).toBe(false);
  });

  test("does not care how a keyboard composes a letter", async () => {
    const hash = await hashPassword("korrekt-größe".normalize("NFC"));
    expect(await isPassword("korrekt-größe".normalize("NFD"), hash)).toBe(true);
    expect(await isPassword("korrekt-grosse", hash)).toBe(false);
  });

  test.each([
    ["weaker than is sensible", { cost: 2 ** 13 }],
    ["no power of two", { cost: 2 ** 14 + 1 }],
    ["too costly to check", { cost: 2 ** 18 }],
    ["with a short salt", { salt: Buffer.from("salt") }],
    ["with a short key", { key: Buffer.from("key") }],
  ])("one %s is refused", (_what, change) => {
    expect(readPasswordHash(passwordHashText(accessHash))).toEqual(accessHash);
    expect(readPasswordHash(passwordHashText({ ...accessHash, ...change }))).toBeNull();
  });
});
