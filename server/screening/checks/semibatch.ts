import { fromArrhenius } from "../../kinetics/rateConstant.js";
import { doseAt } from "../../thermal/dosing.js";
import type { CheckGroup } from "./check.js";
import { plainStep } from "./plainStep.js";

/**
 * Accumulation at the end of an equimolar second-order step: B fed at a constant rate over two hours into 1 m^3
 * with 100 mol of A.
 *
 * @param damkohler Da = k nA duration/V0
 * @param fedVolume m^3
 * @returns part of the limiting amount
 */
function accumulationAtEnd(damkohler: number, fedVolume: number): number {
  const duration = 7200;
  const rate = fromArrhenius(Math.log(damkohler / (100 * duration)), 0);
  const step = plainStep({
    amountA: 100,
    b: { amount: 100, order: 1, perA: 1 },
    feed: { reactant: "B", mass: 1, density: 1 / fedVolume, heatCapacity: 1, temperature: 300, duration },
    rate,
  });
  const dosing = doseAt(step, rate, 300);
  return dosing === null ? Number.NaN : 1 - dosing.endExtent;
}

const figures = [
  {
    volume: "doubling",
    fed: 1,
    rows: [
      [1, "0.7759689"],
      [5, "0.4578527"],
      [10, "0.3352146"],
      [50, "0.1553130"],
      [100, "0.1107088"],
    ],
  },
  {
    volume: "constant",
    fed: 1e-12,
    rows: [
      [1, "0.6839221"],
      [5, "0.3554235"],
      [10, "0.2522793"],
      [50, "0.1128379"],
      [100, "0.0797885"],
    ],
  },
] as const;

/** Accumulation at the stoichiometric point, which no publication gives to so many digits. */
export const semibatch: CheckGroup = {
  kind: "independent",
  fromMemory: false,
  title: "Accumulation of an equimolar second-order semibatch at its stoichiometric point",
  source: "Independent implementation: an implicit Runge-Kutta integration",
  checks: figures.flatMap(({ volume, fed, rows }) =>
    rows.map(([damkohler, printed]) => ({
      what: `Da = ${damkohler}, volume ${volume}`,
      printed,
      unit: "",
      within: { apart: 5e-7, because: "six decimals" },
      compute: () => accumulationAtEnd(damkohler, fed),
    })),
  ),
};
