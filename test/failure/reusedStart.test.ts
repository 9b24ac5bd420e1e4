import { describe, expect, test } from "vitest";
import { fullSearch, judgeAt } from "../../server/failure/judgement.js";
import { reusedStart } from "../../server/failure/reusedStart.js";
import type { Timeline } from "../../server/failure/timeline.js";
import type { Vessel } from "../../server/failure/vessel.js";
import { harmAt, worstStart } from "../../server/failure/worstStart.js";
import { knownRates } from "../../server/screening/known.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { createDraws } from "../../server/uncertainty/draws.js";
import { changed, documentOf, modelOf } from "../screening/realised.js";
import { timelineOf, vesselFor } from "./running.js";

const worst = { at: "worst" } as const;
const feedRunsOn = timelineOf([{ after: 0, coolantFlow: 0, feed: "continue" }], worst);
const feedStopsLater = timelineOf(
  [
    { after: 0, coolantFlow: 0, feed: "continue" },
    { after: 1800, feed: "stop" },
  ],
  worst,
);
const unstirred = timelineOf(
  [
    { after: 0, heatTransfer: 0.1, agitator: "off", feed: "continue" },
    { after: 1800, agitator: "on" },
  ],
  worst,
);

/** The dosed case, colder and with an uncertain feed, so that worst starts lie within the feed and move. */
function cold(temperature: string) {
  const document = [
    ["/reaction/temperature", temperature],
    ["/vessel/coolant/temperature", "-20 degC"],
    ["/limits/lowestTemperature", "-30 degC"],
    ["/limits/maximumTechnicalTemperature", "55 degC"],
    ["/reaction/feed/duration", { value: "3 h", standardError: "20 min" }],
  ].reduce((made, [path, value]) => changed(made, String(path), value), documentOf("semibatch-acylation"));
  const model = modelOf(document);
  const known = knownRates(model);
  const draws = createDraws(200);
  return {
    nominal: realise(model, known, estimates),
    drawn: (index: number) => realise(model, known, draws.sample(index)),
  };
}

function timeFrom(vessel: Vessel, timeline: Timeline, startedAt: number): number {
  const judgement = judgeAt(vessel, timeline, startedAt, fullSearch);
  return judgement?.timeToAct ?? Number.POSITIVE_INFINITY;
}

describe("the start of a failure in a draw", () => {
  test.each([
    ["35 degC", feedStopsLater],
    ["15 degC", feedRunsOn],
    ["5 degC", feedStopsLater],
    ["5 degC", unstirred],
  ] as const)(
    "from %s leads within 5 %% of the time to act at the draw's own worst start",
    (at, timeline) => {
      const { nominal, drawn } = cold(at);
      const vessel = vesselFor(nominal, timeline);
      const known = { startedAt: worstStart(vessel, timeline), mtsrAt: vessel.hold.mtsrAt };
      for (let i = 0; i < 10; i += 1) {
        const own = vesselFor(drawn(i), timeline);
        const found = timeFrom(own, timeline, reusedStart(own, timeline, known));
        const searched = timeFrom(own, timeline, worstStart(own, timeline));
        expect(found).toBeLessThan(1.05 * searched + 1);
      }
    },
  );

  test("is the draw's own time of MTSR where the feed stops and stays stopped", () => {
    const { drawn } = cold("15 degC");
    const timeline = timelineOf([{ after: 0, coolantFlow: 0, feed: "stop" }], worst);
    const own = vesselFor(drawn(3), timeline);
    expect(reusedStart(own, timeline, { startedAt: 5, mtsrAt: 5 })).toBe(own.hold.mtsrAt);
  });

  test("is the stated one where one is stated, and 0 in a batch", () => {
    const { nominal } = cold("15 degC");
    const stated = timelineOf([{ after: 0, coolantFlow: 0 }], { at: 777 });
    const known = { startedAt: 777, mtsrAt: 1 };
    expect(reusedStart(vesselFor(nominal, stated), stated, known)).toBe(777);
    const model = modelOf(documentOf("batch-hydrolysis"));
    const batch = realise(model, knownRates(model), estimates);
    expect(reusedStart(vesselFor(batch, feedRunsOn), feedRunsOn, known)).toBe(0);
  });

  test("is looked for without following what is lost too late to matter", () => {
    const { nominal } = cold("15 degC");
    const vessel = vesselFor(nominal, feedRunsOn);
    const whole = harmAt(vessel, feedRunsOn, 3600, 1e-5);
    expect(whole.lostAt).toBeLessThan(7200);
    const inTime = harmAt(vessel, feedRunsOn, 3600, 1e-5, whole.lostAt + 1);
    expect(Math.abs(inTime.lostAt - whole.lostAt)).toBeLessThan(0.1);
    // Still rising there, but its watch is not over.
    expect(harmAt(vessel, feedRunsOn, 3600, 1e-5, 0.5 * whole.lostAt).lostAt).toBe(Number.POSITIVE_INFINITY);
  });

  test("stays within a feed that a draw makes shorter", () => {
    const { nominal } = cold("15 degC");
    const vessel = vesselFor(nominal, feedRunsOn);
    const duration = nominal.reaction.feed?.duration ?? 0;
    const start = reusedStart(vessel, feedRunsOn, { startedAt: 2 * duration, mtsrAt: 0 });
    expect(start).toBeGreaterThanOrEqual(0);
    expect(start).toBeLessThanOrEqual(duration);
  });
});
