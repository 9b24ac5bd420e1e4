import { describe, expect, test } from "vitest";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import { runawayOf } from "../../server/thermal/cooling.js";
import { doseAt } from "../../server/thermal/dosing.js";
import { progressAfterHold } from "../../server/thermal/history.js";
import { timeToMaximumRate } from "../../server/thermal/runaway.js";
import type { Decomposition, Step } from "../../server/thermal/step.js";
import { stepWith } from "../published/steps.js";
import { caseOf, rateOf, runFrom, timelineOf, vesselFor } from "./running.js";

const acylation = caseOf("semibatch-acylation").step;
const insulated = { ...acylation.vessel, agitatorPower: 0, gain: null };

describe("without heat transfer, agitator, gain and decomposition the contents end at MTSR", () => {
  /** Fed amounts below and above the need: the reaction runs to its end where one is in clear excess. */
  test.each([1500, 2000, 2500])("where %d mol of B are fed to 2,900 mol of A", (amount) => {
    const step: Step = {
      ...acylation,
      decomposition: null,
      vessel: insulated,
      reaction: { ...acylation.reaction, b: { amount, order: 1, perA: 1 } },
    };
    const dosing = doseAt(step, rateOf(step), step.reaction.temperature);
    if (dosing === null) throw new Error("No dosing");
    const timeline = timelineOf([{ after: 0, heatTransfer: 0, feed: "stop" }]);
    const run = runFrom(vesselFor(step, timeline), timeline, dosing.rise.at);
    expect(dosing.rise.value).toBeGreaterThan(2);
    expect(run.peak.value).toBeCloseTo(step.reaction.temperature + dosing.rise.value, 3);
  });

  test("and a batch at its start", () => {
    const { step } = caseOf("batch-ring-closure");
    const alone: Step = {
      ...step,
      decomposition: null,
      vessel: { ...step.vessel, agitatorPower: 0, gain: null },
    };
    const timeline = timelineOf([{ after: 0, heatTransfer: 0 }]);
    const run = runFrom(vesselFor(alone, timeline), timeline, 0);
    // 3.4 kmol, 84 kJ/mol, 1900 kg, 2.05 kJ/(kg K).
    expect(run.peak.value).toBeCloseTo(358.15 + (3400 * 84_000) / (1900 * 2050), 3);
  });
});

describe("a decomposition alone is fastest at the time that the quadrature of TMRad gives", () => {
  const laws: readonly (readonly [string, Decomposition["law"], number, number])[] = [
    ["zero order", { autocatalytic: false, order: 0, productOrder: 1, initiation: 0 }, 110_000, 1e10],
    ["first order", { autocatalytic: false, order: 1, productOrder: 1, initiation: 0 }, 130_000, 1e13],
    ["second order", { autocatalytic: false, order: 2, productOrder: 1, initiation: 0 }, 120_000, 3e11],
    ["half order", { autocatalytic: false, order: 0.5, productOrder: 1, initiation: 0 }, 120_000, 3e11],
    ["autocatalytic", { autocatalytic: true, order: 1, productOrder: 1, initiation: 0.02 }, 120_000, 3e12],
    [
      "weakly initiated",
      { autocatalytic: true, order: 1.5, productOrder: 1.2, initiation: 1e-4 },
      110_000,
      1e12,
    ],
  ];
  test.each(laws)("%s", (_, law, activationEnergy, preExponential) => {
    const rate = fromArrhenius(Math.log(preExponential), activationEnergy);
    const step: Step = {
      ...stepWith({ temperature: 380, rate: fromArrhenius(-100, 0) }),
      mixture: { mass: 1000, density: 900, heatCapacity: 1900, thermalInertia: 1 },
      decomposition: { heat: 400_000, law, rate },
    };
    const runaway = runawayOf(step);
    if (runaway === null) throw new Error("No decomposition");
    const expected = timeToMaximumRate(runaway, 380).time;
    const timeline = timelineOf([{ after: 0, heatTransfer: 0, mixing: 0 }], { horizon: 2 * expected });
    const run = runFrom(vesselFor(step, timeline), timeline, 0);
    expect(Math.abs(run.fastest.at / expected - 1)).toBeLessThan(1e-6);
    expect(run.peak.value).toBeCloseTo(380 + runaway.rise, 2);
  });
});

describe("the start of a failure", () => {
  const { step, failures } = caseOf("semibatch-acylation");
  const timeline = failures[0];
  const vessel = vesselFor(step, timeline);

  test("carries the extent and the progress of the hold", () => {
    const { start } = runFrom(vessel, timeline, 5400);
    const dosing = doseAt(step, rateOf(step), step.reaction.temperature);
    const runaway = runawayOf(step);
    if (runaway === null) throw new Error("No decomposition");
    expect(start.state[1]).toBeCloseTo(dosing?.run?.extentAt(5400) ?? NaN, 12);
    expect(start.state[3]).toBeCloseTo(progressAfterHold(runaway, step.reaction.temperature, 5400), 14);
    expect(start.charge.fed).toBeCloseTo(210, 10);
  });

  test("has a jacket just cold enough to remove what is released", () => {
    const { start } = runFrom(vessel, timeline, 5400);
    expect(-start.state[2] * step.vessel.ua).toBeCloseTo(start.duty, 6);
    expect(start.duty).toBeLessThan(start.capacity);
  });

  test("has a jacket as cold as the open valve makes it where even that is too little", () => {
    const small: Step = { ...step, vessel: { ...step.vessel, ua: 0.2 * step.vessel.ua } };
    const { start } = runFrom(vesselFor(small, timeline), timeline, 5400);
    expect(start.duty).toBeGreaterThan(start.capacity);
    expect(-start.state[2] * small.vessel.ua).toBeCloseTo(start.capacity, 6);
  });
});
