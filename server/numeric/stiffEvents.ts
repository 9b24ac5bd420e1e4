import type { StoredStep } from "./denseStep.js";
import { findCrossing, maximise } from "./roots.js";

/** A quantity whose change of sign along the solution is an event. */
export interface EventFunction {
  /** Must be continuous within a run. Called with a scratch array: do not keep `y`. */
  value(t: number, y: Float64Array): number;
  /** 1: from negative to zero or positive; -1: from positive to zero or negative; 0: either. */
  readonly direction: 1 | -1 | 0;
  /** Whether the integration ends there. */
  readonly terminal: boolean;
}

/** An event that took place. */
export interface EventRecord {
  /** Which of the event functions. */
  readonly index: number;
  readonly t: number;
  readonly y: Float64Array;
  /** Whether the quantity rose or fell through zero. */
  readonly direction: 1 | -1;
}

/** Looks for events step by step; holds the values at the end of the step before. */
export interface EventScan {
  /** Takes the values at the start of a run. A quantity that is zero here has not crossed. */
  begin(t: number, y: Float64Array): void;
  /**
   * Events inside an accepted step, in order of time, none after the first terminal one.
   * The array is reused by the next call.
   */
  scan(step: StoredStep): readonly EventRecord[];
}

/** Times are located to this fraction of a step, or to what doubles resolve. */
const TIME_TOLERANCE = 1e-13;

/**
 * Locates the zeros of event functions on the dense output. The time returned lies on the far side of
 * the crossing, so a run continued from there does not meet it again.
 *
 * Signs are compared at the start, the middle and the end of a step. Where all three agree but the
 * parabola through them comes close to zero inside the step, the extremum itself is sought: an
 * excursion shorter than a step, or a touch, is not missed.
 */
export function createEventScan(events: readonly EventFunction[], size: number): EventScan {
  const y = new Float64Array(size);
  const before = new Float64Array(events.length);
  const found: EventRecord[] = [];

  function valueAt(event: EventFunction, step: StoredStep, t: number): number {
    step.evaluate(t, y);
    const value = event.value(t, y);
    return Number.isNaN(value) ? 0 : value;
  }

  function locate(index: number, step: StoredStep, lo: number, hi: number, rising: boolean): void {
    const event = events[index];
    if (event.direction === (rising ? -1 : 1)) return;
    const tolerance = TIME_TOLERANCE * (step.end - step.start);
    const t = findCrossing((at) => valueAt(event, step, at), lo, hi, { tolerance }).after;
    step.evaluate(t, y);
    found.push({ index, t, y: y.slice(), direction: rising ? 1 : -1 });
  }

  function scanOne(index: number, step: StoredStep): void {
    const { start, end } = step;
    const event = events[index];
    const middle = start + 0.5 * (end - start);
    const atStart = before[index];
    const atMiddle = valueAt(event, step, middle);
    const atEnd = valueAt(event, step, end);
    before[index] = atEnd;
    const firstHalf = crosses(atStart, atMiddle);
    const secondHalf = crosses(atMiddle, atEnd);
    if (firstHalf) locate(index, step, start, middle, atStart < 0);
    if (secondHalf) locate(index, step, middle, end, atMiddle < 0);
    if (firstHalf || secondHalf || !mayTouch(atStart, atMiddle, atEnd)) return;
    const sign = atStart < 0 ? 1 : -1;
    const closest = maximise((t) => sign * valueAt(event, step, t), start, end, 1e-9 * (end - start));
    if (closest.value >= 0) {
      locate(index, step, start, closest.x, sign > 0);
      if (closest.value > 0) locate(index, step, closest.x, end, sign < 0);
    }
  }

  return {
    begin(t, state) {
      events.forEach((event, index) => {
        const value = event.value(t, state);
        before[index] = Number.isNaN(value) ? 0 : value;
      });
    },
    scan(step) {
      found.length = 0;
      for (let index = 0; index < events.length; index++) scanOne(index, step);
      if (found.length > 1) found.sort((one, other) => one.t - other.t || one.index - other.index);
      const last = found.findIndex((record) => events[record.index].terminal);
      if (last >= 0) found.length = last + 1;
      return found;
    },
  };
}

/** From a strict sign to zero or the other sign. */
function crosses(from: number, to: number): boolean {
  return (from < 0 && to >= 0) || (from > 0 && to <= 0);
}

/** Whether the parabola through three values of one sign comes within a quarter of the smaller end of zero. */
function mayTouch(atStart: number, atMiddle: number, atEnd: number): boolean {
  if (!((atStart < 0 && atEnd < 0) || (atStart > 0 && atEnd > 0))) return false;
  const curvature = 2 * (atStart - 2 * atMiddle + atEnd);
  const slope = -3 * atStart + 4 * atMiddle - atEnd;
  const place = -slope / (2 * curvature);
  if (!(place > 0 && place < 1)) return false;
  const extremum = atStart + 0.5 * slope * place;
  const smaller = Math.min(Math.abs(atStart), Math.abs(atEnd));
  return extremum * Math.sign(atStart) < 0.25 * smaller;
}
