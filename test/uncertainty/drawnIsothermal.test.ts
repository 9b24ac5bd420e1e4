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

  test("a step that cannot be integrated gives nothing, not a number", () => {
    const broken = moved(dosed, Number.NaN, 1, 1, 1);
    expect(source(broken).figuresAt(308.15)).toBeNull();
    expect(source(broken).completionAt(308.15)).toBeNaN();
  });
});

/** The step with other amounts, masses, densities and another duration. */
function recipe(step: Step, [a, b, mass, density, duration]: readonly number[]): Step {
  const { mixture, reaction } = step;
  const { feed } = reaction;
  return {
    ...step,
    mixture: { ...mixture, mass: mixture.mass * mass, density: mixture.density * density },
    reaction: {
      ...reaction,
      amountA: reaction.amountA * a,
      b: reaction.b === null ? null : { ...reaction.b, amount: reaction.b.amount * b },
      feed: feed === null ? null : { ...feed, duration: feed.duration * duration },
    },
  };
}

const changes = [
  [1, 1, 1, 1, 1.13],
  [1.012, 1, 1, 1, 1],
  [1, 0.987, 1, 1, 1],
  [1, 1, 0.96, 1.03, 1],
  [1.03, 1.01, 1.02, 0.98, 0.9],
  // The excess of 5 % turns into a lack of B.
  [1.1, 1, 1, 1, 1],
] as const;

/** Against an integration: the largest rate and the rise to 1e-5, the time to the target to 1e-3. */
function expectAlike(nominal: Step, draws: readonly Step[]): void {
  const source = drawnIsothermal(nominal);
  for (const step of draws) {
    const isothermal = source(step);
    for (let temperature = 268.15; temperature <= 358; temperature += 7.1) {
      const want = directly(step, temperature);
      const got = isothermal.figuresAt(temperature);
      expect(Math.abs((got?.rise ?? 0) / want.rise.value - 1)).toBeLessThan(1e-5);
      expect(Math.abs((got?.fastest.value ?? 0) / want.fastest.value - 1)).toBeLessThan(1e-5);
      expect(Math.abs((got?.endRate ?? 0) - want.endRate)).toBeLessThan(3e-3 * want.fastest.value);
      const time = timeToConversion(want, step.limits.targetConversion);
      expect(Math.abs(isothermal.completionAt(temperature) / time - 1)).toBeLessThan(1.5e-3);
    }
  }
}

describe("a dosed draw with another recipe, read from neighbouring recipes, agrees with its integration", () => {
  test("in amounts, masses, densities and the duration of the feed, heats changed as well", () => {
    expectAlike(
      dosed,
      changes.map((change) => moved(recipe(dosed, change), 0.4, 1.05, 0.97, 1.1)),
    );
  });

  test("about equal amounts of both reactants, where the limiting one changes", () => {
    const { b, amountA } = dosed.reaction;
    if (b === null) throw new Error("The acylation has two reactants");
    const equal = { ...dosed, reaction: { ...dosed.reaction, b: { ...b, amount: amountA } } };
    expectAlike(
      equal,
      changes.map((change) => recipe(equal, change)),
    );
  });

  test("where the other reactant is fed, two of B meet one of A, and orders are broken", () => {
    const { b, feed } = dosed.reaction;
    if (b === null || feed === null) throw new Error("The acylation is dosed");
    const other: Step = {
      ...dosed,
      reaction: {
        ...dosed.reaction,
        orderA: 1.4,
        b: { amount: b.amount * 2.2, perA: 2, order: 0.8 },
        feed: { ...feed, reactant: "A" },
      },
    };
    expectAlike(
      other,
      changes.slice(0, 5).map((change) => recipe(other, change)),
    );
  });

  test("without a second reactant", () => {
    const { feed } = dosed.reaction;
    if (feed === null) throw new Error("The acylation is dosed");
    const alone: Step = {
      ...dosed,
      reaction: { ...dosed.reaction, b: null, orderA: 2, feed: { ...feed, reactant: "A" } },
    };
    expectAlike(
      alone,
      changes.slice(0, 5).map((change) => recipe(alone, change)),
    );
  });

  test("in the duty, also where the decomposition takes part in it", () => {
    const { decomposition } = dosed;
    if (decomposition === null) throw new Error("The acylation has a decomposition");
    const lnPreExponential = decomposition.rate.lnPreExponential + Math.log(1e4);
    const hot = {
      ...dosed,
      decomposition: { ...decomposition, rate: { ...decomposition.rate, lnPreExponential } },
    };
    const source = drawnIsothermal(hot);
    for (const change of changes) {
      const step = recipe(hot, change);
      const study = studyOf(step, "draws", source(step));
      for (let temperature = 303; temperature <= 340; temperature += 5.3) {
        const want = coolingDuty(step, temperature, directly(step, temperature));
        expect(Math.abs(study.dutyAt(temperature) / want - 1)).toBeLessThan(1e-4);
      }
    }
  });

  test("and one with other orders of reaction is integrated itself", () => {
    const step = { ...dosed, reaction: { ...dosed.reaction, orderA: 1.1 } };
    const got = drawnIsothermal(dosed)(step).figuresAt(308.15);
    expect((got?.rise ?? 0) / directly(step, 308.15).rise.value).toBeCloseTo(1, 5);
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
