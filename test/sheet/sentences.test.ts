import { describe, expect, test } from "vitest";
import type { FailureFindings } from "../../server/screening/findings.js";
import {
  actSentence,
  classSentence,
  failuresByUrgency,
  stopSentence,
  verdictText,
  windowSentence,
} from "../../server/sheet/sentences.js";
import { inventedFindings, stoppedFindings } from "./invented.js";

const { window } = inventedFindings;
if (window === null) throw new Error("the invented case has a window");
const [holds, act] = inventedFindings.failures ?? [];
if (holds === undefined || act === undefined) throw new Error("the invented case has two failures");
const lost: FailureFindings = { ...act, name: "Everything stops", verdict: "lost", timeToAct_s: 0 };

describe("the window in a sentence", () => {
  test("rounds its ends inwards and names what sets them", () => {
    const text = windowSentence({
      ...inventedFindings,
      window: { ...window, lower_K: 303.151, upper_K: 348.049 },
    });
    expect(text).toContain("from 30.1 °C (cooling suffices) to 74.8 °C (MTSR below MTT)");
  });

  test("rounds the cautious ends inwards too", () => {
    const cautious = { lower_K: 305.151, upper_K: 344.849 };
    expect(windowSentence({ ...inventedFindings, window: { ...window, cautious } })).toContain(
      "32.1 °C to 71.6 °C",
    );
    const nothing = { lower_K: null, upper_K: null };
    expect(windowSentence({ ...inventedFindings, window: { ...window, cautious: nothing } })).toContain(
      "nothing is left",
    );
  });

  test("says loudly where the plan lies outside, and that missing data never widen it", () => {
    const text = windowSentence({
      ...inventedFindings,
      window: { ...window, containsProcess: false, incomplete: true },
    });
    expect(text).toContain("35.0 °C ± 2.0 K does NOT lie inside it");
    expect(text).toContain("incomplete");
  });

  test("says why nothing is left", () => {
    const empty = { ...window, lower_K: null, upper_K: null, conflict: "One excludes the other." };
    const text = windowSentence({ ...inventedFindings, window: empty });
    expect(text).toBe("No process temperature meets every assessed criterion. One excludes the other.");
    expect(windowSentence({ ...inventedFindings, window: null })).toContain("not assessed");
  });
});

describe("failures", () => {
  test("come with the lost ones first, then by time to act, those that hold last", () => {
    const slow = { ...act, name: "slow", timeToAct_s: 9000 };
    expect(failuresByUrgency([holds, slow, act, lost]).map((failure) => failure.name)).toEqual([
      lost.name,
      act.name,
      slow.name,
      holds.name,
    ]);
  });

  test("say their verdict in a word, times rounded down", () => {
    expect(verdictText({ ...act, timeToAct_s: 119.9 })).toBe("act within 119 s");
    expect(verdictText(lost)).toContain("LOST");
    expect(verdictText(holds)).toContain("holds");
  });

  test("give the least time to act, or why there is none", () => {
    const withFailures = (failures: FailureFindings[] | null) =>
      actSentence({ ...inventedFindings, failures });
    expect(withFailures([holds, act])).toContain("79.1 min (“Coolant pump stops, feed runs on”)");
    expect(withFailures([holds, act])).toContain("5th percentile over the draws: 68.3 min");
    expect(withFailures([act, lost])).toContain("“Everything stops” is lost");
    expect(withFailures([holds])).toContain("holds by itself");
    expect(withFailures([])).toContain("not known");
    expect(withFailures(null)).toContain("not known");
  });
});

test("the class is said with what it means, or that it was not assessed", () => {
  for (const value of [1, 2, 3, 4, 5] as const) {
    expect(classSentence({ ...inventedFindings, criticality: { class: value, probability: null } })).toMatch(
      new RegExp(`^Criticality class ${value}: .*MTSR`),
    );
  }
  expect(classSentence({ ...inventedFindings, criticality: { class: null, probability: null } })).toContain(
    "not assessed",
  );
  expect(classSentence({ ...inventedFindings, criticality: { class: "none", probability: null } })).toMatch(
    /^No criticality class/,
  );
});

test("without a stop nobody is told that the step is safe", () => {
  expect(stopSentence(inventedFindings)).toContain("does not make the step safe");
  expect(stopSentence(stoppedFindings)).toBe("A stop stands.");
});
