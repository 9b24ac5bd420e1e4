import { describe, expect, test } from "vitest";
import { assess } from "../../server/failure/assessment.js";
import { judgeAt } from "../../server/failure/judgement.js";
import type { Timeline } from "../../server/failure/timeline.js";
import { savedBy } from "../../server/failure/timeToAct.js";
import { vulnerableMoments } from "../../server/failure/vulnerable.js";
import { worstStart } from "../../server/failure/worstStart.js";
import type { Step } from "../../server/thermal/step.js";
import { changed, documentOf, modelOf, stepOf } from "../screening/realised.js";
import { assessed, caseOf, runFrom, timelineOf, vesselFor } from "./running.js";

const acylation = caseOf("semibatch-acylation");
const ring = caseOf("batch-ring-closure");
const [stopped, runsOn, unstirred] = acylation.failures;

describe("a verdict", () => {
  test("is not changed by the horizon, which only lengthens what is shown", () => {
    for (const { step, failures } of [acylation, ring]) {
      for (const failure of failures) {
        const vessel = vesselFor(step, failure);
        const short = assess(vessel, failure);
        const long = assess(vessel, { ...failure, horizon: 5 * 86_400 });
        const tiny = assess(vessel, { ...failure, horizon: 60 });
        expect(long?.verdict).toBe(short?.verdict);
        expect(long?.timeToAct).toBe(short?.timeToAct);
        expect(long?.run.end.time).toBe(5 * 86_400);
        expect(tiny?.run.end.time).toBe(short?.run.end.time);
        expect(tiny?.timeToAct).toBe(short?.timeToAct);
      }
    }
  });

  test("is not changed by the units in which the case is typed", () => {
    const document = documentOf("semibatch-acylation");
    const retyped = [
      ["/failures/2/at", "90 min"],
      ["/reaction/feed/duration", "10800 s"],
      ["/mixture/mass", "1450000 g"],
      ["/vessel/coolant/temperature", "278.15 K"],
      ["/limits/maximumTechnicalTemperature", "351.15 K"],
    ].reduce((made, [path, text]) => changed(made, path, text), document);
    const model = modelOf(retyped);
    const step = stepOf(retyped);
    acylation.failures.forEach((failure, i) => {
      const typed = assessed(acylation.step, failure);
      const other = assessed(step, model.failures[i]);
      expect(other.verdict).toBe(typed.verdict);
      expect(Math.abs((other.timeToAct ?? 0) - (typed.timeToAct ?? 0))).toBeLessThan(0.6);
    });
  });

  test("is lost where the contents are above the technical limit from the start", () => {
    const hot: Step = {
      ...ring.step,
      limits: { ...ring.step.limits, maximumTechnicalTemperature: 350 },
    };
    const found = assessed(hot, ring.failures[0]);
    expect(found.verdict).toBe("lost");
    expect(found.timeToAct).toBe(0);
    expect(found.run.marks.mtt).toBe(0);
  });

  test("is lost where even full cooling at once does not hold the batch", () => {
    const small: Step = { ...ring.step, vessel: { ...ring.step.vessel, ua: 60 } };
    const found = assessed(small, ring.failures[0]);
    expect(found.start.duty).toBeGreaterThan(found.start.capacity);
    expect(found.verdict).toBe("lost");
  });

  test("counts a temperature that still rises at the end of the watch as lost", () => {
    const { step } = caseOf("batch-hydrolysis");
    const stirred: Step = { ...step, vessel: { ...step.vessel, agitatorPower: 400 } };
    const found = assessed(stirred, timelineOf([{ after: 0, coolantFlow: 0 }]));
    expect(found.run.marks.mtt).toBeNull();
    // 400 W into 800 kg with 3.9 kJ/(kg K): 0.46 K/h, long after the reaction's end.
    expect(found.run.loss).toEqual({ at: 86_400, by: "rising" });
    expect(found.verdict).toBe("act");
    expect(found.timeToAct).toBe(86_400);
  });

  test("holds where the rise at the end of the watch is slower than a tenth of a kelvin in an hour", () => {
    const { step } = caseOf("batch-hydrolysis");
    const stirred: Step = { ...step, vessel: { ...step.vessel, agitatorPower: 80 } };
    expect(assessed(stirred, timelineOf([{ after: 0, coolantFlow: 0 }])).verdict).toBe("holds");
  });

  test("crossing T_D24 alone is no loss", () => {
    const found = assessed(ring.step, ring.failures[1]);
    expect(found.run.marks.td24).toBeGreaterThan(0);
    expect(found.verdict).toBe("holds");
  });

  test("names the decomposition where that is lost before the temperature", () => {
    const found = assessed(ring.step, ring.failures[0]);
    expect(found.run.loss?.by).toBe("decomposition");
    expect(found.run.loss?.at).toBeLessThan(found.run.marks.mtt ?? 0);
  });
});

