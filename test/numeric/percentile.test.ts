import { expect, test } from "vitest";
import { percentile } from "../../server/numeric/percentile.js";

// Hyndman & Fan 1996, definition 7, the default of R's quantile(): quantile(c(1, 3, 4, 8, 20), c(...)), by hand.
test.each([
  [0, 1],
  [0.05, 1.4],
  [0.25, 3],
  [0.5, 4],
  [0.6, 5.6],
  [0.95, 17.6],
  [1, 20],
])("the percentile at %d is read between its neighbours", (fraction, expected) => {
  expect(percentile([1, 3, 4, 8, 20], fraction)).toBeCloseTo(expected, 12);
});

test("a single value is each of its percentiles", () => {
  expect(percentile(Float64Array.of(7), 0.05)).toBe(7);
});

test("infinite values give infinite percentiles, never something that is no number", () => {
  const values = [-Infinity, -Infinity, 1, 2, Infinity];
  expect(percentile(values, 0.1)).toBe(-Infinity);
  expect(percentile(values, 0.3)).toBe(-Infinity);
  expect(percentile(values, 0.5)).toBe(1);
  expect(percentile(values, 0.75)).toBe(2);
  expect(percentile(values, 0.9)).toBe(Infinity);
  expect(percentile([Infinity, Infinity], 0.5)).toBe(Infinity);
});

test("no values have no percentile", () => {
  expect(() => percentile([], 0.5)).toThrow(RangeError);
  expect(() => percentile([1], 1.1)).toThrow(RangeError);
  expect(() => percentile([1], NaN)).toThrow(RangeError);
});
