import { describe, expect, test } from "vitest";
import { failureSentence } from "../../server/charts/failureSentence.js";
import type { FailureFindings } from "../../server/screening/findings.js";

// Invented figures.
const act: FailureFindings = {
  name: "Coolant stops",
  startedAt_s: 0,
  peak_K: 400,
  peakAt_s: 5000,
  timeToMtt_s: 2399,
  timeToTd24_s: null,
  maximumRate_K_s: 1,
  timeToMaximumRate_s: 4000,
  conversion: 1,
  decomposed: 0.2,
  beyondModel: true,
  mixingAssumed: null,
  verdict: "act",
  timeToAct_s: 1259,
  margin_s: null,
  alarm_K: null,
  trace: [],
};
const mtt_K = 373.15;
const say = (change: Partial<FailureFindings>) => failureSentence({ ...act, ...change }, mtt_K);

describe("what a failure asks of those who run the plant", () => {
  test("the time to act is rounded down, and what happens otherwise is said", () => {
    expect(say({})).toBe(
      "Put right what failed within 20.9 min; untouched, the technical limit of 100.0 °C is passed 39.9 min after the failure. " +
        "Noticing, deciding and acting must all fit into that time; no response was given.",
    );
  });

  test("a failure that is lost by decomposing below the limit names no limit", () => {
    const sentence = say({ timeToMtt_s: null });
    expect(sentence).toContain("the contents decompose or go on heating up");
    expect(sentence).not.toContain("technical limit");
  });

  test("what is left after the response, and the latest alarm, rounded down", () => {
    expect(say({ margin_s: 359, alarm_K: 341.39 })).toContain(
      "After the response that was given 5.9 min is left; the alarm must sound at 68.2 °C or below.",
    );
    expect(say({ margin_s: 1 })).toContain("no alarm temperature leaves that much");
  });

  test("a response that takes too long, rounded up", () => {
    expect(say({ margin_s: -121 })).toContain(
      "TOO LATE: the response that was given takes 2.1 min too long.",
    );
  });

  test("a failure that is lost asks for something else, whatever the response", () => {
    const sentence = say({ verdict: "lost", timeToAct_s: 0, margin_s: -300 });
    expect(sentence).toMatch(/^Putting right what failed does not help, however soon\./);
    expect(sentence).toContain("ready before the step is started");
    expect(sentence).not.toContain("TOO LATE");
  });

  test("a failure that holds asks for nothing, in the simulation", () => {
    const holds = { verdict: "holds", timeToAct_s: null, timeToMtt_s: null, peak_K: 350.01 } as const;
    expect(say(holds)).toBe(
      "In the simulation nobody has to act: the contents reach 76.9 °C at most and stay below the technical limit of 100.0 °C.",
    );
  });

  test("whether stopping the feed alone is enough", () => {
    expect(say({ stopFeedOnly: { suffices: true, timeToAct_s: 600 } })).toContain("enough within 10.0 min");
    expect(say({ stopFeedOnly: { suffices: false, timeToAct_s: null } })).toContain("alone is not enough");
  });

  test("that nothing mixed, where that is the worse of the two", () => {
    expect(say({ mixingAssumed: "unmixed" })).toContain("as if nothing mixed");
    expect(say({ mixingAssumed: "mixed" })).not.toContain("nothing mixed");
  });
});
