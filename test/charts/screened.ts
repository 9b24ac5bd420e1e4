import { readdirSync, readFileSync } from "node:fs";
import { readCaseText } from "../../server/case/read.js";
import type { Findings } from "../../server/screening/findings.js";
import { screen } from "../../server/screening/screen.js";

const folder = new URL("../../scenarios/", import.meta.url);

/** The findings of every demo case that ships with the program, by file name. */
export function screened(): Record<string, Findings> {
  const all: Record<string, Findings> = {};
  for (const file of readdirSync(folder).filter((name) => name.endsWith(".json"))) {
    const read = readCaseText(readFileSync(new URL(file, folder), "utf8"));
    if (!read.ok) throw new Error(`${file} is refused: ${JSON.stringify(read.faults)}`);
    all[file] = screen(read.model, { digest: read.digest, depth: "quick" });
  }
  return all;
}
