import { describe, expect, test } from "vitest";
import { fullSearch, judgeAt } from "../../server/failure/judgement.js";
import { createVessel } from "../../server/failure/vessel.js";
import { worstStart } from "../../server/failure/worstStart.js";
import { percentile } from "../../server/numeric/percentile.js";
import { drawnFailures, failureDraws, failuresWithDraws } from "../../server/screening/drawnFailures.js";
import { failureFindings } from "../../server/screening/failureFindings.js";
import type { DrawnFailureFindings, FailureFindings } from "../../server/screening/findings.js";
import { knownRates } from "../../server/screening/known.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { createDraws } from "../../server/uncertainty/draws.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

type Text = Record<string, unknown>;

const stops: Text = { name: "Coolant stops", at: "0 min", changes: [{ after: "0 min", coolantFlow: 0 }] };
const backAfter = (delay: string): Text => ({
  ...stops,
  name: "Coolant comes back",
  changes: [
    { after: "0 min", coolantFlow: 0 },
    { after: delay, coolantFlow: 1 },
  ],
});
const answeredIn = (action: string): Text => ({
  ...stops,
  response: { detection: "5 min", decision: "10 min", action },
});

/** A case with failures of its own, ready to be drawn. */
function opened(name: string, failures: readonly Text[], changes: Readonly<Record<string, unknown>> = {}) {
  const document = Object.entries(changes).reduce<Document>(
    (made, [path, value]) => changed(made, path, value),
    { ...documentOf(name), failures },
  );
  const model = modelOf(document);
  const known = knownRates(model);
  const found = failureFindings(realise(model, known, estimates), model.failures);
  return { model, known, found, simulated: found.simulated };
}

function drawn(of: ReturnType<typeof opened>, draws = 60) {
  return drawnFailures(of.model, of.known, of.simulated, { draws });
}

/** Time to act in one draw at the accuracy of what is reported, from its own worst start: 0 lost, infinite holds. */
function exactly({ model, known }: ReturnType<typeof opened>, at: number, draw: number, draws: number) {
  const step = realise(model, known, createDraws(draws).sample(draw));
  const failure = model.failures[at];
  const { rate, temperature } = step.reaction;
  const vessel = rate === null ? null : createVessel(step, rate, temperature);
  if (vessel === null) throw new Error("The hold could not be followed");
  const start = failure.at === "worst" ? worstStart(vessel, failure) : failure.at;
  const judgement = judgeAt(vessel, failure, start, fullSearch);
  if (judgement === null) throw new Error("The failure could not be run");
  return judgement.verdict === "lost" ? 0 : (judgement.timeToAct ?? Number.POSITIVE_INFINITY);
}

const three = ({ p05_s, p50_s, p95_s }: DrawnFailureFindings) => [p05_s, p50_s, p95_s];

describe("percentiles of the time to act", () => {
  const worst = (feed: "stop" | "continue"): Text => ({
    name: feed,
    at: "worst",
    changes: [{ after: "0 min", coolantFlow: 0, feed }],
  });
  test.each([
    ["a batch", "batch-ring-closure", [stops, backAfter("37 min")]],
    ["a dosed step from its worst start", "semibatch-acylation", [worst("stop"), worst("continue")]],
  ] as const)("of %s are those of its draws run at full accuracy, to 1 s and 0.5 %%", (_, name, failures) => {
    const of = opened(name, failures);
    const { failures: found } = drawn(of, 20);
    failures.forEach((_failure, at) => {
      const times = Array.from({ length: 20 }, (_draw, draw) => exactly(of, at, draw, 20));
      times.sort((a, b) => (a < b ? -1 : 1));
      three(found[at]).forEach((ours, i) => {
        const theirs = percentile(times, [0.05, 0.5, 0.95][i]);
        if (Number.isFinite(theirs)) expect(Math.abs((ours ?? 0) - theirs)).toBeLessThan(1 + 0.005 * theirs);
        else expect(ours).toBeNull();
      });
    });
  });

  test("are those of 200 draws unless said, and of the same draws each time", () => {
    const of = opened("batch-ring-closure", [stops]);
    const one = drawnFailures(of.model, of.known, of.simulated);
    expect(one.failures[0].draws).toBe(200);
    expect(failureDraws).toBe(200);
    expect(drawnFailures(of.model, of.known, of.simulated)).toEqual(one);
  });

  test("do not depend on what else is in the case, nor on the unit of an input", () => {
    const alone = drawn(opened("batch-ring-closure", [stops])).failures[0];
    const among = opened("batch-ring-closure", [backAfter("30 min"), stops], {
      "/mixture/mass": "1.9 t",
    });
    const mass = opened("batch-ring-closure", [stops], { "/mixture/mass": "1900 kg" });
    expect(drawn(among).failures[1]).toEqual(drawn(mass).failures[0]);
    expect(alone.probability.act).toBe(1);
  });

  test("of 60 and of 400 draws agree within a twentieth, in ascending order", () => {
    const of = opened("batch-ring-closure", [stops]);
    const few = three(drawn(of, 60).failures[0]);
    const many = three(drawn(of, 400).failures[0]);
    few.forEach((each, i) => {
      expect(Math.abs((each ?? 0) / (many[i] ?? 0) - 1)).toBeLessThan(0.05);
    });
    expect(many[0]).toBeLessThan(many[1] ?? 0);
    expect(many[1]).toBeLessThan(many[2] ?? 0);
  });

  test("are the estimate itself where nothing is uncertain", () => {
    const of = opened("published-oncb", [stops]);
    const [found] = drawn(of).failures;
    const estimate = of.simulated[0].judgement.timeToAct;
    expect(estimate).toBeGreaterThan(0);
    expect(three(found)).toEqual([estimate, estimate, estimate]);
    expect(found).toMatchObject({ estimateAgrees: true, probability: { holds: 0, act: 1, lost: 0 } });
  });
});

