import { spawnSync } from "node:child_process";
import { existsSync } from "node:fs";
import { join } from "node:path";
import { projectRoot } from "../server/settings.js";

/**
 * Builds program and tests where that is stale, for tests that start a process or a thread
 * of their own: plain Node runs the build, not the source. Faults of types are reported by
 * `npm run check`; here they do not stop a build that came out.
 *
 * @param source path from the top of the project, such as server/main.ts
 * @returns absolute path of its build
 */
export function built(source: string): string {
  const compiler = join(projectRoot, "node_modules/typescript/bin/tsc");
  const run = spawnSync(process.execPath, [compiler, "-b", "test"], { cwd: projectRoot, encoding: "utf8" });
  const target = join(projectRoot, ".build", source.replace(/\.ts$/, ".js"));
  if (!existsSync(target)) throw new Error(`${source} was not built:\n${run.stdout}${run.stderr}`);
  return target;
}
