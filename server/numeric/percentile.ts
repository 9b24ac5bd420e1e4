/**
 * Percentile of sorted values by linear interpolation between neighbours: the one at h = (N - 1) p, counted
 * from 0 (type 7).
 *
 * @param sorted ascending, at least one; infinite values are allowed and infinite results then possible
 * @param fraction p, 0 to 1
 * @throws RangeError without values, or where p is outside 0 to 1
 * @see Hyndman & Fan 1996, American Statistician 50:361, definition 7
 */
export function percentile(sorted: ArrayLike<number>, fraction: number): number {
  if (sorted.length === 0 || !(fraction >= 0 && fraction <= 1)) {
    throw new RangeError(`No percentile ${fraction} of ${sorted.length} values`);
  }
  const place = (sorted.length - 1) * fraction;
  const below = Math.floor(place);
  const part = place - below;
  const low = sorted[below];
  // Also where the next one is infinite: a whole place needs no neighbour, and equal ones no difference.
  if (part === 0 || sorted[below + 1] === low) return low;
  return Number.isFinite(low) ? low + part * (sorted[below + 1] - low) : low;
}