describe("probabilities of the verdicts", () => {
  test("a failure whose coolant returns holds in just the draws that leave longer than that", () => {
    const of = opened("batch-ring-closure", [stops, backAfter("37 min")]);
    const times = Array.from({ length: 60 }, (_, draw) => exactly(of, 0, draw, 60));
    const holding = times.filter((time) => time > 37 * 60).length;
    const [, back] = drawn(of).failures;
    expect(back.probability.holds).toBeCloseTo(holding / 60, 12);
    expect(back.probability.holds).toBeGreaterThan(0.3);
    expect(back.probability.act).toBeGreaterThan(0.3);
    expect(back.probability.holds + back.probability.act + back.probability.lost).toBeCloseTo(1, 12);
    // The low end is among the draws that do not hold, the high end among those that do.
    expect(back.p05_s).toBeLessThan(37 * 60);
    expect(back.p95_s).toBeNull();
  });

  test("of a vessel too small are mostly lost, and a lost draw leaves no time", () => {
    const area = { "/vessel/heatTransferArea": "0.3 m^2" };
    const [found] = drawn(opened("batch-ring-closure", [stops], area)).failures;
    expect(found.probability.lost).toBeGreaterThan(0.95);
    expect(found.p05_s).toBe(0);
  });

  test("a draw that cannot be run counts as lost", () => {
    const { known, simulated, model } = opened("batch-ring-closure", [stops]);
    const unknown = { ...model, reaction: { ...model.reaction, rateConstant: null } };
    const [found] = drawnFailures(unknown, known, simulated, { draws: 5 }).failures;
    expect(found.probability).toEqual({ holds: 0, act: 0, lost: 1 });
  });

  test("that the margin is positive is the part of the draws that leave longer than the response", () => {
    const of = opened("batch-ring-closure", [answeredIn("22 min"), stops]);
    const times = Array.from({ length: 60 }, (_, draw) => exactly(of, 0, draw, 60));
    const inTime = times.filter((time) => time > 37 * 60).length;
    const [answered, unanswered] = drawn(of).failures;
    expect(answered.probabilityMarginPositive).toBeCloseTo(inTime / 60, 12);
    expect(unanswered.probabilityMarginPositive).toBeNull();
  });
});

describe("the least time to act of a case", () => {
  test("is that of its only failure", () => {
    const { failures, timeToAct } = drawn(opened("batch-ring-closure", [stops]));
    expect([timeToAct?.p05, timeToAct?.p50, timeToAct?.p95]).toEqual(three(failures[0]));
  });

  test("is taken in each draw: two failures that are the worse by turns leave no more than either", () => {
    const cold = { ...stops, name: "Warm start", startTemperature: "85.2 degC" };
    const { failures, timeToAct } = drawn(opened("batch-ring-closure", [stops, cold]));
    const low = Math.min(...failures.map((each) => each.p05_s ?? Number.POSITIVE_INFINITY));
    expect(timeToAct?.p05).toBeLessThanOrEqual(low);
    expect(timeToAct?.p50).toBeGreaterThan(0.8 * low);
  });

  test("is not known without failures, and none where all hold", () => {
    expect(drawn(opened("batch-ring-closure", [])).timeToAct).toBeNull();
    expect(drawn(opened("batch-ring-closure", [backAfter("5 min")])).timeToAct).toEqual({
      p05: null,
      p50: null,
      p95: null,
    });
  });
});

