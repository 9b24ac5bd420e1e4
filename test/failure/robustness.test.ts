import fc from "fast-check";
import { expect, test } from "vitest";
import { assess } from "../../server/failure/assessment.js";
import type { Change } from "../../server/failure/timeline.js";
import { traceOf } from "../../server/failure/trace.js";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import { gasConstant } from "../../server/numeric/constants.js";
import type { Step } from "../../server/thermal/step.js";
import { stepWith } from "../published/steps.js";
import { runFrom, temperatureAt, timelineOf, vesselFor } from "./running.js";

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** Steps far beyond what is sensible: broken orders, violent decompositions, cooling that cannot hold. */
const steps = fc
  .record({
    temperature: between(270, 400),
    activationEnergy: between(30e3, 150e3),
    lnRate: between(-14, -4.6),
    mass: between(100, 10_000),
    perMass: between(0.2, 3),
    orderA: fc.constantFrom(0.3, 0.5, 1, 1.5, 2, 3),
    orderB: fc.constantFrom(0.5, 1, 2),
    excess: fc.constantFrom(0.5, 1, 1.05, 2),
    withB: fc.boolean(),
    fed: fc.constantFrom("A", "B", null),
    duration: between(1000, 60_000),
    heat: between(-300e3, -20e3),
    decomposition: fc.record({
      heat: between(3e4, 2e6),
      order: fc.constantFrom(0, 0.3, 0.5, 1, 2),
      productOrder: fc.constantFrom(0.5, 1, 1.5, 2),
      lnInitiation: between(-14, -2),
      autocatalytic: fc.boolean(),
      lnRate: between(-20, -11),
      activationEnergy: between(80e3, 220e3),
    }),
    decomposes: fc.boolean(),
    ua: between(100, 5000),
    colder: between(5, 80),
    flowing: fc.boolean(),
    mtt: between(5, 150),
  })
  .map((drawn): Step => {
    const { temperature, mass } = drawn;
    const amountA = mass * drawn.perMass;
    const b = drawn.withB ? { amount: amountA * drawn.excess, order: drawn.orderB, perA: 1 } : null;
    const order = drawn.orderA + (b?.order ?? 0);
    const lnAt = (lnRate: number, energy: number): number => lnRate + energy / (gasConstant * temperature);
    const reactant = drawn.fed === "B" && b === null ? "A" : drawn.fed;
    return {
      mixture: { mass, density: 900, heatCapacity: 2000, thermalInertia: 1.05 },
      reaction: {
        temperature,
        amountA,
        orderA: drawn.orderA,
        b,
        feed:
          reactant === null
            ? null
            : {
                reactant,
                mass: 0.3 * mass,
                density: 1000,
                heatCapacity: 1800,
                temperature: temperature - 15,
                duration: drawn.duration,
              },
        heat: drawn.heat,
        measuredExcess: 1,
        rate: {
          lnPreExponential:
            lnAt(drawn.lnRate, drawn.activationEnergy) + (1 - order) * Math.log(900 * drawn.perMass),
          temperaturePower: 0,
          activationEnergy: drawn.activationEnergy,
        },
      },
      decomposition: drawn.decomposes
        ? {
            heat: drawn.decomposition.heat,
            law: {
              autocatalytic: drawn.decomposition.autocatalytic,
              order: drawn.decomposition.order,
              productOrder: drawn.decomposition.productOrder,
              initiation: drawn.decomposition.autocatalytic ? Math.exp(drawn.decomposition.lnInitiation) : 0,
            },
            rate: {
              lnPreExponential: lnAt(drawn.decomposition.lnRate, drawn.decomposition.activationEnergy),
              temperaturePower: 0,
              activationEnergy: drawn.decomposition.activationEnergy,
            },
          }
        : null,
      vessel: {
        ua: drawn.ua,
        agitatorPower: 1500,
        gain: { coefficient: 20, ambient: 293 },
        coolantTemperature: temperature - drawn.colder,
        flowing: drawn.flowing ? { flow: 3, heatCapacity: 4180, holdup: 150 } : null,
      },
      limits: {
        maximumTechnicalTemperature: temperature + drawn.mtt,
        lowestTemperature: 250,
        highestTemperature: 420,
        availableTime: 30_000,
        targetConversion: 0.98,
        coolingUse: 0.8,
        minimumTimeToMaximumRate: 86_400,
        decompositionAllowed: 0.05,
        controlBand: 0,
      },
    };
  });

