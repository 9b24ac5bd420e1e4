import { fromArrhenius, lnRateConstant } from "../kinetics/rateConstant.js";
import { timeToConversion } from "../thermal/completion.js";
import { courseOf, type Dosing, doseAt, largestRise, type RateCourse } from "../thermal/dosing.js";
import { stoichiometricTime } from "../thermal/isothermal.js";
import type { Step } from "../thermal/step.js";
import { type Isothermal, integrated } from "../window/study.js";

/** Distance of the table's points in ln k, and in the logarithm of the ratio of heat capacities. */
const spacing = 0.04;
const ratioSpacing = 0.05;

/** A cell is used only where its interpolation errs by less than this part of the largest value. */
const allowedError = 1e-6;

/** Samples of the rate over the feed: up to the stoichiometric point, and from there to the end. */
const samplesBefore = 32;
const samplesAfter = 12;

/** One integration of the recipe. Times are parts of the feed's duration, rates parts of the largest one. */
interface Point {
  readonly dosing: Dosing;
  readonly lnFastest: number;
  readonly fastestAt: number;
  readonly endRate: number;
  readonly lnCompletion: number;
  /** rise at the estimates' heat, K, by the index of the ratio of heat capacities */
  readonly rises: Map<number, number>;
  course: Float64Array | null;
}

/** Four neighbours, of which the two inner ones hold the cell. */
interface Cell {
  readonly points: readonly [Point, Point, Point, Point];
  readonly completionHolds: boolean;
}

/**
 * The isothermal step of a semibatch as a function of ln k, tabulated where it is asked for and read by cubic
 * interpolation: for draws that differ in rate constant, heats and heat capacities but not in the recipe. The
 * largest rise depends besides on the ratio of the fed heat capacity to the charged one, and is tabulated over its
 * logarithm too.
 *
 * Before a cell is used its neighbourhood is held against itself: interpolation over points twice as far apart must
 * reproduce both of the cell's own points to 1e-6, which leaves a sixteenth of that within the cell. Where it does
 * not (a kink, or no integration), the step is integrated.
 *
 * @param nominal the step at its estimates, a semibatch with a rate constant
 * @returns isothermal step of a draw with the same recipe
 */
export function dosingTable(nominal: Step): (step: Step) => Isothermal {
  const points = new Map<number, Point | null>();
  const cells = new Map<number, Cell | null>();
  const { limits, reaction } = nominal;
  const nominalRatio = heatRatio(nominal);

  function pointAt(index: number): Point | null {
    const before = points.get(index);
    if (before !== undefined) return before;
    const point = integratedPoint(index);
    points.set(index, point);
    return point;
  }

  function integratedPoint(index: number): Point | null {
    const dosing = doseAt(nominal, fromArrhenius(spacing * index, 0), reaction.temperature);
    if (dosing === null || !(dosing.fastest.value > 0)) return null;
    const { fastest, balance, endRate } = dosing;
    return {
      dosing,
      lnFastest: Math.log(fastest.value),
      fastestAt: fastest.at / balance.feedEnd,
      endRate: endRate / fastest.value,
      lnCompletion: Math.log(timeToConversion(dosing, limits.targetConversion)),
      rises: new Map(),
      course: null,
    };
  }

  function cellAt(index: number): Cell | null {
    const before = cells.get(index);
    if (before !== undefined) return before;
    const cell = testedCell(index);
    cells.set(index, cell);
    return cell;
  }

  function testedCell(index: number): Cell | null {
    const around: Point[] = [];
    for (let i = -3; i <= 4; i += 1) {
      const point = pointAt(index + i);
      if (point === null) return null;
      around.push(point);
    }
    const errorOf = (value: (point: Point) => number): number => {
      const v = around.map(value);
      const error = (at: number): number =>
        Math.abs(v[at] - (9 * (v[at - 1] + v[at + 1]) - v[at - 3] - v[at + 3]) / 16);
      // A value that is not finite makes the error NaN, which never passes.
      return Math.max(error(3), error(4));
    };
    const scale = Math.max(...around.map((point) => riseOf(point, 0)));
    const good =
      errorOf((point) => point.lnFastest) <= allowedError &&
      errorOf((point) => point.endRate) <= allowedError &&
      errorOf((point) => riseOf(point, 0)) <= allowedError * scale;
    if (!good) return null;
    return {
      points: [around[2], around[3], around[4], around[5]],
      completionHolds: errorOf((point) => point.lnCompletion) <= allowedError,
    };
  }

  function riseOf(point: Point, index: number): number {
    const before = point.rises.get(index);
    if (before !== undefined) return before;
    const rise = riseAtRatio(point.dosing, nominal, Math.exp(ratioSpacing * index));
    point.rises.set(index, rise);
    return rise;
  }

  return (step) => {
    const { rate } = step.reaction;
    const direct = integrated(step);
    if (rate === null) return direct;
    const lnRatio = Math.log(heatRatio(step) / nominalRatio) / ratioSpacing;
    const ratioIndex = Math.floor(lnRatio);
    const ratioWeights = weightsAt(lnRatio - ratioIndex);
    const riseFactor =
      ((step.reaction.heat / reaction.heat) * nominal.mixture.heatCapacity) / step.mixture.heatCapacity;
    const riseIn = (point: Point): number => {
      let rise = 0;
      for (let j = 0; j < 4; j += 1) {
        if (ratioWeights[j] !== 0) rise += ratioWeights[j] * riseOf(point, ratioIndex + j - 1);
      }
      return rise;
    };
    const locate = (temperature: number) => {
      const place = lnRateConstant(rate, temperature) / spacing;
      const index = Math.floor(place);
      const cell = cellAt(index);
      return cell === null ? null : { cell, weights: weightsAt(place - index) };
    };
    return {
      figuresAt(temperature) {
        const found = locate(temperature);
        if (found === null) return direct.figuresAt(temperature);
        const { points: near } = found.cell;
        const [a, b, c, d] = found.weights;
        const read = (value: (point: Point) => number): number =>
          a * value(near[0]) + b * value(near[1]) + c * value(near[2]) + d * value(near[3]);
        const fastest = Math.exp(read((point) => point.lnFastest));
        const at = read((point) => point.fastestAt);
        return {
          rise: riseFactor * read(riseIn) + step.reaction.measuredExcess,
          fastest: { value: fastest, at: Math.min(Math.max(at, 0), 1) * near[1].dosing.balance.feedEnd },
          endRate: fastest * read((point) => point.endRate),
        };
      },
      completionAt(temperature) {
        const found = locate(temperature);
        if (found === null || !found.cell.completionHolds) return direct.completionAt(temperature);
        const { points: near } = found.cell;
        const [a, b, c, d] = found.weights;
        return Math.exp(
          a * near[0].lnCompletion +
            b * near[1].lnCompletion +
            c * near[2].lnCompletion +
            d * near[3].lnCompletion,
        );
      },
      courseAt(temperature) {
        const found = locate(temperature);
        return found === null ? direct.courseAt(temperature) : courseBetween(found.cell, found.weights);
      },
    };
  };
}

