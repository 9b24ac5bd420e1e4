import { lnRateConstant } from "../kinetics/rateConstant.js";
import type { Step } from "../thermal/step.js";
import { type Isothermal, integrated } from "../window/study.js";
import { courseBetween, type SampledCourses, sampleCourses } from "./dosingCourse.js";
import {
  createDosingPoints,
  type DosingPoints,
  heatRatio,
  quantities,
  ratioSpacing,
} from "./dosingPoints.js";

/** Distances of the table's points in ln k: the first one whose cell errs little enough is used. */
const spacings = [8, 2] as const;

/** A cell is used only where its interpolation errs by less than this part of the largest value. */
const allowedError = 1e-6;

/** Points of a cell's polynomial: three on either side. */
const stencil = 6;

/** Part of the table between two points, with what its polynomial goes through. */
interface Cell {
  /** indices of the six points */
  readonly points: readonly number[];
  readonly spacing: number;
  /** six values of each of the quantities, one after the other */
  readonly values: Float64Array;
  /** by the index of the ratio of heat capacities: four rises of each point */
  readonly rises: Map<number, Float64Array>;
  readonly completionHolds: boolean;
  courses: SampledCourses | null;
}

/**
 * The isothermal step of a semibatch as a function of ln k, tabulated where it is asked for and read by polynomials
 * of the fifth degree: for draws that differ in rate constant, heats and heat capacities but not in the recipe. The
 * largest rise depends besides on the ratio of the fed heat capacity to the charged one, and is tabulated over its
 * logarithm too (cubic).
 *
 * Each cell is tested before it is used: in its middle it must agree with an integration to 1e-6. Where a wide cell
 * does not (near a kink), narrow ones are made and tested alike; where those do not, the step is integrated.
 *
 * @param nominal the step at its estimates, a semibatch with a rate constant
 * @returns isothermal step of a draw with the same recipe
 */
export function dosingTable(nominal: Step): (step: Step) => Isothermal {
  const points = createDosingPoints(nominal);
  const cells = spacings.map(() => new Map<number, Cell | null>());
  const nominalRatio = heatRatio(nominal);
  const weights = new Float64Array(stencil);

  /** Narrowest cell needed about a place, its weights left in `weights`; null where the table does not hold. */
  function locate(lnK: number): Cell | null {
    const place = lnK / points.unit;
    for (let level = 0; level < spacings.length; level += 1) {
      const index = Math.floor(place / spacings[level]);
      let cell = cells[level].get(index);
      if (cell === undefined) {
        cell = testedCell(points, index * spacings[level], spacings[level]);
        cells[level].set(index, cell);
      }
      if (cell !== null) {
        fillWeights(weights, place / spacings[level] - index);
        return cell;
      }
    }
    return null;
  }

  return (step) => {
    const { rate, heat, measuredExcess } = step.reaction;
    const direct = integrated(step);
    if (rate === null) return direct;
    const lnRatio = Math.log(heatRatio(step) / nominalRatio) / ratioSpacing;
    const ratioIndex = Math.floor(lnRatio);
    const ratioWeights = cubicWeights(lnRatio - ratioIndex);
    const riseFactor =
      ((heat / nominal.reaction.heat) * nominal.mixture.heatCapacity) / step.mixture.heatCapacity;
    return {
      figuresAt(temperature) {
        const cell = locate(lnRateConstant(rate, temperature));
        if (cell === null) return direct.figuresAt(temperature);
        const fastest = Math.exp(read(cell, weights, quantities.lnFastest));
        const at = Math.min(Math.max(read(cell, weights, quantities.fastestAt), 0), 1) * points.feedEnd;
        const rise = readRise(points, cell, weights, ratioIndex, ratioWeights);
        return {
          rise: riseFactor * rise + measuredExcess,
          fastest: { value: fastest, at },
          endRate: fastest * read(cell, weights, quantities.endRate),
        };
      },
      completionAt(temperature) {
        const cell = locate(lnRateConstant(rate, temperature));
        if (cell === null || !cell.completionHolds) return direct.completionAt(temperature);
        return Math.exp(read(cell, weights, quantities.lnCompletion));
      },
      courseAt(temperature) {
        const cell = locate(lnRateConstant(rate, temperature));
        if (cell === null) return direct.courseAt(temperature);
        cell.courses ??= sampleCourses(cell.points.map(points.dosing), points.dosing(cell.points[3]));
        return courseBetween(cell.courses, weights, Math.exp(read(cell, weights, quantities.lnFastest)));
      },
    };
  };
}

