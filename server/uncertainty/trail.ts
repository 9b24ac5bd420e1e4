import { findCrossing } from "../numeric/roots.js";
import { holds, type Span, spansWhere } from "../window/spans.js";

/** A function of temperature that is positive or zero where a criterion holds. */
type Margin = (temperature: number) => number;

/** Ends of a criterion are followed to this, K. */
const endTolerance = 0.01;

/** Where a criterion begins and ceases to hold at the estimates, to be followed into the draws. */
export interface Trail {
  readonly low: number;
  readonly high: number;
  readonly startsHolding: boolean;
  readonly ends: readonly TrailEnd[];
  /** where the margin turns back, or nearly does */
  readonly turns: readonly number[];
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
  const startsHolding = held.length > 0 && held[0][0] === low;
  return { low, high, startsHolding, ends, turns: turnsOf(margin, low, high) };
}

/** A margin is about to turn where its slope falls to this part of what it reaches on both sides. */
const flat = 0.5;

/** Looked for on a grid of at most 1 K: where the slope is least, and clearly less than on both sides. */
function turnsOf(margin: Margin, low: number, high: number): number[] {
  const cells = Math.max(1, Math.ceil(high - low - 1e-9));
  const at = Array.from({ length: cells + 1 }, (_, i) => low + ((high - low) * i) / cells);
  const values = at.map(margin);
  const slopes = values.slice(1).map((value, i) => Math.abs(value - values[i]));
  return at.slice(1, -1).filter((_, i) => {
    const here = slopes[i];
    const steepest = (part: readonly number[]): number => Math.max(...part.filter(Number.isFinite));
    const least = i > 0 && here < slopes[i - 1] && here <= slopes[i + 1];
    return least && here < flat * Math.min(steepest(slopes.slice(0, i)), steepest(slopes.slice(i + 1)));
  });
}

function trailEnd(margin: Margin, at: number, falling: boolean): TrailEnd {
  const slope = (margin(at + slopeWidth) - margin(at - slopeWidth)) / (2 * slopeWidth);
  return {
    at,
    falling,
    slope: slope < 0 === falling && slope !== 0 && Number.isFinite(slope) ? slope : null,
  };
}

/** A change of sign of a margin inside the range. */
interface End {
  readonly at: number;
  readonly falling: boolean;
}

/**
 * Where a criterion holds in one draw, by following its ends from the estimates by secants. Both ends of the range
 * are looked at besides: where one says otherwise than the ends that were followed, there is another end between.
 * So are the places where the margin turns back at the estimates, or nearly does: about them two ends could hide.
 *
 * @param trail at the estimates
 * @param margin in the draw
 * @param shift by which the ends are thought to have moved, K
 * @returns null where the ends do not follow: then only a search of the whole range tells
 */
export function followed(trail: Trail, margin: Margin, shift = 0): readonly Span[] | null {
  const { low, high } = trail;
  const found = followedEnds(trail, margin, shift);
  if (found === null) return null;
  const { ends } = found;
  const atLow = careful(margin(low)) >= 0;
  const atHigh = careful(margin(high)) >= 0;
  if (ends.length === 0) {
    if (atLow === atHigh && atLow !== found.startsHolding) return null;
    if (atLow !== atHigh) ends.push(endBetween(margin, low, high, atLow));
  }
  const first = ends[0];
  if (first !== undefined && first.falling !== atLow) {
    const near = first.at - besides;
    if (near <= low || careful(margin(near)) >= 0 !== first.falling) return null;
    ends.unshift(endBetween(margin, low, near, atLow));
  }
  const last = ends[ends.length - 1];
  if (last !== undefined && last.falling === atHigh) {
    const near = last.at + besides;
    if (near >= high || careful(margin(near)) >= 0 === last.falling) return null;
    ends.push(endBetween(margin, near, high, !atHigh));
  }
  const spans = spansBetween(ends, atLow, low, high);
  return trail.turns.every((at) => careful(margin(at)) >= 0 === holds(spans, at)) ? spans : null;
}

/** So far beside an end its side is certain, K. */
const besides = 2 * endTolerance;

function followedEnds(
  trail: Trail,
  margin: Margin,
  shift: number,
): { ends: End[]; startsHolding: boolean } | null {
  const ends: End[] = [];
  let startsHolding = trail.startsHolding;
  let last = Number.NEGATIVE_INFINITY;
  for (const end of trail.ends) {
    const at = followEnd(trail, end, margin, shift);
    // Two ends may both have left on the same side; inside the range their order must stay.
    if (at === null || at < last || (at === last && Number.isFinite(at))) return null;
    last = at;
    if (at === Number.NEGATIVE_INFINITY) startsHolding = !startsHolding;
    else if (at !== Number.POSITIVE_INFINITY) ends.push({ at, falling: end.falling });
  }
  return { ends, startsHolding };
}

/** The end between two temperatures on whose sides the criterion does and does not hold. */
function endBetween(margin: Margin, from: number, to: number, falling: boolean): End {
  const crossing = findCrossing((at) => careful(margin(at)), from, to, { tolerance: endTolerance });
  return { at: falling ? crossing.before : crossing.after, falling };
}

function spansBetween(ends: readonly End[], startsHolding: boolean, low: number, high: number): Span[] {
  const spans: Span[] = [];
  let start = startsHolding ? low : null;
  for (const { at, falling } of ends) {
    if (falling && start !== null) spans.push([start, at]);
    start = falling ? null : at;
  }
  if (start !== null) spans.push([start, high]);
  return spans;
}

/**
 * One end in one draw: a secant from the estimate's end and slope, kept inside what is known of both sides.
 *
 * @returns K; -Infinity or Infinity where the end lies below or above the range; null where it does not follow
 */
function followEnd(trail: Trail, end: TrailEnd, margin: Margin, shift: number): number | null {
  const { low, high } = trail;
  let below = Number.NEGATIVE_INFINITY;
  let above = Number.POSITIVE_INFINITY;
  let x = Math.min(Math.max(end.at + shift, low), high);
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
 * @param shift by which the ends are thought to have moved, K
 */
export function heldAlong(
  trail: Trail | null,
  margin: Margin,
  low: number,
  high: number,
  shift = 0,
): readonly Span[] {
  const found = trail === null ? null : followed(trail, margin, shift);
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
