import { createStep, type DenseStep, END } from "./denseStep.js";
import { RODAS5P } from "./rosenbrockCoefficients.js";
import { createRosenbrockStep, type StiffSystem } from "./rosenbrockStep.js";
import { createEventScan, type EventFunction, type EventRecord } from "./stiffEvents.js";
import type { Trajectory } from "./trajectory.js";

export interface IntegratorOptions {
  /** Largest estimated error of a step is absolute + relative x size, as a root mean square over the unknowns. */
  readonly relativeTolerance: number;
  /** One for all unknowns, or one each. */
  readonly absoluteTolerance: Float64Array | number;
  /** First step to try; estimated where left out. `nextStep` of the run before is good for a continuation. */
  readonly initialStep?: number;
  readonly maxStep?: number;
  /** Steps attempted, accepted or not; 100,000 unless said. */
  readonly maxSteps?: number;
  readonly events?: readonly EventFunction[];
  /** After each accepted step, cut at a terminal event; true stops the run at its end. The step is reused. */
  readonly onStep?: (step: DenseStep) => boolean | undefined;
  /** Accepted steps are added to it. */
  readonly trajectory?: Trajectory;
}

export interface IntegrationResult {
  /**
   * done: t is the end asked for. event: a terminal event. stopped: by `onStep`. tooManySteps, stepTooSmall:
   * the run could not be finished, t and y are where it came to, and nothing may be concluded about later.
   */
  readonly status: "done" | "event" | "stopped" | "tooManySteps" | "stepTooSmall";
  readonly t: number;
  readonly y: Float64Array;
  /** Accepted and repeated steps. */
  readonly steps: number;
  readonly rejected: number;
  /** Calls of `derivative`; `jacobian` is called once for every accepted step. */
  readonly evaluations: number;
  readonly events: readonly EventRecord[];
  /** Step that would have come next, for `initialStep` of a continuation. */
  readonly nextStep: number;
}

/** Reusable workspace for systems of one size. Not to be used by two runs at once. */
export interface Integrator {
  readonly size: number;
  /**
   * Integrates from (t0, y0) to t1 >= t0. Where f jumps at a known time, end one run there and start another.
   *
   * @throws RangeError where the arguments make no run; the outcome of a run is always a status
   */
  run(
    system: StiffSystem,
    t0: number,
    y0: Float64Array,
    t1: number,
    options: IntegratorOptions,
  ): IntegrationResult;
}

const NO_EVENTS: readonly EventFunction[] = [];
const SAFETY = 0.9;
const LARGEST_GROWTH = 6;
const LARGEST_CUT = 5;
/** After a stage that is not finite nothing is known but that the step was too long. */
const BLIND_CUT = 10;

/**
 * An integrator for stiff systems of a few unknowns: Rodas5P with the predictive step-size controller of
 * Gustafsson, events located on the dense output. A step allocates nothing; events and results do.
 *
 * @param size number of unknowns
 * @see Steinebach 2023, BIT Numer. Math. 63:27; Hairer & Wanner 1996, Solving Ordinary Differential
 * Equations II, IV.7 (Rosenbrock methods) and IV.8 (step-size control)
 */
