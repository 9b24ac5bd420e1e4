import { gaussLegendre } from "../numeric/quadrature.js";
import { findRoot } from "../numeric/roots.js";
import type { Dosing } from "./dosing.js";
import { linearPart } from "./reactionRate.js";

/**
 * Time to a conversion X = extent/nlim at constant temperature, from the start of the feed (batch: of the
 * reaction). During the feed it is read from the balance, after it a quadrature of d extent/rate.
 *
 * @param dosing isothermal step
 * @param conversion 0 < X <= 1
 * @returns s; infinite where it is never reached
 */
export function timeToConversion(dosing: Dosing, conversion: number): number {
  const { balance, endExtent, run } = dosing;
  if (run !== null && endExtent >= conversion) {
    return findRoot((time) => run.extentAt(time) - conversion, 0, balance.feedEnd, {
      tolerance: 1e-9 * balance.feedEnd,
    });
  }
  return balance.feedEnd + timeBetween(dosing, endExtent, conversion);
}

/** Panels narrow geometrically towards full conversion, where the rate of the limiting reactant vanishes. */
function timeBetween(dosing: Dosing, from: number, to: number): number {
  const { balance } = dosing;
  const { nodes, weights } = gaussLegendre(12);
  const rate = (left: number): number => balance.rate(balance.feedEnd, 1 - left);
  const end = 1 - to;
  const smallest = Math.max(end, 4 * linearPart);
  let time = 0;
  for (let left = 1 - from; left > smallest; ) {
    const next = Math.max(smallest, 0.4 * left);
    const half = 0.5 * (left - next);
    for (let i = 0; i < nodes.length; i += 1) {
      const value = rate(next + half * (1 + nodes[i]));
      if (!(value > 0)) return Number.POSITIVE_INFINITY;
      time += (weights[i] * half) / value;
    }
    left = next;
  }
  if (end >= smallest) return time;
  // So near the end the rate is a power of what is left, c left^p.
  const lastRate = rate(smallest);
  const exponent = Math.log(rate(2 * smallest) / lastRate) / Math.LN2;
  const scale = smallest / lastRate;
  if (Math.abs(exponent - 1) < 1e-4) return time + scale * Math.log(smallest / end);
  const rest = (1 - (end / smallest) ** (1 - exponent)) / (1 - exponent);
  return time + scale * rest;
}
