/**
 * Defining constants of the SI and what follows from them exactly.
 *
 * @see BIPM, The International System of Units, 9th ed. (2019), exact values of kB, h and NA
 */

/** Boltzmann constant, J/K (exact, SI 2019). */
export const boltzmann = 1.380649e-23;

/** Planck constant, J s (exact, SI 2019). */
export const planck = 6.62607015e-34;

/** Avogadro constant, 1/mol (exact, SI 2019). */
export const avogadro = 6.02214076e23;

/** Molar gas constant kB NA, J/(mol K), exact to its last digit. */
export const gasConstant = 8.31446261815324;

/** 0 degC in K (exact by definition of the Celsius scale). */
export const zeroCelsius = 273.15;
