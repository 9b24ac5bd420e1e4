/** One accepted step of an integration: the solution at any time inside it. */
export interface DenseStep {
  readonly size: number;
  readonly start: number;
  /** End of the part that counts: earlier than the end of the step proper where an event cut it. */
  readonly end: number;
  /** Writes the state at t, start <= t <= end, to `out`. Outside it extrapolates. */
  evaluate(t: number, out: Float64Array): void;
  /** One unknown at t. */
  component(t: number, index: number): number;
}

/*
 * A step is stored flat, so that it can be copied to a trajectory in one move:
 * [start, end, length, y at the start (n), y at start + length (n), three rows of the dense output (n each)].
 */

/** Place of the start of a stored step. */
export const START = 0;
/** Place of the end of the part that counts. */
export const END = 1;
/** Place of the length of the step proper. */
export const LENGTH = 2;
/** Place of the first state. */
export const STATES = 3;

/** Numbers that one stored step takes, for n unknowns. */
export function recordLength(n: number): number {
  return STATES + 5 * n;
}

/**
 * State inside a stored step, y(start + theta length) =
 * (1 - theta) y0 + theta (y1 + (1 - theta)(p1 + theta (p2 + theta p3))).
 *
 * @param records holds the step from `offset` on
 * @see Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.7, continuous output
 */
export function evaluateRecord(
  records: Float64Array,
  offset: number,
  n: number,
  t: number,
  out: Float64Array,
): void {
  const theta = (t - records[offset + START]) / records[offset + LENGTH];
  for (let i = 0; i < n; i++) out[i] = atFraction(records, offset + STATES + i, n, theta);
}

/** One unknown inside a stored step; see `evaluateRecord`. */
export function evaluateComponent(
  records: Float64Array,
  offset: number,
  n: number,
  t: number,
  index: number,
): number {
  const theta = (t - records[offset + START]) / records[offset + LENGTH];
  return atFraction(records, offset + STATES + index, n, theta);
}

function atFraction(records: Float64Array, at: number, n: number, theta: number): number {
  const rest = 1 - theta;
  const bend = records[at + 2 * n] + theta * (records[at + 3 * n] + theta * records[at + 4 * n]);
  return rest * records[at] + theta * (records[at + n] + rest * bend);
}

/** A step whose content is written by the integrator, to `record`. */
export interface StoredStep extends DenseStep {
  readonly record: Float64Array;
}

/** An empty step for n unknowns. */
export function createStep(size: number): StoredStep {
  const record = new Float64Array(recordLength(size));
  return {
    size,
    record,
    get start() {
      return record[START];
    },
    get end() {
      return record[END];
    },
    evaluate: (t, out) => evaluateRecord(record, 0, size, t, out),
    component: (t, index) => evaluateComponent(record, 0, size, t, index),
  };
}