type Weights = readonly [number, number, number, number];

/** Weights of the cubic through four points at -1, 0, 1 and 2, at u from 0 to 1. */
function weightsAt(u: number): Weights {
  const [before, after, beyond] = [u + 1, 1 - u, 2 - u];
  return [
    (-u * after * beyond) / 6,
    (before * after * beyond) / 2,
    (before * u * beyond) / 2,
    (-before * u * after) / 6,
  ];
}

/** Heat capacity of the whole feed over that of the contents before it. */
function heatRatio({ mixture, reaction }: Step): number {
  const feed = reaction.feed;
  return feed === null ? 0 : (feed.mass * feed.heatCapacity) / (mixture.mass * mixture.heatCapacity);
}

/** Rise of a run, its feed's heat capacity multiplied, with all else at the estimates. */
function riseAtRatio({ balance, run }: Dosing, nominal: Step, factor: number): number {
  const { feed } = nominal.reaction;
  if (run === null || feed === null) return Number.NaN;
  const warmer = { ...feed, heatCapacity: feed.heatCapacity * factor };
  return largestRise({ ...nominal, reaction: { ...nominal.reaction, feed: warmer } }, balance, run).value;
}

/** Times at which a course is sampled, s. */
function sampleTimes({ balance }: Dosing): number[] {
  const turn = stoichiometricTime(balance);
  const times = Array.from({ length: samplesBefore + 1 }, (_, i) => (turn * i) / samplesBefore);
  if (turn < balance.feedEnd) {
    for (let i = 1; i <= samplesAfter; i += 1) {
      times.push(turn + ((balance.feedEnd - turn) * i) / samplesAfter);
    }
  }
  return times;
}

function courseBetween({ points }: Cell, weights: Weights): RateCourse {
  const times = sampleTimes(points[1].dosing);
  const lnFastest = points.reduce((sum, point, j) => sum + weights[j] * point.lnFastest, 0);
  const rates = new Float64Array(times.length);
  points.forEach((point, j) => {
    point.course ??= sampledCourse(point, times);
    for (let i = 0; i < rates.length; i += 1) rates[i] += weights[j] * point.course[i];
  });
  const fastest = Math.exp(lnFastest);
  const last = times.length - 1;
  return {
    times,
    rateAt(time) {
      // Straight between samples: their own values are what a search for the largest heat compares.
      let i = 0;
      while (i < last - 1 && times[i + 1] < time) i += 1;
      const part = (time - times[i]) / (times[i + 1] - times[i]);
      return fastest * (rates[i] + part * (rates[i + 1] - rates[i]));
    },
  };
}

function sampledCourse({ dosing }: Point, times: readonly number[]): Float64Array {
  const course = courseOf(dosing);
  return Float64Array.from(times, (time) =>
    course === null ? Number.NaN : course.rateAt(time) / dosing.fastest.value,
  );
}
