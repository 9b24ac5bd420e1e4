import { courseOf, type Dosing, type RateCourse } from "../thermal/dosing.js";
import { stoichiometricTime } from "../thermal/isothermal.js";

/** Rates over the feed of neighbouring points of a table, at the same times. */
export interface SampledCourses {
  /** s, ascending */
  readonly times: readonly number[];
  /** index of the stoichiometric point, where the rate bends, or of the end of the feed */
  readonly bend: number;
  /** of each point in turn, the rates at all times as parts of its largest one */
  readonly rates: readonly Float64Array[];
}

/** Of an integrator's steps, their starts, middles and ends, one in so many is kept. */
const thinning = 4;

/**
 * Samples the courses of neighbouring points at the times of one of them, thinned: they lie where the rate changes.
 *
 * @param dosings of the points
 * @param middle the one whose times are taken
 */
export function sampleCourses(dosings: readonly Dosing[], middle: Dosing): SampledCourses {
  const { balance, run } = middle;
  const all = run?.times ?? [];
  const turn = stoichiometricTime(balance);
  const last = all.length - 1;
  const end = all.findIndex((time) => time >= turn);
  const bendAt = end < 0 ? last : end;
  const kept = all.filter((_, i) => i % thinning === 0 || i === bendAt || i === last);
  return {
    times: kept,
    bend: kept.indexOf(all[bendAt]),
    rates: dosings.map((dosing) => {
      const course = courseOf(dosing);
      return Float64Array.from(kept, (time) =>
        course === null ? Number.NaN : course.rateAt(time) / dosing.fastest.value,
      );
    }),
  };
}

/**
 * The rate over the feed between tabulated points, cubic in time on either side of the bend.
 *
 * @param sampled courses of the points
 * @param weights of these points
 * @param fastest largest rate, mol/s
 */
export function courseBetween(sampled: SampledCourses, weights: Float64Array, fastest: number): RateCourse {
  const { times, bend } = sampled;
  const rates = new Float64Array(times.length);
  sampled.rates.forEach((course, j) => {
    const weight = weights[j] * fastest;
    for (let i = 0; i < rates.length; i += 1) rates[i] += weight * course[i];
  });
  return {
    times,
    rates,
    rateAt(time) {
      const before = time <= times[bend];
      const first = before ? 0 : bend;
      const last = before ? bend : times.length - 1;
      let index = first;
      while (index < last - 1 && times[index + 1] < time) index += 1;
      return cubicThrough(times, rates, Math.max(first, Math.min(index - 1, last - 3)), last, time);
    },
  };
}

/** Polynomial through four samples from an index on (as many as there are up to `last`), at a time (Lagrange). */
function cubicThrough(
  times: readonly number[],
  rates: Float64Array,
  from: number,
  last: number,
  at: number,
): number {
  const to = Math.min(from + 3, last);
  let sum = 0;
  for (let i = from; i <= to; i += 1) {
    let term = rates[i];
    for (let j = from; j <= to; j += 1) if (j !== i) term *= (at - times[j]) / (times[i] - times[j]);
    sum += term;
  }
  return sum;
}
