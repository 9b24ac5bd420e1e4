import { createRequire } from "node:module";

interface Solver {
  absoluteTolerance: number;
  relativeTolerance: number;
  maxSteps: number;
  solve(
    derivative: (t: number, y: number[]) => number[],
    from: number,
    y: number[],
    to: number,
  ): { readonly y: number[]; readonly nStep: number; readonly nEval: number };
}

// The package ships its TypeScript source, which our stricter compiler would check: loaded as what it runs as.
const require = createRequire(import.meta.url);
const odex: { readonly Solver: new (dimension: number) => Solver } = require("odex");

/**
 * Integrates y' = derivative(t, y) with odex (Hairer's extrapolation method, for systems that are not stiff).
 *
 * @returns y at the end, with the steps and evaluations it took
 */
export function integrateWithOdex(
  derivative: (t: number, y: number[]) => number[],
  from: number,
  y: readonly number[],
  to: number,
  tolerance: number,
  absoluteTolerance = tolerance * 1e-3,
): { readonly y: number[]; readonly steps: number; readonly evaluations: number } {
  const solver = new odex.Solver(y.length);
  solver.absoluteTolerance = absoluteTolerance;
  solver.relativeTolerance = tolerance;
  solver.maxSteps = 1_000_000;
  const result = solver.solve(derivative, from, [...y], to);
  return { y: result.y, steps: result.nStep, evaluations: result.nEval };
}
