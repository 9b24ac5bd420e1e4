import { percentile } from "../numeric/percentile.js";

/** 5th, 50th and 95th percentile; null where one lies beyond every number. */
export interface DrawnPercentiles {
  readonly p05: number | null;
  readonly p50: number | null;
  readonly p95: number | null;
}

/**
 * Percentiles of an output over all draws.
 *
 * @param values one a draw, in any order; infinite where an outcome is beyond what can be told. Sorted in place
 */
export function percentilesOf(values: Float64Array): DrawnPercentiles {
  values.sort();
  const at = (fraction: number): number | null => {
    const value = percentile(values, fraction);
    return Number.isFinite(value) ? value : null;
  };
  return { p05: at(0.05), p50: at(0.5), p95: at(0.95) };
}