describe("the time to act", () => {
  test("divides delays that save the batch from delays that do not", () => {
    for (const failure of [runsOn, stopped]) {
      const vessel = vesselFor(acylation.step, failure);
      const found = assess(vessel, failure);
      const time = found?.timeToAct ?? 0;
      if (found === null) throw new Error("Not run");
      expect(savedBy(vessel, found.run, "restore", time, "before", 1e-8)).toBe(true);
      expect(savedBy(vessel, found.run, "restore", time + 0.6, "before", 1e-8)).toBe(false);
    }
  });

  test("found quickly, for a figure, agrees within half a percent", () => {
    for (const failure of [runsOn, stopped]) {
      const vessel = vesselFor(acylation.step, failure);
      const found = assess(vessel, failure);
      const quick = judgeAt(vessel, failure, found?.start.startedAt ?? 0);
      expect(Math.abs((quick?.timeToAct ?? 0) / (found?.timeToAct ?? 1) - 1)).toBeLessThan(5e-3);
    }
  });

  test("is shorter with less coolant and with a warmer coolant", () => {
    const { vessel } = ring.step;
    const timeWith = (changes: Partial<Step["vessel"]>): number =>
      assessed({ ...ring.step, vessel: { ...vessel, ...changes } }, ring.failures[0]).timeToAct ?? 0;
    const usual = timeWith({});
    const { flowing } = vessel;
    if (flowing === null) throw new Error("No flow");
    expect(timeWith({ flowing: { ...flowing, flow: 0.2 * flowing.flow } })).toBeLessThan(usual);
    expect(timeWith({ coolantTemperature: vessel.coolantTemperature + 25 })).toBeLessThan(usual);
  });

  test("ends at a change that leaves nothing to be saved", () => {
    // A hot charge dropped in at 300 s sends the contents over the limit at once.
    const timeline = timelineOf([
      { after: 0, coolantFlow: 0 },
      { after: 300, quench: { mass: 8000, heatCapacity: 2000, density: 900, temperature: 500 } },
    ]);
    const found = assessed(ring.step, timeline);
    expect(found.run.loss).toEqual({ at: 300, by: "mtt" });
    expect(found.timeToAct).toBeGreaterThan(299);
    expect(found.timeToAct).toBeLessThanOrEqual(300);
  });
});

describe("stopping the feed alone", () => {
  test("suffices where the agitator's heat is all that is left, and not for a day with it", () => {
    const still: Step = {
      ...acylation.step,
      vessel: { ...acylation.step.vessel, agitatorPower: 0, gain: null },
    };
    const found = assessed(still, runsOn);
    expect(found.verdict).toBe("act");
    expect(found.stopFeedOnly?.suffices).toBe(true);
    expect(found.stopFeedOnly?.timeToAct).toBeGreaterThan(600);
    expect(found.stopFeedOnly?.timeToAct).toBeLessThan(found.timeToAct ?? 0);
    // 2 kW warm the contents by some 2 K in every hour that nothing is cooled.
    expect(assessed(acylation.step, runsOn).stopFeedOnly).toEqual({ suffices: false, timeToAct: null });
  });

  test("is not asked where the feed has stopped, in a batch, or where the failure holds", () => {
    expect(assessed(acylation.step, stopped).stopFeedOnly).toBeNull();
    expect(assessed(ring.step, ring.failures[0]).stopFeedOnly).toBeNull();
    expect(assessed(acylation.step, unstirred).stopFeedOnly).toBeNull();
  });
});

