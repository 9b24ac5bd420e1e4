import { createRequire } from "node:module";
import { lnRateConstant } from "../../server/kinetics/rateConstant.js";
import { lawLogSlope, lawValue } from "../../server/kinetics/rateLaw.js";
import { gasConstant } from "../../server/numeric/constants.js";
import { findRoot } from "../../server/numeric/roots.js";
import type { Runaway } from "../../server/thermal/runaway.js";

interface Solver {
  absoluteTolerance: number;
  relativeTolerance: number;
  denseOutput: boolean;
  initialStepSize: number;
  maxSteps: number;
  solve(
    derivative: (t: number, y: number[]) => number[],
    from: number,
    y: number[],
    to: number,
    output: (
      step: number,
      from: number,
      to: number,
      y: number[],
      dense: (component: number, t: number) => number,
    ) => boolean,
  ): unknown;
}

// The package ships its TypeScript source, which our stricter compiler would check: loaded as what it runs as.
const require = createRequire(import.meta.url);
const odex: { readonly Solver: new (dimension: number) => Solver } = require("odex");

/**
 * Time to the maximum rate by integrating the mass and heat balances in time with odex (Hairer's
 * extrapolation method) until the rate of heating passes its maximum, located on the dense output.
 * For laws with a single maximum of the rate.
 *
 * @returns s
 */
export function integratedTimeToMaximumRate(runaway: Runaway, start: number, tolerance: number): number {
  const { law, rate, rise } = runaway;
  // In units of the initial doubling time, so that one absolute tolerance fits all cases.
  const unit = Math.exp(-lnRateConstant(rate, start));
  const acceleration = (alpha: number, temperature: number) =>
    rise * (rate.activationEnergy / (gasConstant * temperature ** 2) + rate.temperaturePower / temperature) +
    lawLogSlope(law, alpha);
  const solver = new odex.Solver(2);
  solver.absoluteTolerance = tolerance * 1e-3;
  solver.relativeTolerance = tolerance;
  solver.denseOutput = true;
  solver.initialStepSize = 1e-6;
  solver.maxSteps = 1_000_000;
  let time: number | null = null;
  solver.solve(
    (_, [alpha, temperature]) => {
      const speed = unit * Math.exp(lnRateConstant(rate, temperature)) * lawValue(law, alpha);
      return [speed, rise * speed];
    },
    0,
    [0, start],
    1e6,
    (_, from, to, [alpha, temperature], dense) => {
      if (acceleration(Math.min(alpha, 1 - 1e-12), temperature) > 0) return true;
      time = findRoot((t) => acceleration(Math.min(dense(0, t), 1 - 1e-12), dense(1, t)), from, to);
      return false;
    },
  );
  if (time === null) throw new Error("The rate has no maximum within the time integrated");
  return time * unit;
}
