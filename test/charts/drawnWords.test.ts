import { describe, expect, test } from "vitest";
import { drawnTimeWords, drawnWords, medianSentence } from "../../server/charts/drawnWords.js";
import { failureSentence } from "../../server/charts/failureSentence.js";
import type { DrawnFailureFindings, FailureFindings } from "../../server/screening/findings.js";
import { inventedWhole } from "./inventedWhole.js";

// Invented figures.
const draws: DrawnFailureFindings = {
  draws: 200,
  p05_s: 1979,
  p50_s: 2264,
  p95_s: 2571,
  probabilityMarginPositive: null,
  probability: { holds: 0, act: 1, lost: 0 },
  estimateAgrees: true,
};

function failure(change: Partial<DrawnFailureFindings> | null): FailureFindings {
  const [first] = inventedWhole.failures ?? [];
  if (first === undefined) throw new Error("The invented case has failures");
  return { ...first, drawn: change === null ? null : { ...draws, ...change } };
}

describe("what the draws say of a failure", () => {
  test("is the low end of its time to act, rounded down", () => {
    expect(drawnWords(failure({}))).toBe("5 % of draws: less than 32.9 min");
  });

  test("is how often the response comes too late, rounded up", () => {
    expect(drawnWords(failure({ probabilityMarginPositive: 0.965 }))).toBe(
      "5 % of draws: less than 32.9 min; response too late in 4 of 100 draws",
    );
  });

  test("is how often it is lost or has to be acted on, where the low end is no time", () => {
    const mostlyLost = { p05_s: 0, probability: { holds: 0, act: 0.2, lost: 0.8 } };
    expect(drawnTimeWords(failure(mostlyLost))).toBe("lost in 80 of 100 draws");
    const mostlyHolding = { p05_s: null, probability: { holds: 0.97, act: 0.01, lost: 0.02 } };
    expect(drawnTimeWords(failure(mostlyHolding))).toBe(
      "must be acted on in 3 of 100 draws; lost in 2 of 100 draws",
    );
    const holding = { p05_s: null, probability: { holds: 1, act: 0, lost: 0 } };
    expect(drawnTimeWords(failure(holding))).toBe("holds in all 200 draws");
    const alsoLost = { probability: { holds: 0, act: 0.98, lost: 0.02 } };
    expect(drawnTimeWords(failure(alsoLost))).toContain("; lost in 2 of 100 draws");
  });

  test("is no spread where nothing spreads, and nothing where nothing was drawn", () => {
    expect(drawnTimeWords(failure({ p05_s: 555.5, p50_s: 555.5, p95_s: 555.5 }))).toBe(
      "the same in every draw",
    );
    expect(drawnWords(failure(null))).toBe("not drawn");
  });

  test("is told to those who run the plant where the estimate does not stand for it", () => {
    expect(medianSentence(failure({}))).toBe("");
    expect(failureSentence(failure({ estimateAgrees: false }), 350)).toMatch(
      /The estimate does not stand for the draws: in half of them the time to act is 37\.7 min or less\.$/,
    );
    expect(medianSentence(failure({ estimateAgrees: false, p50_s: null }))).toContain("it holds by itself");
    expect(medianSentence(failure({ estimateAgrees: false, p50_s: 0 }))).toContain("it is lost");
  });
});
