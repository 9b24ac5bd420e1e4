import { boltzmann, gasConstant, planck } from "../numeric/constants.js";

/**
 * A rate constant in the form that every typed form reduces to,
 * ln k = ln A + b ln T - E/(R T) (modified Arrhenius; b = 1 for Eyring's equation, else 0).
 * k in (m^3/mol)^(n-1)/s, T in K, E in J/mol. Kept in logarithms so that no A overflows.
 */
export interface ModifiedArrhenius {
  readonly lnPreExponential: number;
  readonly temperaturePower: number;
  readonly activationEnergy: number;
}

/**
 * ln of the rate constant, ln k = ln A + b ln T - E/(R T).
 *
 * @param rate parameters in SI
 * @param temperature K, > 0
 * @returns ln of k in (m^3/mol)^(n-1)/s
 * @see IUPAC Gold Book, "modified Arrhenius equation"
 */
export function lnRateConstant(rate: ModifiedArrhenius, temperature: number): number {
  const power = rate.temperaturePower === 0 ? 0 : rate.temperaturePower * Math.log(temperature);
  return rate.lnPreExponential + power - rate.activationEnergy / (gasConstant * temperature);
}

/**
 * Apparent activation energy, Ea = R T^2 d ln k/dT = E + b R T.
 *
 * @param rate parameters in SI
 * @param temperature K
 * @returns J/mol
 * @see IUPAC Gold Book, "activation energy"
 */
export function apparentActivationEnergy(rate: ModifiedArrhenius, temperature: number): number {
  return rate.activationEnergy + rate.temperaturePower * gasConstant * temperature;
}

/**
 * Eyring's equation, k = kappa (kB T/h) c0^(1-n) exp(dS/R) exp(-dH/(R T)).
 *
 * @param activationEnthalpy dH, J/mol
 * @param activationEntropy dS, J/(mol K), for the standard concentration
 * @param standardConcentration c0, mol/m^3
 * @param transmissionCoefficient kappa, dimensionless
 * @param order overall order n
 * @returns the same k in logarithms
 * @see Eyring 1935, J. Chem. Phys. 3:107; Laidler & King 1983, J. Phys. Chem. 87:2657
 * A dS quoted for 1 mol/L and read for 1 mol/m^3 is wrong by R ln 1000 = 57.4 J/(mol K) at n = 2.
 */
export function fromEyring(
  activationEnthalpy: number,
  activationEntropy: number,
  standardConcentration: number,
  transmissionCoefficient: number,
  order: number,
): ModifiedArrhenius {
  return {
    lnPreExponential:
      Math.log((transmissionCoefficient * boltzmann) / planck) +
      (1 - order) * Math.log(standardConcentration) +
      activationEntropy / gasConstant,
    temperaturePower: 1,
    activationEnergy: activationEnthalpy,
  };
}

/**
 * Arrhenius' equation, k = A exp(-Ea/(R T)).
 *
 * @param lnPreExponential ln of A in (m^3/mol)^(n-1)/s
 * @param activationEnergy J/mol
 * @returns the same k in logarithms
 * @see Arrhenius 1889, Z. Phys. Chem. 4:226; IUPAC Gold Book, "Arrhenius equation"
 */
export function fromArrhenius(lnPreExponential: number, activationEnergy: number): ModifiedArrhenius {
  return { lnPreExponential, temperaturePower: 0, activationEnergy };
}

/**
 * Arrhenius' equation re-centred, k = kref exp(-Ea/R (1/T - 1/Tref)).
 *
 * @param lnReference ln of kref in (m^3/mol)^(n-1)/s
 * @param at Tref, K
 * @param activationEnergy J/mol
 * @returns the same k in logarithms
 * @see Arrhenius 1889, Z. Phys. Chem. 4:226
 */
export function fromReference(lnReference: number, at: number, activationEnergy: number): ModifiedArrhenius {
  return fromArrhenius(lnReference + activationEnergy / (gasConstant * at), activationEnergy);
}

/**
 * The Arrhenius pair with the same k and the same slope at one temperature:
 * Ea = E + b R T, ln A = ln A' + b (1 + ln T); for Eyring's equation Ea = dH + R T and
 * ln A = ln(kappa kB T/h c0^(1-n)) + 1 + dS/R.
 *
 * @param rate parameters in SI
 * @param temperature K
 * @returns ln A and Ea (J/mol)
 * @see Laidler & King 1983 (solution, and unimolecular in the gas)
 */
export function arrheniusAt(rate: ModifiedArrhenius, temperature: number): ModifiedArrhenius {
  const activationEnergy = apparentActivationEnergy(rate, temperature);
  return fromArrhenius(
    lnRateConstant(rate, temperature) + activationEnergy / (gasConstant * temperature),
    activationEnergy,
  );
}

/** Activation enthalpy (J/mol) and entropy (J/(mol K)) of Eyring's equation. */
export interface ActivationPair {
  readonly activationEnthalpy: number;
  readonly activationEntropy: number;
}

/**
 * The Eyring pair with the same k and the same slope at one temperature:
 * dH = Ea - R T, dS = R [ln A - 1 - ln(kappa kB T/h c0^(1-n))].
 *
 * @param rate parameters in SI
 * @param temperature K
 * @param standardConcentration c0, mol/m^3
 * @param transmissionCoefficient kappa
 * @param order overall order n
 * @returns dH in J/mol and dS in J/(mol K)
 * @see Laidler & King 1983
 */
export function eyringAt(
  rate: ModifiedArrhenius,
  temperature: number,
  standardConcentration: number,
  transmissionCoefficient: number,
  order: number,
): ActivationPair {
  const activationEnthalpy = apparentActivationEnergy(rate, temperature) - gasConstant * temperature;
  const bare = fromEyring(activationEnthalpy, 0, standardConcentration, transmissionCoefficient, order);
  return {
    activationEnthalpy,
    activationEntropy: gasConstant * (lnRateConstant(rate, temperature) - lnRateConstant(bare, temperature)),
  };
}
