import { END, LENGTH, START, STATES } from "./denseStep.js";
import { factorise, solveFactored } from "./linearSystem.js";
import type { RosenbrockCoefficients } from "./rosenbrockCoefficients.js";

/** A system of ordinary differential equations y' = f(t, y), possibly stiff. */
export interface StiffSystem {
  readonly size: number;
  /** Writes f(t, y) to `out`. Must not keep or change `y`. A value that is not finite shortens the step. */
  derivative(t: number, y: Float64Array, out: Float64Array): void;
  /**
   * Writes df_i/dy_j to out[i * size + j], every entry. It must be exact: the order of the method rests on it.
   */
  jacobian(t: number, y: Float64Array, out: Float64Array): void;
  /** Writes df/dt to `out`. To be left out only where f does not depend on t. */
  timeDerivative?(t: number, y: Float64Array, out: Float64Array): void;
}

/** One attempt at a time: arrays for n unknowns, allocated once. */
export interface RosenbrockStep {
  /** State at the start of the step; the caller writes it. */
  readonly y: Float64Array;
  /** State at its end, after `attempt`. */
  readonly next: Float64Array;
  /** Estimate of the error of `next`, after `attempt`: a view into the stages. */
  readonly error: Float64Array;
  /** f at the start, after `linearise`. */
  readonly slope: Float64Array;
  /** Evaluates f, its Jacobian and df/dt at (t, y): once per step, kept when a step is repeated shorter. */
  linearise(system: StiffSystem, t: number): void;
  /** Takes a step of length h. Returns false where a stage is not finite or the matrix is singular. */
  attempt(system: StiffSystem, t: number, h: number): boolean;
  /** Writes the step just attempted in the form of denseStep.ts. */
  record(t: number, end: number, h: number, record: Float64Array): void;
}

/**
 * A step of a Rosenbrock method for n unknowns, by the formulas above `RosenbrockCoefficients`.
 *
 * @see Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.7, eq. (7.25)
 */
export function createRosenbrockStep(method: RosenbrockCoefficients, n: number): RosenbrockStep {
  const { stages, gamma, a, c, nodes, slopes, h: dense } = method;
  const y = new Float64Array(n);
  const next = new Float64Array(n);
  const state = new Float64Array(n);
  const slope = new Float64Array(n);
  const stageSlope = new Float64Array(n);
  const timeSlope = new Float64Array(n);
  const jacobian = new Float64Array(n * n);
  const factors = new Float64Array(n * n);
  const pivots = new Int32Array(n);
  const u = new Float64Array(stages * n);
  const lastStage = (stages - 1) * n;

  function linearise(system: StiffSystem, t: number): void {
    system.derivative(t, y, slope);
    system.jacobian(t, y, jacobian);
    if (system.timeDerivative) system.timeDerivative(t, y, timeSlope);
    else timeSlope.fill(0);
  }

  function attempt(system: StiffSystem, t: number, h: number): boolean {
    const perStep = 1 / h;
    const diagonal = perStep / gamma;
    for (let i = 0; i < n * n; i++) factors[i] = -jacobian[i];
    for (let i = 0; i < n; i++) factors[i * n + i] += diagonal;
    if (!factorise(factors, n, pivots)) return false;
    for (let stage = 0; stage < stages; stage++) {
      const row = stage * stages;
      const at = stage * n;
      let stageF = slope;
      if (stage > 0) {
        for (let i = 0; i < n; i++) {
          let sum = y[i];
          for (let j = 0; j < stage; j++) sum += a[row + j] * u[j * n + i];
          state[i] = sum;
        }
        system.derivative(t + nodes[stage] * h, state, stageSlope);
        stageF = stageSlope;
      }
      const timeWeight = slopes[stage] * h;
      for (let i = 0; i < n; i++) {
        let sum = 0;
        for (let j = 0; j < stage; j++) sum += c[row + j] * u[j * n + i];
        u[at + i] = stageF[i] + sum * perStep + timeWeight * timeSlope[i];
      }
      solveFactored(factors, n, pivots, u, at);
      let total = 0;
      for (let i = 0; i < n; i++) total += u[at + i];
      if (total - total !== 0) return false;
    }
    for (let i = 0; i < n; i++) next[i] = state[i] + u[lastStage + i];
    return true;
  }

  function record(t: number, end: number, h: number, out: Float64Array): void {
    out[START] = t;
    out[END] = end;
    out[LENGTH] = h;
    for (let i = 0; i < n; i++) {
      out[STATES + i] = y[i];
      out[STATES + n + i] = next[i];
      for (let row = 0; row < 3; row++) {
        let sum = 0;
        for (let j = 0; j < stages; j++) sum += dense[row * stages + j] * u[j * n + i];
        out[STATES + (2 + row) * n + i] = sum;
      }
    }
  }

  return { y, next, error: u.subarray(lastStage, lastStage + n), slope, linearise, attempt, record };
}
