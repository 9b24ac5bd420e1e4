import { describe, expect, it } from "vitest";
import { createStep } from "../../server/numeric/denseStep.js";
import { RODAS5P } from "../../server/numeric/rosenbrockCoefficients.js";
import { createRosenbrockStep, type StiffSystem } from "../../server/numeric/rosenbrockStep.js";
import { exponentials, jacobianError, protheroRobinson, runaway, runawayStart } from "./systems.js";

/** Largest errors over equal steps: at the ends, of the embedded result, and inside a step. */
function march(
  system: StiffSystem,
  exact: (t: number, i: number) => number,
  end: number,
  steps: number,
  from = 0,
): { end: number; embedded: number; inside: number } {
  const method = createRosenbrockStep(RODAS5P, system.size);
  const step = createStep(system.size);
  const h = (end - from) / steps;
  const inside = new Float64Array(system.size);
  const errors = { end: 0, embedded: 0, inside: 0 };
  for (let i = 0; i < system.size; i++) method.y[i] = exact(from, i);
  for (let k = 0; k < steps; k++) {
    const t = from + k * h;
    method.linearise(system, t);
    expect(method.attempt(system, t, h)).toBe(true);
    method.record(t, t + h, h, step.record);
    for (const theta of [0.2, 0.5, 0.8]) {
      step.evaluate(t + theta * h, inside);
      for (let i = 0; i < system.size; i++) {
        errors.inside = Math.max(errors.inside, Math.abs(inside[i] - exact(t + theta * h, i)));
      }
    }
    for (let i = 0; i < system.size; i++) {
      errors.embedded = Math.max(errors.embedded, Math.abs(method.error[i]));
      errors.end = Math.max(errors.end, Math.abs(method.next[i] - exact(t + h, i)));
    }
    method.y.set(method.next);
  }
  return errors;
}

const exactExponentials = (t: number, i: number) => Math.exp(i === 0 ? Math.sin(t) : Math.cos(t));

describe("steps of equal length", () => {
  const coarse = march(exponentials, exactExponentials, 2, 32);
  const fine = march(exponentials, exactExponentials, 2, 64);

  it("converge with order 5 on a nonlinear problem that depends on time", () => {
    expect(Math.log2(coarse.end / fine.end)).toBeGreaterThan(4.7);
    expect(Math.log2(coarse.end / fine.end)).toBeLessThan(5.6);
    expect(fine.end).toBeLessThan(1e-8);
  });

  it("carry an error estimate of order 5, that of an embedded result of order 4", () => {
    expect(Math.log2(coarse.embedded / fine.embedded)).toBeGreaterThan(4.5);
    expect(Math.log2(coarse.embedded / fine.embedded)).toBeLessThan(5.6);
  });

  it("are interpolated with order 4 or better", () => {
    expect(Math.log2(coarse.inside / fine.inside)).toBeGreaterThan(3.8);
    expect(fine.inside).toBeLessThan(1e-7);
  });

  it("need the time derivative: without it the order is lost", () => {
    const { size, derivative, jacobian } = exponentials;
    const without = { size, derivative, jacobian };
    const ratio = march(without, exactExponentials, 2, 32).end / march(without, exactExponentials, 2, 64).end;
    expect(Math.log2(ratio)).toBeLessThan(4);
  });

  it("keep about order 4 on the problem of Prothero & Robinson, whatever its stiffness", () => {
    const worst = (steps: number) =>
      Math.max(
        ...[-10, -1e2, -1e3, -1e4, -1e6].map((l) => march(protheroRobinson(l), Math.sin, 2, steps).end),
      );
    expect(worst(10)).toBeLessThan(1e-6);
    expect(Math.log2(worst(10) / worst(80)) / 3).toBeGreaterThan(3.8);
  });

  it("damp a stiff component in one step", () => {
    const decay: StiffSystem = {
      size: 1,
      derivative: (_t, y, out) => {
        out[0] = -1e12 * y[0];
      },
      jacobian: (_t, _y, out) => {
        out[0] = -1e12;
      },
    };
    const method = createRosenbrockStep(RODAS5P, 1);
    method.y[0] = 1;
    method.linearise(decay, 0);
    expect(method.attempt(decay, 0, 1)).toBe(true);
    expect(Math.abs(method.next[0])).toBeLessThan(1e-9);
  });

  it("report a stage that is not finite, and a singular matrix", () => {
    const method = createRosenbrockStep(RODAS5P, 1);
    const root: StiffSystem = {
      size: 1,
      derivative: (_t, y, out) => {
        out[0] = -Math.sqrt(y[0]);
      },
      jacobian: (_t, y, out) => {
        out[0] = -0.5 / Math.sqrt(y[0]);
      },
    };
    method.y[0] = 1e-4;
    method.linearise(root, 0);
    expect(method.attempt(root, 0, 10)).toBe(false);
    expect(method.attempt(root, 0, 1e-6)).toBe(true);

    const growth: StiffSystem = {
      size: 1,
      derivative: (_t, y, out) => {
        out[0] = y[0];
      },
      jacobian: (_t, _y, out) => {
        out[0] = 1 / (0.5 * RODAS5P.gamma);
      },
    };
    method.y[0] = 1;
    method.linearise(growth, 0);
    expect(method.attempt(growth, 0, 0.5)).toBe(false);
  });

  it("meet their start, and their end, exactly in the dense output", () => {
    const method = createRosenbrockStep(RODAS5P, 4);
    const step = createStep(4);
    const state = new Float64Array(4);
    method.y.set(runawayStart);
    method.linearise(runaway(), 5);
    method.attempt(runaway(), 5, 100);
    method.record(5, 105, 100, step.record);
    step.evaluate(5, state);
    expect(state).toEqual(method.y);
    step.evaluate(105, state);
    expect(state).toEqual(method.next);
    expect(step.component(105, 0)).toBe(method.next[0]);
    expect([step.start, step.end]).toEqual([5, 105]);
  });
});

describe("the invented runaway of these tests", () => {
  it("has the Jacobian of its derivative", () => {
    for (const state of [runawayStart, Float64Array.of(420, 1000, 1200, 0.2)]) {
      expect(jacobianError(runaway(), 0, state)).toBeLessThan(1e-6);
    }
  });
});
