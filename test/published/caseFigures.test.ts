import { describe, expect, test } from "vitest";
import { readCaseText } from "../../server/case/read.js";
import { screen } from "../../server/screening/screen.js";
import { checkedCases, figureAt, tolerance } from "./caseFigures.js";

/** Numbers of a figure in order: itself, or the ends of its spans. */
function numbersOf(figure: unknown): unknown[] {
  return Array.isArray(figure) ? figure.flat() : [figure];
}

describe.each(checkedCases())("$name agrees with an independent implementation", ({ text, expected }) => {
  const read = readCaseText(text);
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  const findings = screen(read.model, { digest: read.digest, depth: "full" });

  test.each(Object.entries(expected))("%s", (path, wanted) => {
    const got = numbersOf(figureAt(findings, path));
    const want = numbersOf(wanted);
    expect(got).toHaveLength(want.length);
    for (const [i, value] of want.entries()) {
      const figure = got[i];
      if (typeof value !== "number") expect(figure).toBe(value);
      else {
        expect(figure).toBeTypeOf("number");
        expect(Math.abs(Number(figure) - value)).toBeLessThanOrEqual(tolerance(path, value));
      }
    }
  });
});
