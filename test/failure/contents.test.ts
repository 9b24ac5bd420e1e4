import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { normalConditions } from "../../server/failure/conditions.js";
import { createContents } from "../../server/failure/contents.js";
import { continuedLaw, continuedLawSlope } from "../../server/failure/progressRate.js";
import { lawValue } from "../../server/kinetics/rateLaw.js";
import type { Step } from "../../server/thermal/step.js";
import { caseOf, rateOf } from "./running.js";

const { step: acylation } = caseOf("semibatch-acylation");
const { step: ring } = caseOf("batch-ring-closure");
const withB: Step = {
  ...ring,
  reaction: { ...ring.reaction, orderA: 0.7, b: { amount: 5000, order: 1.5, perA: 1.3 } },
  vessel: { ...ring.vessel, flowing: null },
};

describe.each([
  ["a fed case with a flowing coolant", acylation],
  ["a batch with an autocatalytic decomposition", ring],
  ["a batch with broken orders and a constant jacket", withB],
])("the derivatives of the balances of %s", (_, step) => {
  const contents = createContents(step, rateOf(step), step.reaction.temperature);
  const { system } = contents;
  const { size } = system;
  const conditions = { ...normalConditions(step), coolantFlow: 0.6, heatTransfer: 0.4 };
  contents.enter(
    100,
    { fed: step.reaction.feed === null ? 0 : 150, quenchCapacity: 2e5, quenchVolume: 0.1 },
    conditions,
    0.8,
  );
  const slopeAt = (time: number, y: Float64Array): Float64Array => {
    const out = new Float64Array(size);
    system.derivative(time, y, out);
    return out;
  };
  const states = fc.tuple(
    fc.double({ min: -40, max: 60, noNaN: true }),
    fc.double({ min: 0.01, max: 0.3, noNaN: true }),
    fc.double({ min: -40, max: 60, noNaN: true }),
    fc.double({ min: 0.01, max: 0.9, noNaN: true }),
  );
  const stateOf = ([above, extent, jacket, progress]: readonly number[]): Float64Array => {
    const y = new Float64Array(size);
    y[0] = above;
    y[1] = extent;
    if (contents.places.jacket !== null) y[contents.places.jacket] = jacket;
    if (contents.places.progress !== null) y[contents.places.progress] = progress;
    return y;
  };
  /** Central differences; exact to the square of the step, so compared beside the size of the entry. */
  const difference = (at: (shift: number) => Float64Array, width: number): number[] => {
    const [high, low] = [at(width), at(-width)];
    return Array.from(high, (value, i) => (value - low[i]) / (2 * width));
  };

  test("agree with differences: the Jacobian", () => {
    fc.assert(
      fc.property(states, (values) => {
        const y = stateOf(values);
        const jacobian = new Float64Array(size * size);
        system.jacobian(130, y, jacobian);
        for (let j = 0; j < size; j += 1) {
          const width = j === 0 || j === contents.places.jacket ? 1e-3 : 1e-6;
          const column = difference((shift) => {
            const moved = Float64Array.from(y);
            moved[j] += shift;
            return slopeAt(130, moved);
          }, width);
          for (let i = 0; i < size; i += 1) {
            const scale = Math.abs(column[i]) + 1e-6 * Math.abs(slopeAt(130, y)[i] / width) + 1e-13;
            expect(Math.abs(jacobian[i * size + j] - column[i]) / scale).toBeLessThan(2e-5);
          }
        }
      }),
    );
  });

  test("agree with differences: the derivative in time", () => {
    fc.assert(
      fc.property(states, (values) => {
        const y = stateOf(values);
        const inTime = new Float64Array(size);
        system.timeDerivative?.(130, y, inTime);
        const expected = difference((shift) => slopeAt(130 + shift, y), 1);
        for (let i = 0; i < size; i += 1) {
          const scale = Math.abs(expected[i]) + 1e-9 * Math.abs(slopeAt(130, y)[i]) + 1e-16;
          expect(Math.abs(inTime[i] - expected[i]) / scale).toBeLessThan(1e-5);
        }
      }),
    );
  });
});

describe("a decomposition's law continued beyond its end", () => {
  const laws = [0, 0.5, 1, 1.4, 2].flatMap((order) => [
    { autocatalytic: false, order, productOrder: 1, initiation: 0 },
    { autocatalytic: true, order, productOrder: 0.6, initiation: 1e-3 },
    { autocatalytic: true, order, productOrder: 1.5, initiation: 0.1 },
  ]);

  test("is the law itself between a millionth and the last millionth", () => {
    for (const law of laws) {
      for (const alpha of [1e-5, 0.01, 0.3, 0.9, 0.9999]) {
        expect(continuedLaw(law, alpha)).toBeCloseTo(lawValue(law, alpha), 12);
      }
    }
  });

  test("pulls back from beyond 1 and vanishes there", () => {
    for (const law of laws) {
      expect(continuedLaw(law, 1)).toBe(0);
      expect(continuedLaw(law, 1 + 1e-5)).toBeLessThan(0);
    }
  });

  test("has the slope of its differences", () => {
    for (const law of laws) {
      for (const alpha of [1e-4, 0.2, 0.7, 0.999, 1.001]) {
        const width = 1e-7;
        const expected = (continuedLaw(law, alpha + width) - continuedLaw(law, alpha - width)) / (2 * width);
        expect(Math.abs(continuedLawSlope(law, alpha) - expected)).toBeLessThan(
          1e-6 * Math.abs(expected) + 1e-7,
        );
      }
    }
  });
});
