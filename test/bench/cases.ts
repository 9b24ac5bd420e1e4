import { readFileSync } from "node:fs";
import { type ReadCase, readCaseText } from "../../server/case/read.js";

/** A demo case, read. */
export function demo(name: string): Extract<ReadCase, { ok: true }> {
  const read = readCaseText(readFileSync(`scenarios/${name}.json`, "utf8"));
  if (!read.ok) throw new Error(`${name}: ${JSON.stringify(read.faults)}`);
  return read;
}
