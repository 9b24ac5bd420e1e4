import { describe, expect, test } from "vitest";
import { lnRateConstant } from "../../server/kinetics/rateConstant.js";
import { timeToConversion } from "../../server/thermal/completion.js";
import { coolingDuty } from "../../server/thermal/cooling.js";
import { type Dosing, doseAt } from "../../server/thermal/dosing.js";
import type { Step } from "../../server/thermal/step.js";
import { drawnIsothermal } from "../../server/uncertainty/drawnIsothermal.js";
import { studyOf } from "../../server/window/study.js";
import { documentOf, stepOf } from "../screening/realised.js";

const dosed = stepOf(documentOf("semibatch-acylation"));
const batch = stepOf(documentOf("batch-ring-closure"));

function directly(step: Step, temperature: number): Dosing {
  const { rate } = step.reaction;
  const dosing = rate === null ? null : doseAt(step, rate, temperature, 1e-9);
  if (dosing === null) throw new Error("It could not be integrated");
  return dosing;
}

/** The step with another rate constant, heats and heat capacities: what a draw may change of a recipe. */
function moved(step: Step, lnK: number, heat: number, charged: number, fed: number): Step {
  const { mixture, reaction } = step;
  const { rate, feed } = reaction;
  if (rate === null) throw new Error("A rate constant is known");
  return {
    ...step,
    mixture: { ...mixture, heatCapacity: mixture.heatCapacity * charged },
    reaction: {
      ...reaction,
      heat: reaction.heat * heat,
      rate: { ...rate, lnPreExponential: rate.lnPreExponential + lnK },
      feed: feed === null ? null : { ...feed, heatCapacity: feed.heatCapacity * fed },
    },
  };
}

describe("the tabulated isothermal step of a dosed case agrees with its integration to 1e-6", () => {
  const source = drawnIsothermal(dosed);
  const draws = [
    moved(dosed, 0, 1, 1, 1),
    moved(dosed, 1.37, 1.06, 0.93, 1),
    moved(dosed, -0.8, 0.9, 1.21, 0.77),
  ];

  test("in rise, largest rate, rate at the end and time to the target, at every temperature", () => {
    for (const step of draws) {
      const isothermal = source(step);
      for (let temperature = 263.15; temperature <= 370; temperature += 1.7) {
        const want = directly(step, temperature);
        const got = isothermal.figuresAt(temperature);
        expect(Math.abs((got?.rise ?? 0) / want.rise.value - 1)).toBeLessThan(1e-6);
        expect(Math.abs((got?.fastest.value ?? 0) / want.fastest.value - 1)).toBeLessThan(1.1e-6);
        expect(Math.abs((got?.endRate ?? 0) - want.endRate)).toBeLessThan(2e-6 * want.fastest.value);
        const time = timeToConversion(want, step.limits.targetConversion);
        expect(Math.abs(isothermal.completionAt(temperature) / time - 1)).toBeLessThan(1.1e-6);
      }
    }
  });

  test("in the duty also where the decomposition takes part in it", () => {
    const { decomposition } = dosed;
    if (decomposition === null) throw new Error("The acylation has a decomposition");
    // Faster by 1e4: a tenth of the largest heat at the hot end.
    const rate = {
      ...decomposition.rate,
      lnPreExponential: decomposition.rate.lnPreExponential + Math.log(1e4),
    };
    for (const draw of draws) {
      const step = { ...draw, decomposition: { ...decomposition, rate } };
      const study = studyOf(step, "draws", source(step));
      for (let temperature = 303; temperature <= 340; temperature += 3.3) {
        const want = coolingDuty(step, temperature, directly(step, temperature));
        expect(Math.abs(study.dutyAt(temperature) / want - 1)).toBeLessThan(1e-4);
      }
    }
  });

  test("where a draw changes the recipe it is integrated instead", () => {
    const { feed, amountA } = dosed.reaction;
    if (feed === null) throw new Error("The acylation is dosed");
    const others: Step[] = [
      { ...dosed, reaction: { ...dosed.reaction, amountA: amountA * 1.02 } },
      { ...dosed, reaction: { ...dosed.reaction, feed: { ...feed, duration: feed.duration * 1.1 } } },
      { ...dosed, mixture: { ...dosed.mixture, mass: dosed.mixture.mass * 0.97 } },
      { ...dosed, mixture: { ...dosed.mixture, density: dosed.mixture.density * 0.97 } },
      { ...dosed, reaction: { ...dosed.reaction, orderA: 1.1 } },
    ];
    for (const step of others) {
      const got = source(step).figuresAt(308.15);
      expect((got?.rise ?? 0) / directly(step, 308.15).rise.value).toBeCloseTo(1, 5);
    }
  });

  test("a step that cannot be integrated gives nothing, not a number", () => {
    const broken = moved(dosed, Number.NaN, 1, 1, 1);
    expect(source(broken).figuresAt(308.15)).toBeNull();
    expect(source(broken).completionAt(308.15)).toBeNaN();
  });
});

describe("the isothermal step of a batch in closed form", () => {
  test("agrees with its quadrature in rate, rise and time to the target", () => {
    const source = drawnIsothermal(batch);
    for (const step of [moved(batch, 0, 1, 1, 1), moved(batch, 2.1, 1.1, 0.9, 1)]) {
      for (const temperature of [313.15, 358.15, 401]) {
        const want = directly(step, temperature);
        const got = source(step).figuresAt(temperature);
        expect((got?.rise ?? 0) / want.rise.value).toBeCloseTo(1, 12);
        expect((got?.fastest.value ?? 0) / want.fastest.value).toBeCloseTo(1, 12);
        const time = timeToConversion(want, step.limits.targetConversion);
        expect(source(step).completionAt(temperature) / time).toBeCloseTo(1, 9);
      }
    }
  });

  test("holds for other amounts and orders as well, each looked at by itself", () => {
    const source = drawnIsothermal(batch);
    const other = { ...batch, reaction: { ...batch.reaction, orderA: 1.6, amountA: 3000 } };
    const want = timeToConversion(directly(other, 360), other.limits.targetConversion);
    expect(source(other).completionAt(360) / want).toBeCloseTo(1, 9);
    const { rate } = other.reaction;
    if (rate === null) throw new Error("A rate constant is known");
    const k = Math.exp(lnRateConstant(rate, 360));
    expect(source(other).figuresAt(360)?.fastest.value).toBeCloseTo(
      k * 3000 ** 1.6 * (other.mixture.mass / other.mixture.density) ** -0.6,
      9,
    );
  });
});
