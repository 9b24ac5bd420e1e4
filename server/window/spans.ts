import { findCrossing } from "../numeric/roots.js";

/** A closed interval of temperature, K. */
export type Span = readonly [number, number];

/** Ends are refined to this, K, and taken on the side that holds. */
const endTolerance = 1e-4;

/**
 * Spans in which a margin is positive or zero, bracketed on a grid of at most 1 K. A margin that is not a
 * number never passes.
 *
 * @param margin of temperature
 * @param low K
 * @param high K
 */
export function spansWhere(margin: (temperature: number) => number, low: number, high: number): Span[] {
  const cells = Math.max(1, Math.ceil(high - low - 1e-9));
  const careful = (temperature: number): number => {
    const value = margin(temperature);
    return Number.isNaN(value) ? Number.NEGATIVE_INFINITY : value;
  };
  const spans: Span[] = [];
  let before = low;
  let valueBefore = careful(low);
  let start = valueBefore >= 0 ? low : null;
  for (let i = 1; i <= cells; i += 1) {
    const here = i === cells ? high : low + ((high - low) * i) / cells;
    const value = careful(here);
    if (value >= 0 !== valueBefore >= 0) {
      const crossing = crossingBetween(careful, before, here, valueBefore, value);
      if (start === null) start = crossing.after;
      else {
        spans.push([start, crossing.before]);
        start = null;
      }
    }
    before = here;
    valueBefore = value;
  }
  if (start !== null) spans.push([start, high]);
  return spans;
}

/** A margin of exactly zero holds: there the crossing is the grid point itself. */
function crossingBetween(
  margin: (temperature: number) => number,
  low: number,
  high: number,
  atLow: number,
  atHigh: number,
): { readonly before: number; readonly after: number } {
  if (atLow === 0) return { before: low, after: low };
  if (atHigh === 0) return { before: high, after: high };
  return findCrossing(margin, low, high, { tolerance: endTolerance });
}

/**
 * Temperatures about which the whole band lies inside a span: each span narrowed by the band on both sides,
 * then cut to the study's limits.
 *
 * @param spans on [low - band, high + band]
 */
export function narrowBy(spans: readonly Span[], band: number, low: number, high: number): Span[] {
  return spans
    .map(([start, end]): Span => [Math.max(start + band, low), Math.min(end - band, high)])
    .filter(([start, end]) => start <= end);
}

/**
 * What two sets of spans have in common.
 *
 * @param first disjoint spans in ascending order
 * @param second likewise
 */
export function intersect(first: readonly Span[], second: readonly Span[]): Span[] {
  const common: Span[] = [];
  for (const [a, b] of first) {
    for (const [c, d] of second) {
      const low = Math.max(a, c);
      const high = Math.min(b, d);
      if (low <= high) common.push([low, high]);
    }
  }
  return common;
}

/** Whether one of the spans holds a temperature. */
export function holds(spans: readonly Span[], temperature: number): boolean {
  return spans.some(([low, high]) => low <= temperature && temperature <= high);
}
