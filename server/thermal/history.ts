import { lnRateConstant } from "../kinetics/rateConstant.js";
import { lawValue, type RateLaw } from "../kinetics/rateLaw.js";
import { gaussLegendre } from "../numeric/quadrature.js";
import { alphaAtLargestRate } from "./largestRate.js";
import { type Accuracy, type Runaway, timeToMaximumRate } from "./runaway.js";

/**
 * Progress that a law makes at constant temperature, from d alpha/d(k t) = f(alpha) and alpha = 0.
 *
 * @param law rate law
 * @param extent k t, dimensionless
 * @returns alpha in [0, 1]
 */
function progressAfter(law: RateLaw, extent: number): number {
  if (!(extent > 0)) return 0;
  return law.autocatalytic ? autocatalyticProgress(law, extent) : orderProgress(law.order, extent);
}

function orderProgress(order: number, extent: number): number {
  if (order === 1) return -Math.expm1(-extent);
  const base = 1 - (1 - order) * extent;
  return base <= 0 ? 1 : 1 - base ** (1 / (1 - order));
}

function autocatalyticProgress(law: RateLaw, extent: number): number {
  const { order, productOrder, initiation } = law;
  if (order === 1 && productOrder === 1) {
    // (w + alpha)/(w (1 - alpha)) = exp((1 + w) k t)
    const inverse = Math.exp(-(1 + initiation) * extent);
    return (initiation * -Math.expm1(-(1 + initiation) * extent)) / (inverse + initiation);
  }
  return progressByPanels(law, extent);
}

/**
 * Walks panels in alpha, geometric at both ends, adding up k t = integral d alpha/f until the extent is
 * reached, then solves inside that panel by Newton's method.
 */
function progressByPanels(law: RateLaw, extent: number): number {
  const { nodes, weights } = gaussLegendre(10);
  const between = (low: number, high: number): number => {
    const half = 0.5 * (high - low);
    let sum = 0;
    for (let i = 0; i < nodes.length; i += 1) {
      sum += (weights[i] * half) / lawValue(law, low + half * (1 + nodes[i]));
    }
    return sum;
  };
  const scale = law.initiation ** (1 / law.productOrder);
  let low = 0;
  let length = Math.max(Math.min(1e-8, 0.5 * scale), 1e-290);
  let passed = 0;
  while (low < 1 - 1e-12) {
    const high = low + Math.min(length, 0.5 * (1 - low));
    const part = between(low, high);
    if (passed + part >= extent) {
      let alpha = low + ((high - low) * (extent - passed)) / part;
      for (let i = 0; i < 30; i += 1) {
        const change = (passed + between(low, alpha) - extent) * lawValue(law, alpha);
        alpha = Math.min(Math.max(alpha - change, low), high);
        if (Math.abs(change) <= 1e-14 * alpha) break;
      }
      return alpha;
    }
    passed += part;
    low = high;
    length = low;
  }
  return 1;
}

/**
 * Progress of the decomposition after a hold at constant temperature from fresh material.
 *
 * @param runaway decomposition kinetics
 * @param temperature of the hold, K
 * @param time of the hold, s
 * @returns alpha in [0, 1]
 */
export function progressAfterHold(runaway: Runaway, temperature: number, time: number): number {
  return progressAfter(runaway.law, time * Math.exp(lnRateConstant(runaway.rate, temperature)));
}

/**
 * TMRad that a criterion must count with: the shorter of the fresh one and the one from the progress that a
 * hold leaves behind. Material that is already past its largest rate gets 0: it never passes.
 *
 * @param runaway decomposition kinetics and rise
 * @param start temperature at which cooling is lost, K
 * @param held progress left by the hold
 * @returns s
 */
export function carefulTimeToMaximumRate(
  runaway: Runaway,
  start: number,
  held: number,
  accuracy: Accuracy = "full",
): number {
  if (held <= 0) return timeToMaximumRate(runaway, start, 0, accuracy).time;
  const later = timeToMaximumRate(runaway, start, held, accuracy);
  // The fresh one is a quadrature: not made where only its beginning matters.
  if (!later.accelerates && start > 0 && alphaAtLargestRate(runaway, start, 0) > 0) return 0;
  return Math.min(timeToMaximumRate(runaway, start, 0, accuracy).time, later.time);
}
