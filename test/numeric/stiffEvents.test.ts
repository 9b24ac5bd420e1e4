import { describe, expect, it } from "vitest";
import { createIntegrator } from "../../server/numeric/stiff.js";
import type { EventFunction } from "../../server/numeric/stiffEvents.js";
import { createTrajectory } from "../../server/numeric/trajectory.js";
import { oscillator, runaway, runawayStart } from "./systems.js";

const sine = Float64Array.of(0, 1);
const tolerances = { relativeTolerance: 1e-11, absoluteTolerance: 1e-12 };
const integrator = createIntegrator(2);
const onSine = (value: EventFunction["value"], direction: 1 | -1 | 0, terminal = false): EventFunction => ({
  value,
  direction,
  terminal,
});
const run = (end: number, events: EventFunction[], more: object = {}) =>
  integrator.run(oscillator, 0, sine, end, { ...tolerances, events, ...more });

describe("events", () => {
  it("are the zeros of a sine, each in its direction, none at the start", () => {
    const all = run(20, [onSine((_t, y) => y[0], 0)]).events;
    expect(all.length).toBe(6);
    all.forEach((event, i) => {
      expect(event.t).toBeCloseTo(Math.PI * (i + 1), 9);
      expect(event.direction).toBe(i % 2 === 0 ? -1 : 1);
      expect(Math.abs(event.y[0])).toBeLessThan(1e-11);
    });
    expect(run(20, [onSine((_t, y) => y[0], 1)]).events.length).toBe(3);
    expect(run(20, [onSine((_t, y) => y[0], -1)]).events.length).toBe(3);
  });

  it("are located on the dense output to 1e-12 of the time", () => {
    // A function of time alone leaves nothing but the error of the location.
    const at = run(20, [onSine((t) => t - 13.37, 1)]).events[0].t;
    expect(Math.abs(at / 13.37 - 1)).toBeLessThan(1e-12);
  });

  it("that are terminal end the run there, and the ones after them have not taken place", () => {
    const events = [onSine((t) => t - 1.0001, 1), onSine((_t, y) => y[0] - 0.5, 1, true)];
    const result = run(20, [...events, onSine((t) => t - 0.5, 1)]);
    expect(result.status).toBe("event");
    expect(result.t).toBeCloseTo(Math.PI / 6, 10);
    expect(result.y[0]).toBeCloseTo(0.5, 12);
    expect(result.events.map((event) => event.index)).toEqual([2, 1]);
    expect(result.events[1].t).toBe(result.t);
  });

  it("do not take place again in the run continued from one", () => {
    const level = onSine((_t, y) => y[0] - 0.5, 0, true);
    const first = run(20, [level]);
    const second = integrator.run(oscillator, first.t, first.y, 20, {
      ...tolerances,
      events: [level],
      initialStep: first.nextStep,
    });
    expect(second.t).toBeCloseTo((5 * Math.PI) / 6, 9);
    expect(second.events[0].direction).toBe(-1);
  });

  it("are not missed where the quantity comes back within one step", () => {
    // The tops of the sine above 0.9999 last 0.028; a step at this tolerance is about 0.3.
    const loose = { relativeTolerance: 1e-5, absoluteTolerance: 1e-6, initialStep: 0.3 };
    const result = run(8, [onSine((_t, y) => y[0] - 0.9999, 0)], loose);
    expect(result.steps).toBeLessThan(60);
    expect(result.events.map((event) => event.direction)).toEqual([1, -1, 1, -1]);
    const half = Math.acos(0.9999);
    expect(result.events[0].t).toBeCloseTo(Math.PI / 2 - half, 3);
    expect(result.events[1].t).toBeCloseTo(Math.PI / 2 + half, 3);
  });

  it("do not take place where the quantity only comes near", () => {
    expect(run(8, [onSine((_t, y) => y[0] - 1.0001, 0)]).events).toEqual([]);
    expect(run(8, [onSine((_t, y) => 1.0001 - y[0], 0)]).events).toEqual([]);
  });

  it("come in the order of their times within a step", () => {
    const marks = [0.013, 0.011, 0.012].map((mark) => onSine((t) => t - mark, 1));
    const result = run(1, marks, { initialStep: 0.05, relativeTolerance: 1e-4 });
    expect(result.events.map((event) => event.index)).toEqual([1, 2, 0]);
  });

  it("of a quantity that is not a number do not take place, and do not stop the run", () => {
    const result = run(2, [
      onSine((t) => (t < 1 ? -1 : Number.NaN), 1, true),
      onSine(() => Number.NaN, 0, true),
    ]);
    expect(["done", "event"]).toContain(result.status);
    expect(run(2, [onSine(() => Number.NaN, 0, true)]).status).toBe("done");
  });

  it("find the largest rate of a runaway and the time of a temperature", () => {
    const system = runaway();
    const slope = new Float64Array(4);
    const curvature: EventFunction = {
      value: (t, y) => {
        // d2T/dt2 along the solution, from the Jacobian.
        const jacobian = new Float64Array(16);
        system.jacobian(t, y, jacobian);
        system.derivative(t, y, slope);
        return slope.reduce((sum, value, j) => sum + jacobian[j] * value, 0);
      },
      direction: -1,
      terminal: false,
    };
    const level: EventFunction = { value: (_t, y) => y[0] - 450, direction: 1, terminal: false };
    const times = (relativeTolerance: number) =>
      createIntegrator(4)
        .run(system, 0, runawayStart, 86_400, {
          relativeTolerance,
          absoluteTolerance: Float64Array.of(1, 1, 1, 1e-3).map((scale) => scale * relativeTolerance),
          events: [curvature, level],
        })
        // Once all has reacted the curvature is rounding about zero.
        .events.filter((event) => event.y[0] < 660)
        .map((event) => event.t);
    const loose = times(1e-6);
    const tight = times(1e-9);
    expect(tight.length).toBe(3);
    expect(loose.length).toBe(3);
    loose.forEach((t, i) => {
      expect(Math.abs(t / tight[i] - 1)).toBeLessThan(2e-6);
    });
  });
});

