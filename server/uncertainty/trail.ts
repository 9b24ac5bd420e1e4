import { findCrossing } from "../numeric/roots.js";
import { type Span, spansWhere } from "../window/spans.js";

/** A function of temperature that is positive or zero where a criterion holds. */
type Margin = (temperature: number) => number;

/** Ends of a criterion are followed to this, K. */
export const endTolerance = 0.01;

/** Where a criterion begins and ceases to hold at the estimates, to be followed into the draws. */
export interface Trail {
  readonly low: number;
  readonly high: number;
  readonly startsHolding: boolean;
  readonly ends: readonly TrailEnd[];
}

interface TrailEnd {
  readonly at: number;
  /** of the margin, 1/K times its own unit; null where it has none that fits the change of sign */
  readonly slope: number | null;
  /** the criterion holds below the end and not above it */
  readonly falling: boolean;
}

/** Distance over which a margin's slope is taken, K. */
const slopeWidth = 0.02;

/**
 * Notes the ends of a criterion at the estimates.
 *
 * @param margin at the estimates
 * @param held where it holds on [low, high]
 * @param low K
 * @param high K
 */
export function trailOf(margin: Margin, held: readonly Span[], low: number, high: number): Trail {
  const ends: TrailEnd[] = [];
  for (const [start, end] of held) {
    if (start > low) ends.push(trailEnd(margin, start, false));
    if (end < high) ends.push(trailEnd(margin, end, true));
  }
  return {
    low,
    high,
    startsHolding: held.length > 0 && held[0][0] === low,
    ends,
  };
}

function trailEnd(margin: Margin, at: number, falling: boolean): TrailEnd {
  const slope = (margin(at + slopeWidth) - margin(at - slopeWidth)) / (2 * slopeWidth);
  return {
    at,
    falling,
    slope: slope < 0 === falling && slope !== 0 && Number.isFinite(slope) ? slope : null,
  };
}

/**
 * Where a criterion holds in one draw, by following its ends from the estimates by secants. It is taken to have
 * as many ends as at the estimates, except for those that leave [low, high].
 *
 * @param trail at the estimates
 * @param margin in the draw
 * @returns null where the ends do not follow: then only a search of the whole range tells
 */
export function followed(trail: Trail, margin: Margin): readonly Span[] | null {
  const { low, high, ends } = trail;
  if (ends.length === 0) return withoutEnds(trail, margin);
  const spans: Span[] = [];
  let holding = trail.startsHolding;
  let start = low;
  let last = Number.NEGATIVE_INFINITY;
  for (const end of ends) {
    const at = followEnd(trail, end, margin);
    // Two ends may both have left on the same side; inside the range their order must stay.
    if (at === null || at < last || (at === last && Number.isFinite(at))) return null;
    last = at;
    if (at === Number.POSITIVE_INFINITY) continue;
    if (holding && at > low) spans.push([start, at]);
    holding = !holding;
    start = Math.max(at, low);
  }
  if (holding) spans.push([start, high]);
  return spans;
}

/** Two looks tell: what both ends of the range say, and one crossing where they disagree. */
function withoutEnds({ low, high, startsHolding }: Trail, margin: Margin): readonly Span[] | null {
  const atLow = careful(margin(low));
  const atHigh = careful(margin(high));
  if (atLow >= 0 && atHigh >= 0) return startsHolding ? [[low, high]] : null;
  if (atLow < 0 && atHigh < 0) return startsHolding ? null : [];
  const crossing = findCrossing((at) => careful(margin(at)), low, high, {
    tolerance: endTolerance,
  });
  return atLow >= 0 ? [[low, crossing.before]] : [[crossing.after, high]];
}

/**
 * One end in one draw: a secant from the estimate's end and slope, kept inside what is known of both sides.
 *
 * @returns K; -Infinity or Infinity where the end lies below or above the range; null where it does not follow
 */
function followEnd(trail: Trail, end: TrailEnd, margin: Margin): number | null {
  const { low, high } = trail;
  let below = Number.NEGATIVE_INFINITY;
  let above = Number.POSITIVE_INFINITY;
  let x = end.at;
  let y = careful(margin(x));
  let slope = end.slope;
  for (let i = 0; i < 40; i += 1) {
    if (y >= 0 === end.falling) below = Math.max(below, x);
    else above = Math.min(above, x);
    if (below >= above) return null;
    if (above <= low) return Number.NEGATIVE_INFINITY;
    if (below >= high) return Number.POSITIVE_INFINITY;
    if (above - below <= endTolerance) return end.falling ? below : above;
    let next = slope === null ? Number.NaN : x - y / slope;
    if (Math.abs(next - x) <= endTolerance && next > below && next < above) return next;
    if (!(next > below && next < above)) next = halfway(below, above, low, high);
    next = Math.min(Math.max(next, low), high);
    const nextY = careful(margin(next));
    const secant = (nextY - y) / (next - x);
    if (Number.isFinite(secant) && secant !== 0 && secant < 0 === end.falling) slope = secant;
    else if (!Number.isFinite(nextY)) slope = null;
    x = next;
    y = nextY;
  }
  return null;
}

/** Between the two sides; where only one is known, the end of the range on the other. */
function halfway(below: number, above: number, low: number, high: number): number {
  if (below === Number.NEGATIVE_INFINITY) return low;
  return above === Number.POSITIVE_INFINITY ? high : 0.5 * (below + above);
}

function careful(value: number): number {
  return Number.isNaN(value) ? Number.NEGATIVE_INFINITY : value;
}

/**
 * Where a criterion holds in one draw: along its trail, or on the grid where it has none or loses it.
 *
 * @param trail null: the grid
 * @param margin in the draw
 * @param low K
 * @param high K
 */
export function heldAlong(trail: Trail | null, margin: Margin, low: number, high: number): readonly Span[] {
  const found = trail === null ? null : followed(trail, margin);
  return found ?? spansWhere(margin, low, high);
}

/** Whether two sets of spans are the same to within a tolerance, K. */
export function alike(first: readonly Span[], second: readonly Span[], tolerance: number): boolean {
  return (
    first.length === second.length &&
    first.every(
      ([start, end], i) =>
        Math.abs(start - second[i][0]) <= tolerance && Math.abs(end - second[i][1]) <= tolerance,
    )
  );
}