describe("in the findings", () => {
  const withDraws = (failures: readonly Text[], changes: Readonly<Record<string, unknown>> = {}) => {
    const of = opened("batch-ring-closure", failures, changes);
    return failuresWithDraws(of.model, of.known, of.found);
  };
  const codesOf = (failure: Text, changes: Readonly<Record<string, unknown>> = {}) =>
    withDraws([failure], changes).cautions.map((each) => each.code);

  test("each failure carries its own draws", () => {
    const { failures } = withDraws([backAfter("5 min"), stops]);
    const [holds, acts] = failures as FailureFindings[];
    expect(holds.drawn?.probability.holds).toBe(1);
    expect(acts.drawn?.probability.act).toBe(1);
  });

  test("without kinetics there is nothing to draw", () => {
    const { model, known } = opened("batch-ring-closure", [stops]);
    const none = { failures: null, simulated: [], cautions: [] };
    expect(failuresWithDraws(model, known, none)).toEqual({ failures: null, timeToAct: null, cautions: [] });
  });

  // 37.5 min at the estimates, 32.6 min in 5 of 100 draws.
  test("ACT_UNSURE is raised where only the low end is shorter than the response", () => {
    expect(codesOf(answeredIn("20 min"))).toContain("ACT_UNSURE");
    expect(codesOf(answeredIn("10 min"))).not.toContain("ACT_UNSURE");
    const late = codesOf(answeredIn("40 min"));
    expect(late).toContain("ACT_TOO_LATE");
    expect(late).not.toContain("ACT_UNSURE");
  });

  test("ACT_UNSURE says what the draws leave, what is needed and how often that is too long", () => {
    const caution = withDraws([answeredIn("20 min")]).cautions.find((each) => each.code === "ACT_UNSURE");
    expect(caution).toMatchObject({ level: "warn", about: "/failures/0" });
    expect(caution?.text).toMatch(
      /leaves 37\.5 min to act at the estimates, but in 5 of 100 draws it leaves less than 32\.\d min\./,
    );
    expect(caution?.text).toMatch(/take 35\.0 min: they come too late in \d+ of 100 draws\.$/);
  });

  test("ACT_UNSURE is raised for a failure that holds at the estimates but not in enough draws", () => {
    const { response } = answeredIn("20 min");
    expect(codesOf({ ...backAfter("36 min"), response })).toContain("ACT_UNSURE");
    expect(codesOf(backAfter("36 min"))).toContain("ACT_UNSURE");
    expect(codesOf(backAfter("10 min"))).not.toContain("ACT_UNSURE");
  });

  test("ACT_UNSURE needs no response where the failure is lost in one draw of twenty", () => {
    const unsure = withDraws([stops], { "/vessel/heatTransferArea": "1.3 m^2" });
    const [failure] = unsure.failures as FailureFindings[];
    expect(failure.verdict).toBe("act");
    expect(failure.drawn?.p05_s).toBe(0);
    expect(unsure.cautions.find((each) => each.code === "ACT_UNSURE")?.text).toMatch(
      /but in \d+ of 100 draws it is lost\.$/,
    );
    expect(codesOf(stops)).not.toContain("ACT_UNSURE");
  });
});

describe("drawing", () => {
  test("tells how far it is, and ends where that throws", () => {
    const of = opened("batch-ring-closure", [stops, backAfter("5 min")]);
    const seen: number[] = [];
    drawnFailures(of.model, of.known, of.simulated, { draws: 10, onProgress: (part) => seen.push(part) });
    expect(seen).toHaveLength(20);
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    expect(seen.at(-1)).toBeLessThan(1);
    const stop = () => {
      throw new Error("enough");
    };
    expect(() => drawnFailures(of.model, of.known, of.simulated, { onProgress: stop })).toThrow("enough");
  });
});
