import type { RateCourse } from "../thermal/dosing.js";
import type { DosingPoints } from "./dosingPoints.js";

/**
 * The rate over the feed between tabulated points, straight between its samples.
 *
 * @param points of the recipe
 * @param indices of the points to interpolate
 * @param weights of these points
 * @param fastest largest rate, mol/s
 */
export function courseBetween(
  points: DosingPoints,
  indices: readonly number[],
  weights: Float64Array,
  fastest: number,
): RateCourse {
  const { sampleTimes: times } = points;
  const rates = new Float64Array(times.length);
  for (let j = 0; j < indices.length; j += 1) {
    const course = points.course(indices[j]);
    for (let i = 0; i < rates.length; i += 1) rates[i] += weights[j] * fastest * course[i];
  }
  const last = times.length - 1;
  return {
    times,
    rateAt(time) {
      let i = 0;
      while (i < last - 1 && times[i + 1] < time) i += 1;
      const part = (time - times[i]) / (times[i + 1] - times[i]);
      return rates[i] + part * (rates[i + 1] - rates[i]);
    },
  };
}
