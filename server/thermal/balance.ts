import type { Decomposition, Step } from "./step.js";

/**
 * Mass fed up to a time at the constant rate of the recipe.
 *
 * @param step SI numbers
 * @param time from the start of the feed, s
 * @returns kg; 0 for a batch
 */
export function fedMass(step: Step, time: number): number {
  const feed = step.reaction.feed;
  return feed === null ? 0 : feed.mass * Math.min(Math.max(time / feed.duration, 0), 1);
}

/**
 * Heat capacity of the contents, C(t) = m0 cp0 + mfed(t) cpfeed.
 * Walls are left out (thermal inertia 1), which is the cautious side.
 *
 * @param step SI numbers
 * @param fed mass fed so far, kg
 * @returns J/K
 */
export function heatCapacityOf(step: Step, fed: number): number {
  const { mixture, reaction } = step;
  return (
    mixture.mass * mixture.heatCapacity + (reaction.feed === null ? 0 : fed * reaction.feed.heatCapacity)
  );
}

/**
 * Volume of the contents, V(t) = m0/rho0 + mfed(t)/rhofeed (ideal mixing).
 *
 * @param step SI numbers
 * @param fed mass fed so far, kg
 * @returns m^3
 */
export function volumeOf(step: Step, fed: number): number {
  const { mixture, reaction } = step;
  return mixture.mass / mixture.density + (reaction.feed === null ? 0 : fed / reaction.feed.density);
}

/**
 * Mass of the contents at the end of the feed.
 *
 * @param step SI numbers
 * @returns kg
 */
function finalMass(step: Step): number {
  return step.mixture.mass + (step.reaction.feed?.mass ?? 0);
}

/**
 * Heat capacity of the contents at the end of the feed.
 *
 * @param step SI numbers
 * @returns J/K
 */
function finalHeatCapacity(step: Step): number {
  return heatCapacityOf(step, step.reaction.feed?.mass ?? 0);
}

/**
 * Limiting amount of the whole recipe, nlim = min(nA, nB/nu).
 *
 * @param step SI numbers
 * @returns mol of reaction (mol of A)
 */
export function limitingAmount(step: Step): number {
  const { amountA, b } = step.reaction;
  return b === null ? amountA : Math.min(amountA, b.amount / b.perA);
}

/**
 * Adiabatic temperature rise of the desired reaction, dTad = nlim (-dHr)/C(end of feed).
 *
 * @param step SI numbers
 * @returns K
 * @see Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008
 */
export function adiabaticRise(step: Step): number {
  return (limitingAmount(step) * -step.reaction.heat) / finalHeatCapacity(step);
}

/**
 * Adiabatic temperature rise of the decomposition, dTad,d = Q/c with c = C(end)/m(end).
 *
 * @param step SI numbers
 * @param decomposition its heat, J/kg
 * @returns K
 * @see Stoessel 2008
 */
export function decompositionRise(step: Step, decomposition: Decomposition): number {
  return (decomposition.heat * finalMass(step)) / finalHeatCapacity(step);
}

/**
 * Bound on the temperature if the whole recipe met at once,
 * [m0 cp0 T + mfeed cpfeed Tfeed + nlim (-dHr)]/C(end).
 *
 * @param step SI numbers
 * @param temperature of the contents, K
 * @returns K
 */
export function allAtOnceTemperature(step: Step, temperature: number): number {
  const { mixture, reaction } = step;
  const feed = reaction.feed;
  const own = mixture.mass * mixture.heatCapacity * temperature;
  const brought = feed === null ? 0 : feed.mass * feed.heatCapacity * feed.temperature;
  return (own + brought + limitingAmount(step) * -reaction.heat) / finalHeatCapacity(step);
}

/**
 * Severity of an adiabatic rise: low below 50 K, high from 200 K on, medium between.
 * Gas and pressure can raise it; they are not assessed here.
 *
 * @param rise K
 * @see Gygax 1988; Stoessel 2008
 */
export function severityOf(rise: number): "low" | "medium" | "high" {
  if (rise < 50) return "low";
  return rise < 200 ? "medium" : "high";
}
