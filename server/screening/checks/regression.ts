import { fitLine } from "../../numeric/leastSquares.js";
import type { Check, CheckGroup } from "./check.js";

// Calibration of ozone monitors, lower level of difficulty, observed data.
const x = [
  0.2, 337.4, 118.2, 884.6, 10.1, 226.5, 666.3, 996.3, 448.6, 777.0, 558.2, 0.4, 0.6, 775.5, 666.9, 338.0,
  447.5, 11.6, 556.0, 228.1, 995.8, 887.6, 120.2, 0.3, 0.3, 556.8, 339.1, 887.2, 999.0, 779.0, 11.1, 118.3,
  229.2, 669.1, 448.9, 0.5,
];
const y = [
  0.1, 338.8, 118.1, 888.0, 9.2, 228.1, 668.5, 998.5, 449.1, 778.9, 559.2, 0.3, 0.1, 778.1, 668.8, 339.3,
  448.9, 10.8, 557.7, 228.3, 998.0, 888.8, 119.6, 0.3, 0.6, 557.6, 339.3, 888.0, 998.5, 778.9, 10.2, 117.6,
  228.9, 668.4, 449.2, 0.2,
];

type Fit = ReturnType<typeof fitLine>;
const explained = (line: Fit): number => line.slope ** 2 * line.spread;

const certified: readonly (readonly [string, string, (line: Fit) => number])[] = [
  ["intercept", "-0.262323073774029", (line) => line.intercept],
  ["slope", "1.00211681802045", (line) => line.slope],
  ["standard deviation of the intercept", "0.232818234301152", (line) => line.interceptError],
  ["standard deviation of the slope", "0.000429796848199937", (line) => line.slopeError],
  ["residual standard deviation", "0.884796396144373", (line) => line.residualStandardDeviation],
  ["residual sum of squares", "26.6173985294224", (line) => line.residualSumOfSquares],
  ["residual mean square", "0.782864662630069", (line) => line.unitVariance],
  ["residual degrees of freedom", "34", (line) => line.degreesOfFreedom],
  ["regression sum of squares", "4255954.13232369", explained],
  ["F statistic", "5436385.54079785", (line) => explained(line) / line.unitVariance],
  [
    "R squared",
    "0.999993745883712",
    (line) => explained(line) / (explained(line) + line.residualSumOfSquares),
  ],
];

/** The straight line through a certified set of data: what every fit of rate constants rests on. */
export const regression: CheckGroup = {
  title: "Linear regression",
  source: "NIST Statistical Reference Datasets, Norris, certified values",
  kind: "published",
  fromMemory: false,
  checks: certified.map(
    ([what, printed, of]): Check => ({
      what,
      printed,
      unit: "",
      within: { apart: 5e-13 * Math.abs(Number(printed)), because: "twelve digits" },
      compute: () => of(fitLine(x, y)),
    }),
  ),
};
