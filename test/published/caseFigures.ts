import { readdirSync, readFileSync } from "node:fs";

/** A case document and the findings that an independent implementation, in another language, gives for it. */
export interface CheckedCase {
  readonly name: string;
  readonly text: string;
  /** by dotted path; `window.criteria.KEY` stands for that criterion's allowed spans */
  readonly expected: Readonly<Record<string, unknown>>;
}

const folder = new URL("cases/", import.meta.url);

/** The checked cases beside this file. */
export function checkedCases(): CheckedCase[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith(".json") && !file.endsWith(".expected.json"))
    .map((file) => ({
      name: file.replace(".json", ""),
      text: readFileSync(new URL(file, folder), "utf8"),
      expected: JSON.parse(readFileSync(new URL(file.replace(".json", ".expected.json"), folder), "utf8")),
    }));
}

/** The figure at a dotted path of the findings; undefined where there is none. */
export function figureAt(findings: unknown, path: string): unknown {
  const criterion = path.match(/^window\.criteria\.(.+)$/)?.[1];
  if (criterion !== undefined) {
    const criteria = figureAt(findings, "window.criteria");
    const found = Array.isArray(criteria) ? criteria.find((each) => each.key === criterion) : undefined;
    return found?.allowed;
  }
  return path.split(".").reduce<unknown>((value, key) => {
    if (typeof value !== "object" || value === null) return undefined;
    return Object.entries(value).find(([name]) => name === key)?.[1];
  }, findings);
}

/** By how much two figures may differ: temperatures 0.01 K, window ends 0.02 K, times and rates 1e-4, the rest 1e-6. */
export function tolerance(path: string, wanted: number): number {
  if (path.startsWith("window.")) return 0.02;
  if (path.endsWith("timeToAct_s")) return 1;
  if (/(accumulation\.at_s|startedAt_s|timeToMaximumRate_s|peakAt_s)$/.test(path))
    return 2 + 0.002 * Math.abs(wanted);
  if (path.endsWith("_K")) return 0.01;
  const relative = path.startsWith("failures") || /(_s|duty_W)$/.test(path) ? 1e-4 : 1e-6;
  return relative * Math.abs(wanted) + 1e-12;
}