function testedCell(points: DosingPoints, start: number, spacing: number): Cell | null {
  const indices = [-2, -1, 0, 1, 2, 3].map((offset) => start + offset * spacing);
  const middle = start + spacing / 2;
  if (!points.exist([...indices, middle])) return null;
  const count = Object.keys(quantities).length;
  const values = new Float64Array(count * stencil);
  indices.forEach((index, i) => {
    for (let quantity = 0; quantity < count; quantity += 1) {
      values[quantity * stencil + i] = points.value(index, quantity);
    }
  });
  const weights = new Float64Array(stencil);
  fillWeights(weights, 0.5);
  const cell = { points: indices, spacing, values, rises: new Map<number, Float64Array>() };
  const misses = (quantity: number): boolean =>
    // A value that is not finite makes the error NaN, which never passes.
    !(Math.abs(read(cell, weights, quantity) - points.value(middle, quantity)) <= allowedError);
  const risesThere = indices.map((index) => points.rise(index, 0));
  const risen = risesThere.reduce((sum, rise, i) => sum + weights[i] * rise, 0);
  const riseError = Math.abs(risen - points.rise(middle, 0));
  if (misses(quantities.lnFastest) || misses(quantities.endRate)) return null;
  if (!(riseError <= allowedError * Math.max(...risesThere))) return null;
  return { ...cell, completionHolds: !misses(quantities.lnCompletion), courses: null };
}

function read(cell: Pick<Cell, "values">, weights: Float64Array, quantity: number): number {
  const { values } = cell;
  const from = quantity * stencil;
  let sum = 0;
  for (let i = 0; i < stencil; i += 1) sum += weights[i] * values[from + i];
  return sum;
}

function readRise(
  points: DosingPoints,
  cell: Cell,
  weights: Float64Array,
  ratioIndex: number,
  ratioWeights: readonly number[],
): number {
  let rises = cell.rises.get(ratioIndex);
  if (rises === undefined) {
    rises = new Float64Array(4 * stencil);
    for (let j = 0; j < 4; j += 1) {
      for (let i = 0; i < stencil; i += 1) {
        rises[j * stencil + i] = points.rise(cell.points[i], ratioIndex + j - 1);
      }
    }
    cell.rises.set(ratioIndex, rises);
  }
  let sum = 0;
  for (let j = 0; j < 4; j += 1) {
    let column = 0;
    for (let i = 0; i < stencil; i += 1) column += weights[i] * rises[j * stencil + i];
    sum += ratioWeights[j] * column;
  }
  return sum;
}

/** Weights of the polynomial through six points at -2 to 3, at u from 0 to 1 (Lagrange). */
function fillWeights(weights: Float64Array, u: number): void {
  const [a, b, c, d, e, f] = [u + 2, u + 1, u, u - 1, u - 2, u - 3];
  weights[0] = (-b * c * d * e * f) / 120;
  weights[1] = (a * c * d * e * f) / 24;
  weights[2] = (-a * b * d * e * f) / 12;
  weights[3] = (a * b * c * e * f) / 12;
  weights[4] = (-a * b * c * d * f) / 24;
  weights[5] = (a * b * c * d * e) / 120;
}

/** Weights of the cubic through four points at -1, 0, 1 and 2 (Lagrange), at u from 0 to 1. */
function cubicWeights(u: number): readonly [number, number, number, number] {
  const [a, b, c, d] = [u + 1, u, u - 1, u - 2];
  return [(-b * c * d) / 6, (a * c * d) / 2, (-a * b * d) / 2, (a * b * c) / 6];
}
