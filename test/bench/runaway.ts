import { fromArrhenius, fromEyring } from "../../server/kinetics/rateConstant.js";
import { type Runaway, timeToMaximumRate } from "../../server/thermal/runaway.js";
import { td24 } from "../../server/thermal/td24.js";
import { integratedTimeToMaximumRate } from "../published/integratedRunaway.js";
import { type Bench, below, type Line, ms, ratio, time } from "./measure.js";

/** Two kinetics of the checks, with TMRad by 30-digit quadrature (independent implementation). */
const subjects: readonly {
  readonly name: string;
  readonly runaway: Runaway;
  readonly start: number;
  readonly exact: number;
}[] = [
  {
    name: "first order",
    runaway: {
      law: { autocatalytic: false, order: 1, productOrder: 1, initiation: 0 },
      rate: fromArrhenius(Math.log(6.3e15), 157_300),
      rise: 200,
    },
    start: 390,
    exact: 8162.374118897799,
  },
  {
    name: "autocatalytic",
    runaway: {
      law: { autocatalytic: true, order: 1, productOrder: 1, initiation: 0.02 },
      rate: fromEyring(121_000, -8, 1000, 1, 1),
      rise: 610_000 / 2050,
    },
    start: 400,
    exact: 1801.3414968793934,
  },
];

/** TMRad by quadrature against an integration in time by odex, each at the error it reaches. */
export const runawayBench: Bench = {
  title: "TMRad and T_D24",
  run() {
    return subjects.flatMap(({ name, runaway, start, exact }): Line[] => {
      const ours = time(() => timeToMaximumRate(runaway, start));
      const error = Math.abs(timeToMaximumRate(runaway, start).time / exact - 1);
      const theirs = time(() => integratedTimeToMaximumRate(runaway, start, 1e-10), 0.5);
      const theirError = Math.abs(integratedTimeToMaximumRate(runaway, start, 1e-10) / exact - 1);
      return [
        {
          what: `TMRad, ${name}: quadrature, error ${error.toExponential(0)}`,
          figure: ms(ours.median),
          bound: { text: "error below 1e-10", met: error < 1e-10 },
        },
        {
          what: `  odex integrating in time, error ${theirError.toExponential(0)}`,
          figure: `${ms(theirs.median)}, ${ratio(theirs.median, ours.median)} as long`,
          bound: { text: "at least 50 times", met: theirs.median > 50 * ours.median },
        },
        below(
          `T_D24, ${name}`,
          time(() => td24(runaway)),
          1,
        ),
      ];
    });
  },
};
