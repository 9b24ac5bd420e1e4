import type { DenseStep } from "../numeric/denseStep.js";
import { maximise } from "../numeric/roots.js";
import type { Contents } from "./contents.js";
import type { Observer } from "./leg.js";

/** A largest value and when it was reached, s after the failure. */
export interface Peak {
  readonly value: number;
  readonly at: number;
}

/** Finds the largest value of a quantity along a run, on the dense output. */
export interface PeakFinder extends Observer {
  readonly peak: Peak;
}

/** Where inside a step a maximum is looked for: to this part of the step. */
const resolution = 1e-7;

/**
 * Highest temperature of a run, K. Each step is read at its start, middle and end, and searched where the parabola
 * through them rises above what was found before.
 */
export function hottest(contents: Contents): PeakFinder {
  return largest(
    (step, time) => step.component(time, 0),
    (_, state) => state[0],
    contents.reference,
  );
}

/** Fastest rise of a run, K/s. */
export function fastest(contents: Contents): PeakFinder {
  const { system } = contents;
  const state = new Float64Array(system.size);
  const slope = new Float64Array(system.size);
  const at = (time: number, y: Float64Array): number => {
    system.derivative(time, y, slope);
    return slope[0];
  };
  return largest(
    (step, time, clock) => {
      step.evaluate(time, state);
      return at(clock + time, state);
    },
    at,
    0,
  );
}

function largest(
  inside: (step: DenseStep, time: number, clock: number) => number,
  atStart: (time: number, state: Float64Array) => number,
  offset: number,
): PeakFinder {
  let value = Number.NEGATIVE_INFINITY;
  let at = 0;
  let before = 0;
  const offer = (candidate: number, time: number): void => {
    if (candidate > value) {
      value = candidate;
      at = time;
    }
  };
  return {
    get peak() {
      return { value: value + offset, at };
    },
    enter(time, state) {
      before = atStart(time, state);
      offer(before, time);
    },
    step(step, clock) {
      const { start, end } = step;
      const middle = start + 0.5 * (end - start);
      const atMiddle = inside(step, middle, clock);
      const atEnd = inside(step, end, clock);
      if (vertex(before, atMiddle, atEnd) > value) {
        const top = maximise((time) => inside(step, time, clock), start, end, resolution * (end - start));
        offer(top.value, clock + top.x);
      }
      offer(atMiddle, clock + middle);
      offer(atEnd, clock + end);
      before = atEnd;
    },
  };
}

/** Height of the parabola through three equally spaced values where its top lies between them. */
function vertex(first: number, second: number, third: number): number {
  const bend = 2 * (first - 2 * second + third);
  const slope = 4 * second - 3 * first - third;
  const place = -slope / (2 * bend);
  return bend < 0 && place > 0 && place < 1 ? first + 0.5 * slope * place : Number.NEGATIVE_INFINITY;
}
