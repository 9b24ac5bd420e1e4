import { describe, expect, test } from "vitest";
import type { Judgement } from "../../server/failure/judgement.js";
import { agreesWithMedian, orderedTime, timesToAct } from "../../server/uncertainty/timesToAct.js";

const holds: Judgement = { verdict: "holds", timeToAct: null };
const lost: Judgement = { verdict: "lost", timeToAct: 0 };
const act = (timeToAct: number): Judgement => ({ verdict: "act", timeToAct });

describe("the time to act over draws", () => {
  test("orders a lost failure before every other and one that holds behind them", () => {
    expect([holds, act(1), lost].map(orderedTime).sort((a, b) => (a < b ? -1 : 1))).toEqual([
      0,
      1,
      Number.POSITIVE_INFINITY,
    ]);
  });

  test("has the percentiles of its values, counted from 0 and read between neighbours", () => {
    const draws = [5, 1, 3, 2, 4].map((each) => act(100 * each));
    expect(timesToAct(draws, null).percentiles).toEqual({ p05: 120, p50: 300, p95: 480 });
  });

  test("is null at a percentile that falls among the draws that hold, 0 among the lost", () => {
    const draws = [
      ...Array.from({ length: 10 }, () => lost),
      act(60),
      ...Array.from({ length: 10 }, () => holds),
    ];
    expect(timesToAct(draws, null).percentiles).toEqual({ p05: 0, p50: 60, p95: null });
  });

  test("leaves its probabilities as parts of the draws", () => {
    const { probability, probabilityMarginPositive } = timesToAct([holds, act(50), act(70), lost], 60);
    expect(probability).toEqual({ holds: 0.25, act: 0.5, lost: 0.25 });
    expect(probabilityMarginPositive).toBe(0.5);
  });

  test("is not longer than a response that it equals, and no answer to one that is not stated", () => {
    expect(timesToAct([act(60)], 60).probabilityMarginPositive).toBe(0);
    expect(timesToAct([lost], 0).probabilityMarginPositive).toBe(0);
    expect(timesToAct([act(60)], null).probabilityMarginPositive).toBeNull();
  });
});

describe("the estimate agrees with the median", () => {
  test.each([
    [holds, null, true],
    [holds, 1e6, false],
    [act(1000), null, false],
    [act(1000), 1110, true],
    [act(1000), 1112, false],
    [act(1000), 901, true],
    [act(1000), 899, false],
    [act(30), 85, true],
    [lost, 0, true],
    [lost, 59, true],
    [lost, 61, false],
  ])("%j against %j: %j", (estimate, median, agrees) => {
    expect(agreesWithMedian(estimate, median)).toBe(agrees);
  });
});
