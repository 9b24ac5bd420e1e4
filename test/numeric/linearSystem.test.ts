import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { factorise, solveFactored } from "../../server/numeric/linearSystem.js";

function solve(matrix: readonly number[], right: readonly number[]): Float64Array | undefined {
  const n = right.length;
  const factors = Float64Array.from(matrix);
  const pivots = new Int32Array(n);
  if (!factorise(factors, n, pivots)) return undefined;
  const values = Float64Array.from(right);
  solveFactored(factors, n, pivots, values, 0);
  return values;
}

describe("a small linear system", () => {
  it("with a zero on the diagonal is solved by exchanging rows", () => {
    expect(Array.from(solve([0, 2, 1, 0], [4, 3]) ?? [])).toEqual([3, 2]);
    expect(Array.from(solve([0, 0, 2, 4, 0, 0, 0, 5, 0], [2, 8, 10]) ?? [])).toEqual([2, 2, 1]);
  });

  it("with a tiny pivot keeps its digits", () => {
    // The textbook example against elimination without pivoting; Golub & Van Loan, Matrix Computations, 3.3.
    const x = solve([1e-20, 1, 1, 1], [1, 2]) ?? [];
    expect(x[0]).toBeCloseTo(1, 15);
    expect(x[1]).toBeCloseTo(1, 15);
  });

  it("of up to eight unknowns is solved backward stably, and only from the offset on", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 8 }),
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 72, maxLength: 72 }),
        (n, numbers) => {
          const matrix = numbers.slice(0, n * n);
          const right = numbers.slice(64, 64 + n);
          const factors = Float64Array.from(matrix);
          const pivots = new Int32Array(n);
          if (!factorise(factors, n, pivots)) return;
          const values = Float64Array.of(7, 7, ...right, 7);
          solveFactored(factors, n, pivots, values, 2);
          const x = values.slice(2, 2 + n);
          expect([values[0], values[1], values[n + 2]]).toEqual([7, 7, 7]);
          const largest = Math.max(...x.map(Math.abs));
          if (!Number.isFinite(largest)) return;
          for (let i = 0; i < n; i++) {
            let left = 0;
            for (let j = 0; j < n; j++) left += matrix[i * n + j] * x[j];
            expect(Math.abs(left - right[i])).toBeLessThanOrEqual(1e-13 * (1 + largest));
          }
        },
      ),
    );
  });

  it("that is singular or not finite is refused", () => {
    expect(solve([1, 2, 2, 4], [1, 1])).toBeUndefined();
    expect(solve([0], [1])).toBeUndefined();
    expect(solve([Number.NaN], [1])).toBeUndefined();
    expect(solve([Number.POSITIVE_INFINITY, 0, 0, 1], [1, 1])).toBeUndefined();
  });
});
