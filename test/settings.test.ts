import { existsSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { hashPassword, passwordHashText } from "../server/password.js";
import { projectRoot, readSettings } from "../server/settings.js";

describe("settings", () => {
  test("an empty environment serves on the loopback address only", () => {
    expect(readSettings({})).toEqual({
      ok: true,
      settings: {
        port: 3000,
        host: "127.0.0.1",
        publicHosts: [],
        accessHash: null,
        dataFolder: join(projectRoot, "data"),
        screenSeconds: 30,
      },
    });
  });

  test("what is set is taken", () => {
    expect(
      readSettings({ PORT: " 8080 ", HOST: "::1", DATA_DIR: "/srv/cases", SCREEN_SECONDS: "90" }),
    ).toEqual({
      ok: true,
      settings: {
        port: 8080,
        host: "::1",
        publicHosts: [],
        accessHash: null,
        dataFolder: "/srv/cases",
        screenSeconds: 90,
      },
    });
  });

  test.each(["-1", "65536", "3000.5", "0x10", "http", "1e3"])("port %s is a fault that names it", (port) => {
    const read = readSettings({ PORT: port });
    expect(read.ok ? [] : read.faults).toEqual([expect.stringContaining(`PORT is "${port}"`)]);
  });

  test.each(["0", "-5", "3601", "0.5", "30 s", "forever"])(
    "a ceiling of %s for screenings is a fault that names it",
    (seconds) => {
      const read = readSettings({ SCREEN_SECONDS: seconds });
      expect(read.ok ? [] : read.faults).toEqual([expect.stringContaining(`SCREEN_SECONDS is "${seconds}"`)]);
    },
  );

  test("every fault is reported at once", () => {
    const read = readSettings({
      PORT: "many",
      HOST: "no host/../",
      PUBLIC_HOST: "https://reactor.example",
      ACCESS_HASH: "open sesame",
      SCREEN_SECONDS: "x",
    });
    expect(read.ok ? [] : read.faults).toHaveLength(5);
  });

  test.each(["127.0.0.1", "127.8.8.8", "localhost", "::1"])("%s needs no password", (HOST) => {
    expect(readSettings({ HOST }).ok).toBe(true);
  });

  test.each([
    ["HOST", "0.0.0.0"],
    ["HOST", "::"],
    ["HOST", "10.0.0.7"],
    ["HOST", "127.example"],
    ["PUBLIC_HOST", "reactor.example"],
  ])("%s %s is refused without an access password, and how to make one is said", (name, value) => {
    const read = readSettings({ [name]: value });
    expect(read.ok ? [] : read.faults).toEqual([
      expect.stringMatching(`^${name} lets others reach .* \`npm run --silent access-hash\``),
    ]);
  });

  test("with an access password the same are taken", async () => {
    const accessHash = await hashPassword("correct horse battery staple");
    const read = readSettings({
      HOST: "0.0.0.0",
      PUBLIC_HOST: "reactor.example, screening.example",
      ACCESS_HASH: passwordHashText(accessHash),
    });
    expect(read).toMatchObject({
      settings: { host: "0.0.0.0", publicHosts: ["reactor.example", "screening.example"], accessHash },
    });
  });

  test("what is no hash is refused and not repeated: it may be the password itself", () => {
    const read = readSettings({ HOST: "0.0.0.0", ACCESS_HASH: "correct horse battery staple" });
    expect(read.ok ? [] : read.faults).toEqual([expect.stringMatching(/^ACCESS_HASH is no hash/)]);
    expect(JSON.stringify(read)).not.toContain("horse");
  });

  test("the project's root is found from the source as from the build", () => {
    expect(existsSync(join(projectRoot, "views"))).toBe(true);
  });
});