describe("a watcher of the steps", () => {
  it("sees them join, can read inside them, and can stop the run", () => {
    let before = 0;
    let worst = 0;
    const result = run(100, [], {
      onStep: (step: { start: number; end: number; component(t: number, i: number): number }) => {
        expect(step.start).toBe(before);
        before = step.end;
        const middle = 0.5 * (step.start + step.end);
        worst = Math.max(worst, Math.abs(step.component(middle, 0) - Math.sin(middle)));
        return step.end > 5;
      },
    });
    expect(result.status).toBe("stopped");
    expect(result.t).toBe(before);
    expect(result.y[0]).toBeCloseTo(Math.sin(result.t), 9);
    expect(worst).toBeLessThan(1e-8);
  });

  it("sees the last step cut at a terminal event", () => {
    let end = 0;
    const result = run(100, [onSine((_t, y) => y[0] - 0.5, 1, true)], {
      onStep: (step: { end: number }) => {
        end = step.end;
      },
    });
    expect(end).toBe(result.t);
  });
});

describe("a trajectory", () => {
  const trajectory = createTrajectory(2, 1);
  run(10, [onSine((_t, y) => y[0] - 0.9, -1, true)], { trajectory });
  const out = new Float64Array(2);

  it("is the solution at any time up to the event that ended it", () => {
    const end = Math.PI - Math.asin(0.9);
    expect(trajectory.start).toBe(0);
    expect(trajectory.end).toBeCloseTo(end, 9);
    for (let i = 0; i <= 1000; i++) {
      const t = (i / 1000) * trajectory.end;
      trajectory.evaluate(t, out);
      expect(out[0]).toBeCloseTo(Math.sin(t), 8);
      expect(trajectory.component(t, 1)).toBe(out[1]);
    }
  });

  it("lists where its steps meet", () => {
    const times = trajectory.times();
    expect(times.length).toBe(trajectory.steps + 1);
    expect([times[0], times[times.length - 1]]).toEqual([0, trajectory.end]);
    expect(times.every((t, i) => i === 0 || t > times[i - 1])).toBe(true);
  });

  it("does not reach beyond its ends, nor anywhere while empty", () => {
    expect(() => trajectory.evaluate(-1e-9, out)).toThrow(RangeError);
    expect(() => trajectory.evaluate(trajectory.end + 1e-9, out)).toThrow(RangeError);
    expect(() => trajectory.component(Number.NaN, 0)).toThrow(RangeError);
    const empty = createTrajectory(2);
    expect(() => empty.evaluate(0, out)).toThrow(RangeError);
    expect([empty.start, empty.end, empty.steps]).toEqual([Number.NaN, Number.NaN, 0]);
    expect(empty.times().length).toBe(0);
  });

  it("can be branched: a copy up to a time is continued from its state there, the original stays", () => {
    const branch = trajectory.copyUntil(1);
    expect(branch.end).toBe(1);
    branch.evaluate(1, out);
    const result = integrator.run(oscillator, 1, out, 3, {
      ...tolerances,
      initialStep: branch.stepLength(1),
      trajectory: branch,
    });
    expect(result.y[0]).toBeCloseTo(Math.sin(3), 8);
    expect(branch.component(2.5, 0)).toBeCloseTo(Math.sin(2.5), 8);
    expect(branch.end).toBe(3);
    expect(trajectory.end).toBeLessThan(3);
    expect(trajectory.component(0.5, 0)).toBe(branch.component(0.5, 0));
  });

  it("can jump where two runs meet: the time belongs to the later, or on request to the earlier", () => {
    const jumping = createTrajectory(2);
    integrator.run(oscillator, 0, sine, 1, { ...tolerances, trajectory: jumping });
    integrator.run(oscillator, 1, Float64Array.of(5, 0), 2, { ...tolerances, trajectory: jumping });
    expect(jumping.component(1, 0)).toBe(5);
    expect(jumping.component(1, 0, true)).toBeCloseTo(Math.sin(1), 9);
    expect(jumping.component(0, 0, true)).toBe(0);
    expect(jumping.component(2, 0)).toBeCloseTo(5 * Math.cos(1), 8);
  });

  it("takes no step that does not continue it", () => {
    const copy = trajectory.copyUntil(1);
    expect(() => integrator.run(oscillator, 2, sine, 3, { ...tolerances, trajectory: copy })).toThrow(
      RangeError,
    );
    const other = createTrajectory(3);
    expect(() => run(1, [], { trajectory: other })).toThrow(RangeError);
  });

  it("forgets what is cut off, and everything when cleared", () => {
    const copy = trajectory.copyUntil(1);
    copy.truncate(0.5);
    expect(copy.end).toBe(0.5);
    copy.truncate(0);
    expect(copy.steps).toBe(0);
    const cleared = trajectory.copyUntil(1);
    cleared.clear();
    expect(cleared.steps).toBe(0);
  });
});
