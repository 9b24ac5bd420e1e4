import { readFileSync } from "node:fs";
import { dirname, join, normalize } from "node:path";
import { expect, test } from "vitest";
import { projectRoot } from "../../server/settings.js";

/** Packages that a source file and all that it imports load at once; types load nothing. */
function packagesOf(path: string, found = new Set<string>(), seen = new Set<string>()): ReadonlySet<string> {
  if (seen.has(path)) return found;
  seen.add(path);
  const source = readFileSync(path, "utf8").replace(/\/\*[\s\S]*?\*\//g, "");
  for (const [, name] of source.matchAll(/^(?:import|export) (?!type )(?:[^;"]*? from )?"([^"]+)";$/gm)) {
    if (name.startsWith(".")) {
      packagesOf(normalize(join(dirname(path), name.replace(/\.js$/, ".ts"))), found, seen);
    } else {
      found.add(name.split("/")[0]);
    }
  }
  return found;
}

test("a worker that screens loads arithmetic alone: no units, no schema, no PDF writer", () => {
  const packages = packagesOf(join(projectRoot, "server/web/screeningWorker.ts"));
  expect(packages).toContain("pure-rand");
  for (const heavy of ["mathjs", "zod", "pdfkit", "express", "ejs"]) expect(packages).not.toContain(heavy);
  // The same look finds them where they are.
  expect(packagesOf(join(projectRoot, "server/case/read.ts"))).toContain("zod");
});
