import type { TableParameters } from "../../kinetics/parameters.js";
import { zeroCelsius } from "../../numeric/constants.js";

/** Rate constants at Celsius temperatures as printed, k in (L/mol)^(n-1)/s. */
function table(order: number, fitAs: "eyring" | "arrhenius", pairs: readonly (readonly [number, number])[]) {
  return {
    form: "table",
    order,
    fitAs,
    viscosity: null,
    rows: pairs.map(([celsius, k]) => ({
      temperature: celsius + zeroCelsius,
      lnRateConstant: Math.log(k) + (1 - order) * Math.log(1000),
      relativeError: null,
      leftOut: null,
    })),
  } as const satisfies TableParameters;
}

/**
 * H+ + dithionate, second order, k in L/(mol s).
 * Lente, Fabian & Poe 2005, New J. Chem., supplement of "A common misconcept about the Eyring equation".
 * The printed kelvin column is rounded to 0.1 K; the published fits are matched with t + 273.15.
 */
export const dithionate = table(2, "eyring", [
  [50, 9.54e-7],
  [55, 1.91e-6],
  [60, 3.76e-6],
  [65, 7.33e-6],
  [70, 1.38e-5],
  [75, 2.56e-5],
  [80, 4.71e-5],
  [85, 8.43e-5],
  [90, 1.47e-4],
]);

/**
 * Unimolecular solvolysis, first order, k in 1/s.
 * Shillady, Essentials of Physical Chemistry, ch. 8, pp. 161-163. The value at 35 degC is from memory; with it the
 * fit returns the printed slope and intercept.
 */
export const solvolysis = table(1, "eyring", [
  [0, 1.06e-5],
  [25, 3.19e-4],
  [35, 9.86e-4],
  [45, 2.92e-3],
]);

/**
 * Thermal cracking of ethane, first order, k in 1/s.
 * Solutions to Froment, Bischoff & De Wilde, Chemical Reactor Analysis and Design, problem 1.1.
 * (2718e-3 is a measured 2.718, not the base of the logarithm.)
 */
export const ethaneCracking = table(1, "arrhenius", [
  [702, 0.15],
  [725, 0.273],
  [734, 0.333],
  [754, 0.595],
  [773, 0.923],
  [789, 1.492],
  [803, 2.138],
  [810, 2718e-3],
  [827, 4.137],
  [837, 4.665],
]);
