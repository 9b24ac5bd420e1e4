import {
  END,
  evaluateComponent,
  evaluateRecord,
  LENGTH,
  recordLength,
  START,
  type StoredStep,
} from "./denseStep.js";

/**
 * The steps of one or several consecutive integrations, kept so that the solution can be read at any
 * time later, and so that another integration can branch off anywhere.
 *
 * Where two runs meet with a jump in the state, the time belongs to the later one, unless `before` is asked.
 */
export interface Trajectory {
  readonly size: number;
  /** Number of steps stored. */
  readonly steps: number;
  /** First and last time; NaN while empty. */
  readonly start: number;
  readonly end: number;
  /**
   * Writes the state at t to `out`.
   *
   * @param before at a time where two steps meet, read the earlier one
   * @throws RangeError where t lies outside [start, end]
   */
  evaluate(t: number, out: Float64Array, before?: boolean): void;
  /** One unknown at t; otherwise as `evaluate`. */
  component(t: number, index: number, before?: boolean): number;
  /** Length of the step taken at t: a good first step for a run that branches off there. */
  stepLength(t: number): number;
  /** Start of the first step and ends of all steps: where the solution bends, they lie close. */
  times(): Float64Array;
  /** Adds a step that starts where the last one ended. Called by the integrator. */
  append(step: StoredStep): void;
  /** Forgets everything after t. */
  truncate(t: number): void;
  /** An independent copy of everything up to t. */
  copyUntil(t: number): Trajectory;
  /** Forgets everything, keeps the memory. */
  clear(): void;
}

/**
 * An empty trajectory.
 *
 * @param size number of unknowns
 * @param capacity steps to make room for at first; it grows by doubling
 */
export function createTrajectory(size: number, capacity = 64): Trajectory {
  return trajectoryOf(size, new Float64Array(Math.max(1, capacity) * recordLength(size)), 0);
}

function trajectoryOf(size: number, initialRecords: Float64Array, initialSteps: number): Trajectory {
  const stride = recordLength(size);
  let records = initialRecords;
  let steps = initialSteps;

  /** Offset of the step that holds t. */
  function offsetAt(t: number, before: boolean): number {
    if (!(steps > 0 && t >= records[START] && t <= records[(steps - 1) * stride + END])) {
      throw new RangeError(`The trajectory does not reach ${t}`);
    }
    let low = 0;
    let high = steps - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      const start = records[middle * stride + START];
      if (before ? start < t : start <= t) low = middle;
      else high = middle - 1;
    }
    return low * stride;
  }

  function reserve(count: number): void {
    if (count * stride <= records.length) return;
    const larger = new Float64Array(Math.max(count * stride, 2 * records.length));
    larger.set(records);
    records = larger;
  }

  const trajectory: Trajectory = {
    size,
    get steps() {
      return steps;
    },
    get start() {
      return steps === 0 ? Number.NaN : records[START];
    },
    get end() {
      return steps === 0 ? Number.NaN : records[(steps - 1) * stride + END];
    },
    evaluate(t, out, before = false) {
      evaluateRecord(records, offsetAt(t, before), size, t, out);
    },
    component(t, index, before = false) {
      return evaluateComponent(records, offsetAt(t, before), size, t, index);
    },
    stepLength: (t) => records[offsetAt(t, false) + LENGTH],
    times() {
      const times = new Float64Array(steps === 0 ? 0 : steps + 1);
      if (steps > 0) times[0] = records[START];
      for (let i = 0; i < steps; i++) times[i + 1] = records[i * stride + END];
      return times;
    },
    append(step) {
      if (step.size !== size) throw new RangeError(`A step of ${step.size} unknowns, not ${size}`);
      if (steps > 0 && step.start !== trajectory.end) {
        throw new RangeError(`A step from ${step.start} does not continue a trajectory to ${trajectory.end}`);
      }
      reserve(steps + 1);
      records.set(step.record, steps * stride);
      steps++;
    },
    truncate(t) {
      while (steps > 0 && records[(steps - 1) * stride + START] >= t) steps--;
      const last = (steps - 1) * stride + END;
      if (steps > 0 && records[last] > t) records[last] = t;
    },
    copyUntil(t) {
      const copy = trajectoryOf(size, records.slice(), steps);
      copy.truncate(t);
      return copy;
    },
    clear() {
      steps = 0;
    },
  };
  return trajectory;
}
