import { existsSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { projectRoot, readSettings } from "../server/settings.js";

describe("settings", () => {
  test("an empty environment serves on the loopback address only", () => {
    expect(readSettings({})).toEqual({
      ok: true,
      settings: {
        port: 3000,
        host: "127.0.0.1",
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
      settings: { port: 8080, host: "::1", dataFolder: "/srv/cases", screenSeconds: 90 },
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
    const read = readSettings({ PORT: "many", HOST: "no host/../", SCREEN_SECONDS: "x" });
    expect(read.ok ? [] : read.faults).toHaveLength(3);
  });

  test("the project's root is found from the source as from the build", () => {
    expect(existsSync(join(projectRoot, "views"))).toBe(true);
  });
});
