import type { Span } from "../window/spans.js";

/** Part of the draws in which something must hold to be claimed on the cautious side. */
export const cautiousPart = 0.95;

/** Spans of many draws, laid over each other. */
export interface Coverage {
  /** @param spans of one draw, disjoint */
  add(spans: readonly Span[]): void;
  /**
   * Temperatures that lie in at least so many of the draws.
   *
   * @param needed draws, from 1
   */
  coveredBy(needed: number): Span[];
}

/** Starts an empty coverage. */
export function createCoverage(): Coverage {
  const starts: number[] = [];
  const ends: number[] = [];
  return {
    add(spans) {
      for (const [start, end] of spans) {
        starts.push(start);
        ends.push(end);
      }
    },
    coveredBy(needed) {
      const opening = Float64Array.from(starts).sort();
      const closing = Float64Array.from(ends).sort();
      const covered: Span[] = [];
      let open = 0;
      let next = 0;
      let since = 0;
      for (const end of closing) {
        // A closed span still holds its end: what opens there opens before anything closes.
        while (next < opening.length && opening[next] <= end) {
          open += 1;
          if (open === needed) since = opening[next];
          next += 1;
        }
        if (open === needed) covered.push([since, end]);
        open -= 1;
      }
      return merged(covered);
    },
  };
}

/** Spans that share an end are one. */
function merged(spans: readonly Span[]): Span[] {
  const whole: Span[] = [];
  for (const span of spans) {
    const last = whole[whole.length - 1];
    if (last !== undefined && span[0] <= last[1]) whole[whole.length - 1] = [last[0], span[1]];
    else whole.push(span);
  }
  return whole;
}
