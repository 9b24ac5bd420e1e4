import type { Reaction } from "./step.js";

/**
 * Below this part of the recipe's amount a power with an exponent under one goes linearly to zero: its own
 * slope is infinite there, which no integrator can follow. The amount at stake is a millionth of the recipe.
 */
export const linearPart = 1e-6;

/**
 * n^order, continued oddly below zero so that an amount that rounding has pushed below zero is pulled back.
 *
 * @param amount mol
 * @param order > 0
 * @param total amount of the recipe, mol
 */
export function amountPower(amount: number, order: number, total: number): number {
  if (order === 1) return amount;
  const size = Math.abs(amount);
  if (order < 1 && size < linearPart * total) return amount * (linearPart * total) ** (order - 1);
  const value = order === 2 ? size * size : size ** order;
  return amount < 0 ? -value : value;
}

/**
 * Slope of `amountPower`.
 *
 * @param amount mol
 * @param order > 0
 * @param total amount of the recipe, mol
 */
export function amountPowerSlope(amount: number, order: number, total: number): number {
  if (order === 1) return 1;
  const size = Math.abs(amount);
  if (order < 1 && size < linearPart * total) return (linearPart * total) ** (order - 1);
  return order === 2 ? 2 * size : order * size ** (order - 1);
}

/**
 * Overall order of the rate law, a + b.
 *
 * @param reaction SI numbers
 */
export function overallOrder(reaction: Reaction): number {
  return reaction.orderA + (reaction.b?.order ?? 0);
}

/**
 * Rate of the whole contents over k, r V/k = (nA/V)^a (nB/V)^b V.
 *
 * @param reaction orders and amounts of the recipe
 * @param amountA mol of A left
 * @param amountB mol of B left; ignored where the reaction has no B
 * @param volume m^3
 * @returns mol^n m^(3-3n); times k in (m^3/mol)^(n-1)/s it is mol/s
 */
export function rateOverK(reaction: Reaction, amountA: number, amountB: number, volume: number): number {
  const { b, orderA } = reaction;
  const ofA = amountPower(amountA, orderA, reaction.amountA);
  const ofB = b === null ? 1 : amountPower(amountB, b.order, b.amount);
  return ofA * ofB * volumePower(reaction, volume);
}

/**
 * V^(1-n), the part of `rateOverK` that the volume has.
 *
 * @param reaction orders
 * @param volume m^3
 */
export function volumePower(reaction: Reaction, volume: number): number {
  const order = overallOrder(reaction);
  if (order === 1) return 1;
  return order === 2 ? 1 / volume : volume ** (1 - order);
}