const timelines = fc
  .record({
    flow: fc.constantFrom(0, 0.2),
    feed: fc.constantFrom("stop", "continue"),
    agitator: fc.boolean(),
    backAt: between(60, 7000),
    quench: fc.boolean(),
    startedAt: between(0, 20_000),
  })
  .map((drawn) => {
    const first: Change = {
      after: 0,
      coolantFlow: drawn.flow,
      feed: drawn.feed as "stop" | "continue",
      ...(drawn.agitator ? { agitator: "off", heatTransfer: 0.2 } : {}),
    };
    const back: Change = {
      after: drawn.backAt,
      agitator: "on",
      heatTransfer: 1,
      ...(drawn.quench ? { quench: { mass: 500, heatCapacity: 4180, density: 1000, temperature: 290 } } : {}),
    };
    return timelineOf([first, back], {
      at: drawn.startedAt,
      response: { detection: 60, decision: 60, action: 60 },
    });
  });

test("whatever the kinetics, a failure is followed to its end, and every figure is finite", () => {
  fc.assert(
    fc.property(steps, timelines, (step, timeline) => {
      const vessel = vesselFor(step, timeline);
      const found = assess(vessel, timeline);
      if (found === null) throw new Error("The hold could not be followed");
      for (const run of found.runs) {
        expect(run.loss?.by).not.toBe("failed");
        expect(run.end.time).toBe(timeline.changes[1].after + 86_400);
        expect(run.end.state.every(Number.isFinite)).toBe(true);
        expect(run.end.state[1]).toBeGreaterThan(-1e-6);
        expect(run.end.state[1]).toBeLessThan(1 + 1e-5);
        expect(Number.isFinite(run.peak.value) && Number.isFinite(run.fastest.value)).toBe(true);
        expect(run.peak.value).toBeGreaterThanOrEqual(vessel.contents.reference);
      }
      const losses = found.runs.map((run) => run.loss?.at ?? Number.POSITIVE_INFINITY);
      if (found.timeToAct !== null) expect(found.timeToAct).toBeLessThanOrEqual(Math.min(...losses));
      expect(found.verdict === "holds").toBe(losses.every((loss) => loss === Number.POSITIVE_INFINITY));
      const trace = traceOf(vessel, found.run);
      expect(trace.length).toBeLessThanOrEqual(200);
      expect(trace.every((point) => Number.isFinite(point.temperature + point.jacket))).toBe(true);
    }),
    { numRuns: 150, seed: 20_260 },
  );
});

test("a runaway that is over before the clock can tell goes through to its end", () => {
  const step: Step = {
    ...stepWith({ temperature: 270, rate: fromArrhenius(-100, 0) }, { agitatorPower: 1500 }),
    mixture: { mass: 100, density: 900, heatCapacity: 2000, thermalInertia: 1 },
    decomposition: {
      heat: 760_000,
      law: { autocatalytic: false, order: 0, productOrder: 1, initiation: 0 },
      rate: fromArrhenius(86.6, 219_000),
    },
  };
  const timeline = timelineOf([{ after: 0, heatTransfer: 0, mixing: 0 }]);
  const vessel = vesselFor(step, timeline);
  const statuses: string[] = [];
  const { integrator } = vessel;
  const watched = {
    ...vessel,
    integrator: {
      ...integrator,
      run: (...given: Parameters<typeof integrator.run>) => {
        const result = integrator.run(...given);
        statuses.push(result.status);
        return result;
      },
    },
  };
  const run = runFrom(watched, timeline, 0);
  expect(statuses).toContain("stepTooSmall");
  expect(run.end.time).toBe(86_400);
  // 1.5 kW and 380 K of the decomposition, all of which is released.
  expect(run.end.state[2]).toBeCloseTo(1, 9);
  const expected = 270 + (1500 * 86_400) / (100 * 2000) + 380;
  expect(Math.abs(temperatureAt(vessel, run, 86_400) - expected)).toBeLessThan(0.01);
  expect(Number.isFinite(run.fastest.value)).toBe(true);
  expect(run.fastest.value).toBeGreaterThan(1e9);
});
