import { existsSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { projectRoot, readSettings } from "../server/settings.js";

describe("settings", () => {
  test("an empty environment serves on the loopback address only", () => {
    expect(readSettings({})).toEqual({
      ok: true,
      settings: { port: 3000, host: "127.0.0.1", dataFolder: join(projectRoot, "data") },
    });
  });

  test("what is set is taken", () => {
    expect(readSettings({ PORT: " 8080 ", HOST: "::1", DATA_DIR: "/srv/cases" })).toEqual({
      ok: true,
      settings: { port: 8080, host: "::1", dataFolder: "/srv/cases" },
    });
  });

  test.each(["-1", "65536", "3000.5", "0x10", "http", "1e3"])("port %s is a fault that names it", (port) => {
    const read = readSettings({ PORT: port });
    expect(read.ok ? [] : read.faults).toEqual([expect.stringContaining(`PORT is "${port}"`)]);
  });

  test("every fault is reported at once", () => {
    const read = readSettings({ PORT: "many", HOST: "no host/../" });
    expect(read.ok ? [] : read.faults).toHaveLength(2);
  });

  test("the project's root is found from the source as from the build", () => {
    expect(existsSync(join(projectRoot, "views"))).toBe(true);
  });
});