describe("a stopped agitator", () => {
  test("is run with both assumptions, and the worse is reported", () => {
    const found = assessed(acylation.step, unstirred);
    const [mixed, unmixed] = found.runs;
    expect(found.runs.map((run) => run.mixing)).toEqual(["mixed", "unmixed"]);
    expect(mixed.peak.value).toBeGreaterThan(unmixed.peak.value);
    expect(found.run).toBe(mixed);
  });

  test("leaves what is fed unreacted until it is on again, where it is taken not to mix", () => {
    const [, unmixed] = assessed(acylation.step, unstirred).runs;
    const extentAt = (time: number): number => unmixed.trajectory.component(time, 1, true);
    expect(extentAt(2400)).toBe(unmixed.start.state[1]);
    expect(extentAt(3000)).toBeGreaterThan(unmixed.start.state[1] + 0.05);
  });

  test("may be the worse unmixed: then all that has piled up meets at the restart", () => {
    const timeline = timelineOf(
      [
        { after: 0, agitator: "off", heatTransfer: 0.2 },
        { after: 9000, agitator: "on" },
      ],
      { at: 1200 },
    );
    const found = assessed(acylation.step, timeline);
    expect(found.run.mixing).toBe("unmixed");
    expect(found.run.peak.at).toBeGreaterThan(9000);
  });

  test("has a time to act that saves the contents whichever assumption holds", () => {
    const timeline = timelineOf([{ after: 0, agitator: "off", heatTransfer: 0, coolantFlow: 0 }], {
      at: 600,
    });
    const vessel = vesselFor(acylation.step, timeline);
    const found = assess(vessel, timeline);
    if (found === null || found.timeToAct === null) throw new Error("Nothing to act on");
    for (const run of found.runs) {
      expect(savedBy(vessel, run, "restore", found.timeToAct, "before", 1e-7)).toBe(true);
    }
    expect(
      found.runs.every((run) =>
        savedBy(vessel, run, "restore", (found.timeToAct ?? 0) + 0.6, "before", 1e-7),
      ),
    ).toBe(false);
  });
});

describe("the worst start", () => {
  test("is the time of MTSR where the feed stops and stays stopped", () => {
    const vessel = vesselFor(acylation.step, stopped);
    expect(worstStart(vessel, stopped)).toBe(vessel.hold.mtsrAt);
  });

  test("is the very start of the feed for the acylation whose feed runs on (independent implementation)", () => {
    expect(worstStart(vesselFor(acylation.step, runsOn), runsOn)).toBe(0);
  });

  test("is the start of a batch", () => {
    const anytime: Timeline = { ...ring.failures[0], at: "worst" };
    expect(worstStart(vesselFor(ring.step, anytime), anytime)).toBe(0);
  });

  test("inside the feed is worse than any start of a finer grid", () => {
    const timeline = timelineOf(
      [
        { after: 0, agitator: "off", heatTransfer: 0.15 },
        { after: 2400, agitator: "on", heatTransfer: 1 },
      ],
      { at: "worst" },
    );
    const vessel = vesselFor(acylation.step, timeline);
    const worst = worstStart(vessel, timeline);
    expect(worst).toBeGreaterThan(0);
    const peakFrom = (start: number): number => runFrom(vessel, timeline, start, 1e-7).peak.value;
    const peak = peakFrom(worst);
    for (let start = 0; start <= 10_800; start += 120) {
      expect(peakFrom(start)).toBeLessThanOrEqual(peak + 1e-4);
    }
    expect(peakFrom(worst - 5)).toBeLessThanOrEqual(peak + 1e-6);
    expect(peakFrom(worst + 5)).toBeLessThanOrEqual(peak + 1e-6);
  });
});

describe("the most vulnerable moment", () => {
  test("of a feed that stops with the failure is the time of MTSR", () => {
    const vessel = vesselFor(acylation.step, stopped);
    const moments = vulnerableMoments(vessel, stopped) ?? [];
    expect(moments).toHaveLength(21);
    const least = moments.reduce((a, b) => ((b.timeToAct ?? 1e9) < (a.timeToAct ?? 1e9) ? b : a));
    expect(Math.abs(least.startedAt - vessel.hold.mtsrAt)).toBeLessThan(540);
  });

  test("is not asked of a batch", () => {
    expect(vulnerableMoments(vesselFor(ring.step, ring.failures[0]), ring.failures[0])).toBeNull();
  });
});