export function createIntegrator(size: number): Integrator {
  const method = createRosenbrockStep(RODAS5P, size);
  const { y, next, error, slope } = method;
  const step = createStep(size);
  const absolute = new Float64Array(size);
  const exponent = 1 / (RODAS5P.embeddedOrder + 1);

  /** Root mean square of `values` in units of the tolerance. */
  function norm(values: Float64Array, relative: number): number {
    let sum = 0;
    for (let i = 0; i < size; i++) {
      const scale = absolute[i] + relative * Math.max(Math.abs(y[i]), Math.abs(next[i]));
      const ratio = values[i] === 0 ? 0 : values[i] / scale;
      sum += ratio * ratio;
    }
    return Math.sqrt(sum / size);
  }

  /** First step such that an explicit Euler step would err by about a tenth of the tolerance. */
  function firstStep(system: StiffSystem, t: number, span: number, relative: number): number {
    next.set(y);
    const d0 = norm(y, relative);
    const d1 = norm(slope, relative);
    const trial = Math.min(d0 < 1e-5 || d1 < 1e-5 ? 1e-6 * span : 0.01 * (d0 / d1), span);
    for (let i = 0; i < size; i++) next[i] = y[i] + trial * slope[i];
    system.derivative(t + trial, next, error);
    next.set(y);
    for (let i = 0; i < size; i++) error[i] -= slope[i];
    const d2 = norm(error, relative) / trial;
    const guess = (0.01 / Math.max(d1, d2)) ** exponent;
    return Number.isFinite(guess) && guess > 0 ? Math.min(100 * trial, guess) : trial;
  }

  function run(
    system: StiffSystem,
    t0: number,
    y0: Float64Array,
    t1: number,
    options: IntegratorOptions,
  ): IntegrationResult {
    const relative = options.relativeTolerance;
    if (typeof options.absoluteTolerance === "number") absolute.fill(options.absoluteTolerance);
    else absolute.set(options.absoluteTolerance);
    refuseNonsense(system, size, t0, y0, t1, relative, absolute);
    const span = t1 - t0;
    const maxStep = options.maxStep ?? Number.POSITIVE_INFINITY;
    const maxSteps = options.maxSteps ?? 100_000;
    const { onStep, trajectory, events = NO_EVENTS } = options;
    const scan = events.length > 0 ? createEventScan(events, size) : undefined;
    const dense = scan !== undefined || onStep !== undefined || trajectory !== undefined;
    const found: EventRecord[] = [];
    y.set(y0);
    scan?.begin(t0, y);
    method.linearise(system, t0);

    let t = t0;
    let status: IntegrationResult["status"] = "done";
    let evaluations = 1;
    let steps = 0;
    let rejected = 0;
    let repeated = false;
    let errorBefore = 1;
    let lengthBefore = 0;
    let h = options.initialStep ?? 0;
    if (!(h > 0) && span > 0) {
      h = firstStep(system, t, span, relative);
      evaluations++;
    }
    let stoppedState: Float64Array | undefined;

    while (t < t1) {
      h = Math.min(h, maxStep);
      if (steps + rejected >= maxSteps) {
        status = "tooManySteps";
        break;
      }
      // Written so that a step that is not a number ends the run too.
      if (!(h > 4 * Number.EPSILON * Math.abs(t) && h > 1e-300)) {
        status = "stepTooSmall";
        break;
      }
      const last = t + 1.0001 * h >= t1;
      const length = last ? t1 - t : h;
      const finite = method.attempt(system, t, length);
      evaluations += RODAS5P.stages - 1;
      const err = finite ? norm(error, relative) : Number.POSITIVE_INFINITY;
      if (!(err <= 1)) {
        rejected++;
        repeated = true;
        h =
          length /
          (err < Number.POSITIVE_INFINITY ? Math.min(LARGEST_CUT, err ** exponent / SAFETY) : BLIND_CUT);
        continue;
      }

      steps++;
      const end = last ? t1 : t + length;
      // An error that grew since the last step is expected to grow again.
      let cut = err ** exponent / SAFETY;
      if (lengthBefore > 0) {
        const predicted = ((lengthBefore / length) * ((err * err) / errorBefore) ** exponent) / SAFETY;
        if (predicted > cut) cut = predicted;
      }
      cut = Math.min(LARGEST_CUT, Math.max(1 / LARGEST_GROWTH, cut));
      errorBefore = Math.max(0.01, err);
      lengthBefore = length;
      const proposed = repeated ? Math.min(length, length / cut) : length / cut;
      repeated = false;
      // A step shortened to meet the end says nothing against the one that was planned.
      h = last ? Math.max(h, proposed) : proposed;

      if (dense) {
        method.record(t, end, length, step.record);
        let terminal = false;
        if (scan !== undefined) {
          const here = scan.scan(step);
          for (let i = 0; i < here.length; i++) {
            found.push(here[i]);
            terminal = events[here[i].index].terminal;
          }
          if (terminal) {
            const event = here[here.length - 1];
            step.record[END] = event.t;
            stoppedState = event.y;
            status = "event";
          }
        }
        trajectory?.append(step);
        const stop = onStep?.(step) === true;
        if (terminal) {
          t = step.end;
          break;
        }
        if (stop) status = "stopped";
      }
      t = end;
      y.set(next);
      if (status === "stopped") break;
      if (t < t1) {
        method.linearise(system, t);
        evaluations++;
      }
    }
    return {
      status,
      t,
      y: (stoppedState ?? y).slice(),
      steps,
      rejected,
      evaluations,
      events: found,
      nextStep: h,
    };
  }

  return { size, run };
}

function refuseNonsense(
  system: StiffSystem,
  size: number,
  t0: number,
  y0: Float64Array,
  t1: number,
  relative: number,
  absolute: Float64Array,
): void {
  if (system.size !== size || y0.length !== size) {
    throw new RangeError(`An integrator for ${size} unknowns, not for ${system.size} and ${y0.length}`);
  }
  if (!(Number.isFinite(t0) && Number.isFinite(t1) && t1 >= t0)) {
    throw new RangeError(`Cannot integrate from ${t0} to ${t1}`);
  }
  if (!(relative >= 0 && absolute.every((tolerance) => tolerance >= 0 && relative + tolerance > 0))) {
    throw new RangeError("Tolerances must be 0 or larger, and not both 0");
  }
}
