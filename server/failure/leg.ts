import { createStep, type DenseStep, END, LENGTH, START, STATES } from "../numeric/denseStep.js";
import type { StiffSystem } from "../numeric/rosenbrockStep.js";
import type { IntegrationResult, Integrator } from "../numeric/stiff.js";
import type { EventFunction } from "../numeric/stiffEvents.js";
import type { Trajectory } from "../numeric/trajectory.js";

/** Watches a run: `enter` at the start of every leg, `step` after every step of it. */
export interface Observer {
  enter(time: number, state: Float64Array): void;
  /** @param clock time after the failure at which the step's own times begin, s */
  step(step: DenseStep, clock: number): void;
}

/** How a leg is integrated and who watches. */
export interface LegOptions {
  readonly relativeTolerance: number;
  readonly absoluteTolerance: Float64Array;
  readonly events: readonly EventFunction[];
  readonly observer: Observer | undefined;
  readonly trajectory: Trajectory | undefined;
}

/** Where a leg came to. */
export interface LegEnd {
  readonly time: number;
  readonly state: Float64Array;
  /** done: as far as asked. event: stopped by a terminal one. failed: the integrator gave up there. */
  readonly status: "done" | "event" | "failed";
  readonly events: readonly { readonly index: number; readonly time: number }[];
}

/** Steps after which a leg is given up; a run through both reactions takes a few hundred. */
const mostSteps = 20_000;

/** Length of a passage with a clock of its own, as a part of the time, at least so many s, and how often it is tried. */
const passage = { part: 1e-9, least: 1e-9, growth: 10, most: 8 } as const;

/**
 * Integrates a stretch with constant conditions. A violent runaway can be over in less time than the clock can tell
 * (1e-13 s after ten minutes): there a short stretch is integrated with a clock of its own, kept in the trajectory as
 * one straight step.
 *
 * @param system as it acts in this leg
 * @param from s after the failure
 * @param until s after the failure
 */
export function integrateLeg(
  system: StiffSystem,
  integrator: Integrator,
  from: number,
  start: Float64Array,
  until: number,
  options: LegOptions,
): LegEnd {
  const events: { index: number; time: number }[] = [];
  let time = from;
  let state = start;
  const take = (result: IntegrationResult, clock: number): IntegrationResult => {
    for (const event of result.events) events.push({ index: event.index, time: clock + event.t });
    time = clock + result.t;
    state = result.y;
    return result;
  };
  let length = 0;
  for (let passages = 0; ; passages += 1) {
    const { status } = take(run(system, integrator, time, state, until, options, 0), 0);
    if (status === "done" || status === "event") return { time, state, status, events };
    if (status !== "stepTooSmall" || passages === passage.most)
      return { time, state, status: "failed", events };
    length = Math.max(passage.part * time, passage.least, passage.growth * length);
    const clock = time;
    const before = state;
    const end = Math.min(length, until - clock);
    const passed = take(run(shifted(system, clock), integrator, 0, state, end, options, clock), clock);
    if (options.trajectory !== undefined) bridge(options.trajectory, clock, before, time, state);
    if (passed.status === "event") return { time, state, status: "event", events };
    if (passed.status !== "done") return { time, state, status: "failed", events };
  }
}

function run(
  system: StiffSystem,
  integrator: Integrator,
  from: number,
  state: Float64Array,
  until: number,
  { relativeTolerance, absoluteTolerance, events, observer, trajectory }: LegOptions,
  clock: number,
): IntegrationResult {
  return integrator.run(system, from, state, until, {
    relativeTolerance,
    absoluteTolerance,
    events,
    maxSteps: mostSteps,
    ...(observer === undefined
      ? {}
      : {
          onStep(step: DenseStep): undefined {
            observer.step(step, clock);
          },
        }),
    ...(trajectory === undefined || clock > 0 ? {} : { trajectory }),
  });
}

/** The same system with a clock that begins at 0. */
function shifted(system: StiffSystem, clock: number): StiffSystem {
  return {
    size: system.size,
    derivative: (time, y, out) => system.derivative(clock + time, y, out),
    jacobian: (time, y, out) => system.jacobian(clock + time, y, out),
    timeDerivative: (time, y, out) => system.timeDerivative?.(clock + time, y, out),
  };
}

/** One straight step of a trajectory between two states. */
function bridge(
  trajectory: Trajectory,
  start: number,
  before: Float64Array,
  end: number,
  after: Float64Array,
): void {
  const step = createStep(before.length);
  step.record[START] = start;
  step.record[END] = end;
  step.record[LENGTH] = end - start;
  step.record.set(before, STATES);
  step.record.set(after, STATES + before.length);
  trajectory.append(step);
}
