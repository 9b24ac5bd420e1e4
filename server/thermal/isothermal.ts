import type { DenseStep } from "../numeric/denseStep.js";
import type { StiffSystem } from "../numeric/rosenbrockStep.js";
import { createIntegrator, type Integrator } from "../numeric/stiff.js";
import { createTrajectory } from "../numeric/trajectory.js";
import { fedMass, limitingAmount, volumeOf } from "./balance.js";
import {
  amountPower,
  amountPowerSlope,
  linearPart,
  overallOrder,
  rateOverK,
  volumePower,
} from "./reactionRate.js";
import type { Step } from "./step.js";

/**
 * The desired reaction at constant temperature while its feed runs. The only unknown is the extent of
 * reaction as a part of the limiting amount: both amounts follow from it.
 */
export interface IsothermalBalance {
  readonly step: Step;
  /** s; 0 for a batch */
  readonly feedEnd: number;
  /** mol of reaction */
  readonly limiting: number;
  /** part of the limiting amount that has been fed (or charged) at a time */
  fed(time: number): number;
  /** d fed/dt while the feed runs, 1/s */
  readonly feedRate: number;
  /** part of the limiting amount that the charged reactant allows; infinite where nothing else is needed */
  readonly charged: number;
  /** d extent/dt, 1/s */
  rate(time: number, extent: number): number;
  /** d rate/dt along the solution, 1/s^2 */
  rateSlope(time: number, extent: number): number;
  readonly system: StiffSystem;
}

/**
 * Sets up the isothermal balance, dnA/dt = feedA - r V, dnB/dt = feedB - nu r V with
 * r V = k (nA/V)^a (nB/V)^b V.
 *
 * @param step SI numbers
 * @param lnK ln of k at the temperature, (m^3/mol)^(n-1)/s
 * @see Levenspiel, Chemical Reaction Engineering (semibatch balance); Gygax 1988, Chem. Eng. Sci. 43:1759
 */
export function isothermalBalance(step: Step, lnK: number): IsothermalBalance {
  const { reaction } = step;
  const { b, feed, orderA } = reaction;
  const limiting = limitingAmount(step);
  const feedEnd = feed?.duration ?? 0;
  const extentA = reaction.amountA / limiting;
  const extentB = b === null ? Number.POSITIVE_INFINITY : b.amount / b.perA / limiting;
  const fedExtent = feed === null ? 0 : feed.reactant === "A" ? extentA : extentB;
  const charged = feed === null ? Math.min(extentA, extentB) : feed.reactant === "A" ? extentB : extentA;
  const feedRate = feed === null ? 0 : fedExtent / feedEnd;
  const perA = b?.perA ?? 0;
  const order = overallOrder(reaction);
  const k = Math.exp(Math.min(lnK, lnLargestK(step, limiting)));
  const feedsA = feed?.reactant === "A";
  const feedsB = feed?.reactant === "B";
  const volumeRate = feed === null ? 0 : feed.mass / feed.density / feedEnd;
  const totalB = b?.amount ?? 0;

  // One set of numbers at a time, so that rate and both slopes share what they have in common.
  let ofA = 0;
  let ofB = 0;
  let slopeA = 0;
  let slopeB = 0;
  let factor = 0;
  let volume = 0;
  const part = (time: number): number => (feedEnd > 0 ? Math.min(Math.max(time / feedEnd, 0), 1) : 1);
  const prepare = (time: number, extent: number): void => {
    const amountA = (feedsA ? part(time) * reaction.amountA : reaction.amountA) - extent * limiting;
    const amountB = (feedsB ? part(time) * totalB : totalB) - perA * extent * limiting;
    ofA = amountPower(amountA, orderA, reaction.amountA);
    ofB = b === null ? 1 : amountPower(amountB, b.order, totalB);
    slopeA = amountPowerSlope(amountA, orderA, reaction.amountA);
    slopeB = b === null ? 0 : amountPowerSlope(amountB, b.order, totalB);
    volume = volumeOf(step, fedMass(step, time));
    factor = (k * volumePower(reaction, volume)) / limiting;
    // Both overdrawn by rounding: two negative powers must not make a positive rate.
    if (b !== null && amountA < 0 && amountB < 0) factor = -factor;
  };
  const partialExtent = (): number => -factor * limiting * (slopeA * ofB + perA * ofA * slopeB);
  const partialTime = (time: number): number => {
    if (!(time < feedEnd)) return 0;
    const fromA = feedsA ? (reaction.amountA / feedEnd) * slopeA * ofB : 0;
    const fromB = feedsB ? (totalB / feedEnd) * ofA * slopeB : 0;
    return factor * (fromA + fromB + ((1 - order) * volumeRate * ofA * ofB) / volume);
  };
  const rate = (time: number, extent: number): number => {
    prepare(time, extent);
    return factor * ofA * ofB;
  };
  return {
    step,
    feedEnd,
    limiting,
    charged,
    feedRate,
    fed: (time) => (feed === null ? charged : fedExtent * part(time)),
    rate,
    rateSlope(time, extent) {
      prepare(time, extent);
      return partialTime(time) + partialExtent() * factor * ofA * ofB;
    },
    system: {
      size: 1,
      derivative(time, y, out) {
        out[0] = rate(time, y[0]);
      },
      jacobian(time, y, out) {
        prepare(time, y[0]);
        out[0] = partialExtent();
      },
      timeDerivative(time, y, out) {
        prepare(time, y[0]);
        out[0] = partialTime(time);
      },
    },
  };
}

