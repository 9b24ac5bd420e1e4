import { createRequire } from "node:module";
import type { StiffSystem } from "../../server/numeric/rosenbrockStep.js";
import { createIntegrator } from "../../server/numeric/stiff.js";
import { integrateWithOdex } from "../published/odex.js";

/** A stretch to integrate, and a solution whose error is below all that is compared. */
export interface Problem {
  readonly system: StiffSystem;
  readonly start: Float64Array;
  /** s */
  readonly until: number;
  readonly exact: readonly number[];
  /** what an error of each unknown is measured by */
  readonly scale: readonly number[];
}

/** What one integration took. */
export interface Outcome {
  readonly y: ArrayLike<number>;
  readonly steps: number;
  /** of the right-hand side, those for a Jacobian included */
  readonly calls: number;
}

/** An integrator of a problem at a tolerance; null where it does not get through. */
export type Integrate = (problem: Problem, tolerance: number) => Outcome | null;

/** Calls after which an integration is given up: a hundred times what the stiff one needs at a like error. */
const mostCalls = 200_000;

/** Ours: the stiff one. A Jacobian is counted as one call for each unknown. */
export const ours: Integrate = ({ system, start, until }, tolerance) => {
  const { size } = system;
  const options = { relativeTolerance: tolerance, absoluteTolerance: 1e-3 * tolerance };
  const found = createIntegrator(size).run(system, 0, start, until, options);
  const accepted = found.steps - found.rejected;
  return found.status === "done"
    ? { y: found.y, steps: found.steps, calls: found.evaluations + size * accepted }
    : null;
};

/** Odex: extrapolation, explicit. */
export const odex: Integrate = ({ system, start, until }, tolerance) =>
  unlessTooLong(system, (slopes) => {
    const found = integrateWithOdex(slopes, 0, [...start], until, tolerance, tolerance * 1e-3);
    return { y: found.y, steps: found.steps, calls: found.evaluations };
  });

type SolveOde = (
  derivative: (t: number, y: number[]) => number[],
  span: readonly [number, number],
  y: readonly number[],
  options: Readonly<Record<string, number | string>>,
) => { readonly t: number[]; readonly y: number[][] };

// The package does not declare the function's type.
const { solveODE }: { readonly solveODE: SolveOde } = createRequire(import.meta.url)("mathjs");

/** Mathjs: Dormand and Prince's explicit pair. Its tolerance is one of the slope, in units of each unknown. */
export const mathjs: Integrate = ({ system, start, until }, tolerance) =>
  unlessTooLong(system, (slopes, calls) => {
    const options = { method: "RK45", tol: tolerance, firstStep: 1, maxIter: mostCalls };
    const found = solveODE(slopes, [0, until], [...start], options);
    return { y: found.y.at(-1) ?? [], steps: found.t.length - 1, calls: calls() };
  });

/** An integration that ends when it has called its right-hand side too often. */
function unlessTooLong(
  system: StiffSystem,
  integrate: (slopes: (t: number, y: number[]) => number[], calls: () => number) => Outcome,
): Outcome | null {
  const slope = new Float64Array(system.size);
  const state = new Float64Array(system.size);
  let calls = 0;
  const tooLong = new Error(`More than ${mostCalls} calls`);
  const slopes = (t: number, y: number[]): number[] => {
    calls += 1;
    if (calls > mostCalls) throw tooLong;
    state.set(y);
    system.derivative(t, state, slope);
    return [...slope];
  };
  try {
    return integrate(slopes, () => calls);
  } catch (error) {
    if (error === tooLong) return null;
    throw error;
  }
}

/** Largest error of an unknown, as a part of its scale. */
function errorOf({ exact, scale }: Problem, { y }: Outcome): number {
  return Math.max(...exact.map((value, i) => Math.abs(y[i] - value) / scale[i]));
}

/** The loosest tolerance, from 1e-5 on, at which an integrator reaches an error, with what that takes; null where none does. */
export function loosest(
  integrate: Integrate,
  problem: Problem,
  error: number,
): { readonly tolerance: number; readonly outcome: Outcome; readonly error: number } | null {
  for (let half = 10; half <= 26; half += 1) {
    const tolerance = 10 ** (-0.5 * half);
    const outcome = integrate(problem, tolerance);
    if (outcome === null) continue;
    const reached = errorOf(problem, outcome);
    if (reached <= error) return { tolerance, outcome, error: reached };
  }
  return null;
}
