import { describe, expect, test } from "vitest";
import { fromArrhenius } from "../../server/kinetics/rateConstant.js";
import type { RateLaw } from "../../server/kinetics/rateLaw.js";
import { gasConstant } from "../../server/numeric/constants.js";
import { tmradTable } from "../../server/screening/checks/tmradTable.js";
import { type Runaway, timeToMaximumRate, zeroOrderTime } from "../../server/thermal/runaway.js";
import { td24 } from "../../server/thermal/td24.js";
import { integratedTimeToMaximumRate } from "./integratedRunaway.js";

function orderLaw(order: number): RateLaw {
  return { autocatalytic: false, order, productOrder: 1, initiation: 0 };
}

const difference = (ours: number, theirs: number) => Math.abs(ours / theirs - 1);

describe.each(tmradTable)("$name from $start_K K", (row) => {
  const { runaway } = row;

  test("has the TMRad of an independent quadrature to 1e-8", () => {
    const { time } = timeToMaximumRate(runaway, row.start_K);
    expect(difference(time, row.tmrad_s)).toBeLessThan(1e-8);
  });

  test("is fastest at the progress found independently", () => {
    const { alphaAtMaximum } = timeToMaximumRate(runaway, row.start_K);
    expect(difference(alphaAtMaximum, row.alphaAtMaximum)).toBeLessThan(1e-8);
  });

  test("has the closed form and the T_D24 found independently", () => {
    expect(difference(zeroOrderTime(runaway, row.start_K), row.zeroOrder_s)).toBeLessThan(1e-10);
    expect(difference(td24(runaway) ?? NaN, row.td24_K)).toBeLessThan(1e-10);
  });

  test("keeps TMRad to 1e-5 at the accuracy of the draws", () => {
    const { time } = timeToMaximumRate(runaway, row.start_K, 0, "draws");
    expect(difference(time, row.tmrad_s)).toBeLessThan(1e-5);
  });
});

// No publication gives these to so many digits: high-precision values of an independent implementation.
describe.each([
  { start: 373.15, heatRate: 10, energy: 100_000, capacity: 2000, to300: 0.6873466, td24C: 60.2322 },
  { start: 423.15, heatRate: 1, energy: 150_000, capacity: 1800, to300: 5.21343279, td24C: 134.2138 },
])("a zero-order decomposition of $heatRate W/kg at $start K", (given) => {
  const runaway = (rise: number): Runaway => {
    const lnK = Math.log(given.heatRate / (rise * given.capacity));
    const rate = fromArrhenius(lnK + given.energy / (gasConstant * given.start), given.energy);
    return { law: orderLaw(0), rate, rise };
  };

  test("has the closed form c R T0^2/(q' Ea)", () => {
    const byHand = (given.capacity * gasConstant * given.start ** 2) / (given.heatRate * given.energy);
    expect(difference(zeroOrderTime(runaway(100), given.start), byHand)).toBeLessThan(1e-12);
  });

  test("has the exact time where it ends 300 K higher", () => {
    const hours = timeToMaximumRate(runaway(300), given.start).time / 3600;
    expect(difference(hours, given.to300)).toBeLessThan(2e-8);
  });

  test("has its closed form at 24 h at the temperature computed independently", () => {
    const hours = zeroOrderTime(runaway(100), given.td24C + 273.15) / 3600;
    // The temperature is given to 1e-4 K.
    expect(difference(hours, 24)).toBeLessThan(1.5e-5);
  });
});

test("a first-order decomposition has the TMRad of an independent quadrature", () => {
  // A = 5e14 1/s, Ea = 36 kcal/mol, rise 200 K from 120 degC.
  const runaway: Runaway = { law: orderLaw(1), rate: fromArrhenius(Math.log(5e14), 150_624), rise: 200 };
  const { time, alphaAtMaximum } = timeToMaximumRate(runaway, 393.15);
  expect(difference(time, 9656.31499)).toBeLessThan(1e-8);
  expect(alphaAtMaximum).toBeCloseTo(0.90877731, 8);
  expect(393.15 + 200 * alphaAtMaximum).toBeCloseTo(574.90546, 5);
  expect(difference(zeroOrderTime(runaway, 393.15), 8766.99044)).toBeLessThan(2e-8);
});

describe("integrating the balances in time with odex (Hairer's extrapolation method)", () => {
  test.each(tmradTable.filter((row) => [390, 361.31].includes(row.start_K)))(
    "gives $name from $start_K K the same TMRad to 1e-6",
    (row) => {
      const { runaway } = row;
      const integrated = integratedTimeToMaximumRate(runaway, row.start_K, 1e-11);
      expect(difference(timeToMaximumRate(runaway, row.start_K).time, integrated)).toBeLessThan(1e-6);
    },
  );
});