/** Rate of the whole recipe over the feed rate beyond which the feed alone limits. */
const largestDamkoehler = 1e13;

/**
 * A k that leaves less than a millionth of the recipe unreacted is not told from a larger one: the balance
 * would only lose digits. The slower reaction is the cautious one.
 */
function lnLargestK(step: Step, limiting: number): number {
  const { reaction } = step;
  if (reaction.feed === null) return Number.POSITIVE_INFINITY;
  const volume = volumeOf(step, reaction.feed.mass);
  const overK = rateOverK(reaction, reaction.amountA, reaction.b?.amount ?? 0, volume);
  return Math.log((largestDamkoehler * limiting) / (overK * reaction.feed.duration));
}

let integrator: Integrator | undefined;

/** The extent over the feed, with the ends and the middles of the integrator's steps. */
export interface FeedRun {
  /** extent at any time of [0, feed end], part of the limiting amount */
  extentAt(time: number): number;
  /** starts, middles and ends of the steps in ascending order, s */
  readonly times: readonly number[];
  /** extents at `times` */
  readonly extents: readonly number[];
}

/**
 * Integrates the balance over the feed, with a step ending where the fed reactant reaches the stoichiometric
 * amount. Where the integrator gives up, null.
 *
 * @param balance of a semibatch case
 * @param relativeTolerance of the extent
 */
export function runFeed(balance: IsothermalBalance, relativeTolerance: number): FeedRun | null {
  integrator ??= createIntegrator(1);
  const trajectory = createTrajectory(1);
  const times = [0];
  const extents = [0];
  const onStep = (step: DenseStep): undefined => {
    const middle = 0.5 * (step.start + step.end);
    times.push(middle, step.end);
    extents.push(step.component(middle, 0), step.component(step.end, 0));
  };
  const { orderA, b } = balance.step.reaction;
  const broken = Math.min(orderA, b?.order ?? 1) < 1;
  // Errors must stay well inside the linear part of a broken power, or the solution is thrown across it.
  const tolerance = broken ? Math.min(relativeTolerance, 0.01 * linearPart) : relativeTolerance;
  const options = { relativeTolerance: tolerance, absoluteTolerance: 1e-2 * tolerance, trajectory, onStep };
  const stoichiometric = stoichiometricTime(balance);
  let from = 0;
  let y = Float64Array.of(0);
  for (const to of [stoichiometric, balance.feedEnd]) {
    if (!(to > from)) continue;
    const result = integrator.run(balance.system, from, y, to, options);
    if (result.status !== "done") return null;
    from = to;
    y = Float64Array.from(result.y);
  }
  return { extentAt: (time) => trajectory.component(time, 0), times, extents };
}

/**
 * Time at which the fed reactant reaches the amount that the charged one needs.
 *
 * @param balance of a semibatch case
 * @returns s, at most the end of the feed
 */
export function stoichiometricTime(balance: IsothermalBalance): number {
  return Math.min(balance.charged / balance.feedRate, balance.feedEnd);
}
