import type { Step } from "../../server/thermal/step.js";

/*
 * The definitions of the window's criteria written out plainly, with fixed small steps and no code of the
 * program, so that ends found by it can be held against them.
 */

const gas = 8.31446261815324;

/** k of a rate constant at a temperature. */
function k(
  rate: { lnPreExponential: number; temperaturePower: number; activationEnergy: number },
  T: number,
): number {
  return (
    Math.exp(rate.lnPreExponential) *
    T ** rate.temperaturePower *
    Math.exp(-rate.activationEnergy / (gas * T))
  );
}

interface Moment {
  readonly time: number;
  readonly nA: number;
  readonly nB: number;
  readonly fed: number;
  /** mol/s */
  readonly rate: number;
}

/** The isothermal step by classical Runge-Kutta with fixed steps, B fed; over the feed, then to `until`. */
export function dosed(step: Step, T: number, until: number, steps = 4000): Moment[] {
  const { reaction, mixture } = step;
  const { feed, b } = reaction;
  if (feed === null || b === null || reaction.rate === null) throw new Error("For a fed B only");
  const kT = k(reaction.rate, T);
  const rate = (t: number, extent: number): number => {
    const part = Math.min(t / feed.duration, 1);
    const V = mixture.mass / mixture.density + (feed.mass * part) / feed.density;
    const nA = Math.max(reaction.amountA - extent, 0);
    const nB = Math.max(b.amount * part - b.perA * extent, 0);
    return kT * (nA / V) ** reaction.orderA * (nB / V) ** b.order * V;
  };
  const moments: Moment[] = [];
  let extent = 0;
  const stretches: [number, number][] = [
    [0, feed.duration],
    [feed.duration, until],
  ];
  for (const [from, to] of stretches) {
    const h = (to - from) / steps;
    for (let i = 0; i <= steps && h > 0; i += 1) {
      const t = from + i * h;
      const part = Math.min(t / feed.duration, 1);
      moments.push({
        time: t,
        nA: reaction.amountA - extent,
        nB: b.amount * part - b.perA * extent,
        fed: feed.mass * part,
        rate: rate(t, extent),
      });
      if (i === steps) break;
      const k1 = rate(t, extent);
      const k2 = rate(t + h / 2, extent + (h / 2) * k1);
      const k3 = rate(t + h / 2, extent + (h / 2) * k2);
      const k4 = rate(t + h, extent + h * k3);
      extent += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
    }
  }
  return moments;
}

/** MTSR of a fed step, on the moments themselves. */
export function mtsrOf(step: Step, T: number, moments: readonly Moment[]): number {
  const { feed, b, heat } = step.reaction;
  if (feed === null || b === null) throw new Error("For a fed B only");
  const rises = moments
    .filter((moment) => moment.time <= feed.duration)
    .map(({ nA, nB, fed }) => {
      const C = step.mixture.mass * step.mixture.heatCapacity + fed * feed.heatCapacity;
      return (Math.min(nA, nB / b.perA) * -heat) / C;
    });
  return T + Math.max(...rises);
}

/** Cooling duty of a fed step without decomposition, on the moments themselves. */
export function dutyOf(step: Step, T: number, moments: readonly Moment[]): number {
  const { feed, heat } = step.reaction;
  if (feed === null) throw new Error("For a fed B only");
  const cold = ((feed.mass * feed.heatCapacity) / feed.duration) * (T - feed.temperature);
  const during = moments.filter((moment) => moment.time <= feed.duration);
  const end = during[during.length - 1].rate * -heat;
  return Math.max(...during.map((moment) => moment.rate * -heat - cold), end) + step.vessel.agitatorPower;
}

/** Full cooling capacity. */
export function capacityOf(step: Step, T: number): number {
  const { ua, flowing, coolantTemperature } = step.vessel;
  const w = flowing === null ? Number.POSITIVE_INFINITY : flowing.flow * flowing.heatCapacity;
  return (T - coolantTemperature) / (1 / ua + 1 / w);
}

/** Adiabatic time to maximum rate by classical Runge-Kutta in ln(dT/dt), from a progress left by a hold. */
export function tmradOf(step: Step, T0: number, alpha0: number): number {
  const { decomposition, mixture, reaction } = step;
  if (decomposition === null) throw new Error("Needs a decomposition");
  const feed = reaction.feed;
  const mass = mixture.mass + (feed?.mass ?? 0);
  const C = mixture.mass * mixture.heatCapacity + (feed === null ? 0 : feed.mass * feed.heatCapacity);
  const rise = (decomposition.heat * mass) / C;
  const speed = (alpha: number): number => kineticOf(step, T0 + rise * (alpha - alpha0), alpha);
  // Time as the integral of d alpha/speed by Simpson's rule in equal steps of ln(alpha - alpha0 + small).
  const small = 1e-10;
  let end = alpha0;
  let fastest = 0;
  for (let i = 0; i <= 200_000; i += 1) {
    const alpha = alpha0 + ((1 - alpha0) * i) / 200_000;
    const value = speed(alpha);
    if (value > fastest) {
      fastest = value;
      end = alpha;
    }
  }
  const lo = Math.log(small);
  const hi = Math.log(end - alpha0 + small);
  const cells = 4000;
  const h = (hi - lo) / cells;
  let sum = 0;
  for (let i = 0; i <= cells; i += 1) {
    const x = Math.exp(lo + i * h);
    const weight = i === 0 || i === cells ? 1 : i % 2 === 1 ? 4 : 2;
    sum += (weight * x) / speed(alpha0 + x - small);
  }
  return (sum * h) / 3;
}

/** d alpha/dt of the decomposition. */
function kineticOf(step: Step, T: number, alpha: number): number {
  if (step.decomposition === null) throw new Error("Needs a decomposition");
  const { law, rate } = step.decomposition;
  const f = (1 - alpha) ** law.order * (law.autocatalytic ? law.initiation + alpha ** law.productOrder : 1);
  return k(rate, T) * f;
}

/** Progress after the available time at constant temperature by classical Runge-Kutta. */
export function heldOf(step: Step, T: number): number {
  const steps = 4000;
  const h = step.limits.availableTime / steps;
  let alpha = 0;
  for (let i = 0; i < steps; i += 1) {
    const k1 = kineticOf(step, T, alpha);
    const k2 = kineticOf(step, T, alpha + (h / 2) * k1);
    const k3 = kineticOf(step, T, alpha + (h / 2) * k2);
    const k4 = kineticOf(step, T, alpha + h * k3);
    alpha += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
  }
  return alpha;
}

/** Rate constant of the desired reaction. */
export function reactionK(step: Step, T: number): number {
  if (step.reaction.rate === null) throw new Error("Needs a rate constant");
  return k(step.reaction.rate, T);
}

/** Where a condition changes between two temperatures, to 0.001 K. */
export function edge(holds: (T: number) => boolean, low: number, high: number): number {
  const atLow = holds(low);
  if (holds(high) === atLow) throw new Error("No change between the two");
  let [a, b] = [low, high];
  while (b - a > 0.001) {
    const middle = (a + b) / 2;
    if (holds(middle) === atLow) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}
