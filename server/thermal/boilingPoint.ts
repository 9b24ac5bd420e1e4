import { gasConstant } from "../numeric/constants.js";

/** The pressure of a normal boiling point: 1 atm in Pa, exact by definition. */
export const standardAtmosphere = 101_325;

/** Units in which sets of Antoine constants give the pressure, in Pa; mmHg is the conventional one. */
export const pressureUnits = {
  bar: 1e5,
  kPa: 1e3,
  Pa: 1,
  mmHg: 133.322387415,
  atm: standardAtmosphere,
} as const;

/**
 * Boiling point at another pressure, 1/T = 1/Tb - R ln(p/1 atm)/dHv (Clausius-Clapeyron, the vapour ideal, the
 * heat of vaporisation constant). Good near the normal boiling point: for water within 0.5 K from 0.5 to 5 bar,
 * and above the measured curve by no more than 0.2 K; further away it stays below it (2 K at 0.1 bar, 1 K at
 * 10 bar), the careful side for a limit.
 *
 * @param normalBoilingPoint Tb, K
 * @param heatOfVaporisation dHv at Tb, J/mol; > 0
 * @param pressure absolute, Pa; > 0
 * @returns K; infinite where the equation has no boiling point at so high a pressure
 * @see Atkins & de Paula, Physical Chemistry, "The Clausius-Clapeyron equation"
 */
export function clausiusClapeyron(
  normalBoilingPoint: number,
  heatOfVaporisation: number,
  pressure: number,
): number {
  const inverse =
    1 / normalBoilingPoint - (gasConstant * Math.log(pressure / standardAtmosphere)) / heatOfVaporisation;
  return inverse > 0 ? 1 / inverse : Number.POSITIVE_INFINITY;
}

/** Constants of log10 p = a - b/(T + c), as a table gives them. */
export interface Antoine {
  readonly a: number;
  /** in kelvin or degrees Celsius, which are the same here; > 0 */
  readonly b: number;
  readonly c: number;
  /** unit of p in Pa */
  readonly pressureUnit: number;
  /** zero of the scale of T in K: 273.15 for degrees Celsius */
  readonly temperatureZero: number;
}

/**
 * Boiling point by Antoine's equation, T = b/(a - log10 p) - c.
 *
 * @param constants as tabulated, with their units
 * @param pressure absolute, Pa; > 0
 * @returns K; infinite where the equation has no boiling point at so high a pressure
 * @see Antoine 1888, C. R. Acad. Sci. 107:681
 */
export function antoineBoilingPoint(constants: Antoine, pressure: number): number {
  const { a, b, c, pressureUnit, temperatureZero } = constants;
  const difference = a - Math.log10(pressure / pressureUnit);
  return difference > 0 ? b / difference - c + temperatureZero : Number.POSITIVE_INFINITY;
}
