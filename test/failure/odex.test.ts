import { describe, expect, test } from "vitest";
import { lnRateConstant } from "../../server/kinetics/rateConstant.js";
import type { Step } from "../../server/thermal/step.js";
import { integrateWithOdex } from "../published/odex.js";
import { caseOf, rateOf, runFrom, temperatureAt, vesselFor } from "./running.js";

/** What acts while odex integrates: the flow of the coolant and the kilograms fed by then. */
interface Acting {
  readonly flow: number;
  readonly fed: (time: number) => number;
  readonly feedRate: number;
}

/** The balances written out once more, independently: T, extent, alpha, Tj; first order in each reactant. */
function slopes(step: Step, { flow, fed, feedRate }: Acting) {
  const { reaction, mixture, vessel, decomposition } = step;
  const { feed, b } = reaction;
  return (time: number, [temperature, extent, alpha, jacket]: number[]): number[] => {
    const inside = fed(time);
    const volume = mixture.mass / mixture.density + (feed === null ? 0 : inside / feed.density);
    const amountA = reaction.amountA * (1 - extent);
    const amountB =
      b === null || feed === null ? 1 : (b.amount * inside) / feed.mass - reaction.amountA * extent;
    const k = Math.exp(lnRateConstant(rateOf(step), temperature));
    const rate = b === null ? k * amountA : (k * amountA * amountB) / volume;
    const decay =
      decomposition === null
        ? 0
        : Math.exp(lnRateConstant(decomposition.rate, temperature)) *
          (1 - alpha) *
          (decomposition.law.autocatalytic ? decomposition.law.initiation + alpha : 1);
    const mass = mixture.mass + inside;
    const capacity = mixture.mass * mixture.heatCapacity + (feed === null ? 0 : inside * feed.heatCapacity);
    const jacketTemperature = vessel.flowing === null ? vessel.coolantTemperature : jacket;
    const exchange = (vessel.flowing === null ? flow : 1) * vessel.ua * (temperature - jacketTemperature);
    const heat =
      rate * -reaction.heat +
      mass * (decomposition?.heat ?? 0) * decay +
      (feed === null ? 0 : feedRate * feed.heatCapacity * (feed.temperature - temperature)) +
      vessel.agitatorPower +
      (vessel.gain === null ? 0 : vessel.gain.coefficient * Math.max(0, vessel.gain.ambient - temperature)) -
      exchange;
    const jacketSlope =
      vessel.flowing === null
        ? 0
        : (exchange -
            flow * vessel.flowing.flow * vessel.flowing.heatCapacity * (jacket - vessel.coolantTemperature)) /
          (vessel.flowing.holdup * vessel.flowing.heatCapacity);
    return [heat / capacity, rate / reaction.amountA, decay, jacketSlope];
  };
}

describe("odex, an explicit extrapolation method, gives the same temperatures within 0.02 K", () => {
  test("for the hydrolysis without cooling", () => {
    const { step, failures } = caseOf("batch-hydrolysis");
    const vessel = vesselFor(step, failures[0]);
    const run = runFrom(vessel, failures[0], 0);
    const derivative = slopes(step, { flow: 0, fed: () => 0, feedRate: 0 });
    let state: readonly number[] = [step.reaction.temperature, 0, 0, 0];
    let time = 0;
    for (const to of [600, 3600, 14_400, 86_400]) {
      state = integrateWithOdex(derivative, time, state, to, 1e-9).y;
      time = to;
      expect(Math.abs(state[0] - temperatureAt(vessel, run, to))).toBeLessThan(0.02);
    }
  });

  test("for the ring closure that loses its coolant for half an hour", () => {
    const { step, failures } = caseOf("batch-ring-closure");
    const vessel = vesselFor(step, failures[1]);
    const run = runFrom(vessel, failures[1], 0);
    const jacket = vessel.contents.reference + run.start.state[2];
    let state: readonly number[] = [step.reaction.temperature, 0, 0, jacket];
    let time = 0;
    for (const [flow, to] of [
      [0, 900],
      [0, 1800],
      [1, 1890],
      [1, 3600],
      [1, 20_000],
    ]) {
      const derivative = slopes(step, { flow, fed: () => 0, feedRate: 0 });
      state = integrateWithOdex(derivative, time, state, to, 1e-9).y;
      time = to;
      expect(Math.abs(state[0] - temperatureAt(vessel, run, to))).toBeLessThan(0.02);
    }
  });

  test("for the acylation whose coolant stops while the feed runs on to its end", () => {
    const { step, failures } = caseOf("semibatch-acylation");
    const { feed } = step.reaction;
    if (feed === null) throw new Error("No feed");
    const vessel = vesselFor(step, failures[1]);
    const startedAt = 7200;
    const run = runFrom(vessel, failures[1], startedAt);
    const jacket = vessel.contents.reference + run.start.state[2];
    const feedRate = feed.mass / feed.duration;
    let state: readonly number[] = [
      step.reaction.temperature,
      run.start.state[1],
      run.start.state[3],
      jacket,
    ];
    let time = 0;
    const feedLeft = feed.duration - startedAt;
    for (const to of [1200, feedLeft, 20_000, 86_400]) {
      const feeding = to <= feedLeft;
      const fed = (at: number): number => (feeding ? feedRate * (startedAt + at) : feed.mass);
      const derivative = slopes(step, { flow: 0, fed, feedRate: feeding ? feedRate : 0 });
      state = integrateWithOdex(derivative, time, state, to, 1e-9).y;
      time = to;
      expect(Math.abs(state[0] - temperatureAt(vessel, run, to))).toBeLessThan(0.02);
    }
    expect(state[0]).toBeGreaterThan(330);
  });
});
