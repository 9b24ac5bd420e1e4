import { describe, expect, it } from "vitest";
import type { StiffSystem } from "../../server/numeric/rosenbrockStep.js";
import { createIntegrator } from "../../server/numeric/stiff.js";
import { integrateWithOdex } from "../published/odex.js";
import { oscillator, robertson, runaway, runawayStart, vanDerPol } from "./systems.js";

const closeTo = (found: Float64Array, reference: readonly number[], relative: number) => {
  reference.forEach((value, i) => {
    expect(Math.abs(found[i] / value - 1)).toBeLessThan(relative);
  });
};

/** y' = y^2: infinite at t = 1 from y(0) = 1. */
const explosion: StiffSystem = {
  size: 1,
  derivative: (_t, y, out) => {
    out[0] = y[0] * y[0];
  },
  jacobian: (_t, y, out) => {
    out[0] = 2 * y[0];
  },
};

describe("the integrator", () => {
  it("reaches the reference of Robertson's problem at t = 1e11", () => {
    // Hairer & Wanner 1996, Solving ODEs II, IV.10 and their test set; from memory.
    const reference = [0.2083340149701255e-7, 0.833336077033471e-13, 0.999999979166505];
    const options = { relativeTolerance: 1e-7, absoluteTolerance: Float64Array.of(1e-13, 1e-19, 1e-13) };
    const result = createIntegrator(3).run(robertson, 0, Float64Array.of(1, 0, 0), 1e11, options);
    expect(result.status).toBe("done");
    expect(result.steps).toBeLessThan(500);
    closeTo(result.y, reference, 1e-5);
    expect(result.y[0] + result.y[1] + result.y[2]).toBeCloseTo(1, 12);
  });

  it("agrees with an implicit Runge-Kutta code on Robertson's problem at t = 40", () => {
    // Computed with the Radau IIA code of SciPy 1, rtol 3e-14, atol 1e-18.
    const reference = [0.7158270687194078, 9.18553476455783e-6, 0.2841637457458291];
    const options = { relativeTolerance: 1e-9, absoluteTolerance: Float64Array.of(1e-12, 1e-17, 1e-12) };
    const result = createIntegrator(3).run(robertson, 0, Float64Array.of(1, 0, 0), 40, options);
    closeTo(result.y, reference, 2e-9);
  });

  it.each([
    [1, -0.186364625480813e1, 0.753543086543546],
    [2, 0.1706167732170456e1, -0.8928097010248257],
  ])("reaches the reference of van der Pol's problem at t = %d", (end, y1, y2) => {
    // Hairer & Wanner 1996, Solving ODEs II, IV.10 and their test set, y(0) = (2, 0); from memory.
    const error = (tolerance: number) => {
      const options = { relativeTolerance: tolerance, absoluteTolerance: tolerance };
      const { status, y } = createIntegrator(2).run(vanDerPol, 0, Float64Array.of(2, 0), end, options);
      expect(status).toBe("done");
      return Math.max(Math.abs(y[0] / y1 - 1), Math.abs(y[1] / y2 - 1));
    };
    expect(error(1e-6)).toBeLessThan(2e-6);
    expect(error(1e-9)).toBeLessThan(5e-9);
  });

  it("ends nearer to the truth when the tolerance is tightened", () => {
    const error = (tolerance: number) => {
      const options = { relativeTolerance: tolerance, absoluteTolerance: tolerance };
      const { y } = createIntegrator(2).run(oscillator, 0, Float64Array.of(0, 1), 20, options);
      return Math.hypot(y[0] - Math.sin(20), y[1] - Math.cos(20));
    };
    const errors = [1e-4, 1e-6, 1e-8, 1e-10].map(error);
    errors.forEach((value, i) => {
      expect(value).toBeLessThan(20 * 10 ** (-4 - 2 * i));
      if (i > 0) expect(value).toBeLessThan(errors[i - 1] / 20);
    });
  });

  it("goes through a thermal runaway in few steps and conserves its matter and energy", () => {
    const options = { relativeTolerance: 1e-6, absoluteTolerance: Float64Array.of(1e-6, 1e-6, 1e-6, 1e-9) };
    const { status, y, steps, rejected } = createIntegrator(4).run(
      runaway(),
      0,
      runawayStart,
      86_400,
      options,
    );
    expect(status).toBe("done");
    expect(steps + rejected).toBeLessThan(260);
    // Both reactions complete: 90 kJ/mol x 4000 mol and 450 kJ/kg x 2000 kg, over 4 MJ/K.
    expect(y[0]).toBeCloseTo(353.15 + (90e3 * 4000 + 2000 * 450e3) / 4e6, 6);
    expect(y[2] - y[1]).toBeCloseTo(200, 8);
    expect(y[3]).toBeCloseTo(1, 8);
  });

  it("goes through self-heating of more than 1e5 K/s", () => {
    const system = runaway(200e3);
    const slope = new Float64Array(4);
    const state = new Float64Array(4);
    let largest = 0;
    const result = createIntegrator(4).run(system, 0, runawayStart, 864_000, {
      relativeTolerance: 1e-6,
      absoluteTolerance: Float64Array.of(1e-6, 1e-6, 1e-6, 1e-9),
      onStep: (step) => {
        step.evaluate(step.end, state);
        system.derivative(step.end, state, slope);
        largest = Math.max(largest, slope[0]);
        return false;
      },
    });
    expect(result.status).toBe("done");
    expect(largest).toBeGreaterThan(1e5);
    expect(result.steps + result.rejected).toBeLessThan(400);
    expect(result.y[0]).toBeCloseTo(353.15 + (90e3 * 4000 + 2000 * 450e3) / 4e6, 6);
  });

  it.each([500, 20_000])("agrees with odex, an extrapolation code, %d s into a runaway", (end) => {
    const system = runaway();
    const options = { relativeTolerance: 1e-9, absoluteTolerance: Float64Array.of(1e-9, 1e-9, 1e-9, 1e-12) };
    const ours = createIntegrator(4).run(system, 0, runawayStart, end, options);
    const slope = new Float64Array(4);
    const theirs = integrateWithOdex(
      (t, y) => {
        system.derivative(t, Float64Array.from(y), slope);
        return Array.from(slope);
      },
      0,
      Array.from(runawayStart),
      end,
      1e-12,
      1e-12,
    );
    // A is used up in between: amounts agree to 1e-7 mol there, the rest to 1e-7 of itself.
    theirs.y.forEach((value, i) => {
      expect(Math.abs(ours.y[i] - value)).toBeLessThan(1e-7 * (i < 3 ? Math.max(1, value) : value));
    });
    expect(ours.y[0]).toBeGreaterThan(380);
    expect(ours.y[3]).toBeGreaterThan(1e-8);
  });

  it("gives the same answer whether a run is whole or continued, and whether its workspace is new", () => {
    const options = { relativeTolerance: 1e-8, absoluteTolerance: 1e-10 };
    const integrator = createIntegrator(4);
    const whole = integrator.run(runaway(), 0, runawayStart, 20_000, options);
    const half = integrator.run(runaway(), 0, runawayStart, 9000, options);
    const rest = { ...options, initialStep: half.nextStep };
    const continued = integrator.run(runaway(), half.t, half.y, 20_000, rest);
    expect(continued.t).toBe(20_000);
    closeTo(continued.y, Array.from(whole.y), 1e-6);
    expect(half.steps + continued.steps).toBeLessThan(whole.steps + 5);
    expect(createIntegrator(4).run(runaway(), 0, runawayStart, 20_000, options)).toEqual(whole);
  });

  it("keeps the planned step for the next run when the end cuts it short", () => {
    const options = { relativeTolerance: 1e-6, absoluteTolerance: 1e-6, initialStep: 0.1 };
    const { nextStep, steps } = createIntegrator(2).run(oscillator, 0, Float64Array.of(0, 1), 1e-9, options);
    expect(steps).toBe(1);
    expect(nextStep).toBeGreaterThanOrEqual(0.1);
  });

  it("holds to the largest step", () => {
    const lengths: number[] = [];
    createIntegrator(2).run(oscillator, 0, Float64Array.of(0, 1), 1, {
      relativeTolerance: 1e-3,
      absoluteTolerance: 1e-3,
      maxStep: 0.05,
      onStep: (step) => {
        lengths.push(step.end - step.start);
        return false;
      },
    });
    expect(Math.max(...lengths)).toBeLessThan(0.0501);
    expect(lengths.reduce((sum, length) => sum + length, 0)).toBeCloseTo(1, 12);
  });

  it("does nothing over no time", () => {
    const options = { relativeTolerance: 1e-6, absoluteTolerance: 1e-6 };
    const result = createIntegrator(2).run(oscillator, 3, Float64Array.of(0, 1), 3, options);
    expect(result).toMatchObject({ status: "done", t: 3, steps: 0, events: [] });
    expect(Array.from(result.y)).toEqual([0, 1]);
  });

  it("counts its calls", () => {
    let calls = 0;
    let jacobians = 0;
    const counting: StiffSystem = {
      size: 2,
      derivative: (t, y, out) => {
        calls++;
        oscillator.derivative(t, y, out);
      },
      jacobian: (t, y, out) => {
        jacobians++;
        oscillator.jacobian(t, y, out);
      },
    };
    const options = { relativeTolerance: 1e-6, absoluteTolerance: 1e-6, initialStep: 5 };
    const result = createIntegrator(2).run(counting, 0, Float64Array.of(0, 1), 10, options);
    expect(result.rejected).toBeGreaterThan(0);
    expect(result.evaluations).toBe(calls);
    expect(jacobians).toBe(result.steps);
  });
});

describe("a run that cannot be finished says so", () => {
  const tolerances = { relativeTolerance: 1e-6, absoluteTolerance: 1e-6 };

  it("where the solution grows beyond bounds", () => {
    const result = createIntegrator(1).run(explosion, 0, Float64Array.of(1), 2, tolerances);
    expect(result.status).toBe("stepTooSmall");
    expect(result.t).toBeCloseTo(1, 5);
    expect(Number.isFinite(result.y[0])).toBe(true);
  });

  it("where the steps run out", () => {
    const options = { ...tolerances, maxSteps: 10 };
    const result = createIntegrator(2).run(vanDerPol, 0, Float64Array.of(2, 0), 2, options);
    expect(result.status).toBe("tooManySteps");
    expect(result.steps + result.rejected).toBe(10);
    expect(result.t).toBeLessThan(2);
  });

  it("where the right-hand side is never a number, or the start is none", () => {
    const nowhere: StiffSystem = {
      size: 1,
      derivative: (_t, _y, out) => {
        out[0] = Number.NaN;
      },
      jacobian: (_t, _y, out) => {
        out[0] = 0;
      },
    };
    const integrator = createIntegrator(1);
    for (const [system, start] of [
      [nowhere, 1],
      [explosion, Number.NaN],
    ] as const) {
      const result = integrator.run(system, 0, Float64Array.of(start), 1, tolerances);
      expect(result).toMatchObject({ status: "stepTooSmall", t: 0, steps: 0 });
      expect(result.rejected).toBeLessThan(400);
    }
  });

  it("where the time is so large that a step no longer moves it", () => {
    const options = { ...tolerances, initialStep: 1e-5 };
    const result = createIntegrator(1).run(explosion, 1e12, Float64Array.of(1), 1e12 + 0.5, options);
    expect(result.status).toBe("stepTooSmall");
  });

  it("but only shortens the step where a stage leaves the domain", () => {
    // y' = -sqrt y is not a number below zero; y = (1 - t/2)^2.
    const emptying: StiffSystem = {
      size: 1,
      derivative: (_t, y, out) => {
        out[0] = -Math.sqrt(y[0]);
      },
      jacobian: (_t, y, out) => {
        out[0] = -0.5 / Math.sqrt(y[0]);
      },
    };
    const options = { ...tolerances, initialStep: 50 };
    const result = createIntegrator(1).run(emptying, 0, Float64Array.of(1), 1.9, options);
    expect(result.status).toBe("done");
    expect(result.rejected).toBeGreaterThan(0);
    expect(result.y[0]).toBeCloseTo(0.05 ** 2, 5);
  });

  it("and refuses arguments that make no run", () => {
    const integrator = createIntegrator(2);
    const start = Float64Array.of(0, 1);
    expect(() => integrator.run(robertson, 0, start, 1, tolerances)).toThrow(RangeError);
    expect(() => integrator.run(oscillator, 0, Float64Array.of(1), 1, tolerances)).toThrow(RangeError);
    expect(() => integrator.run(oscillator, 1, start, 0, tolerances)).toThrow(RangeError);
    expect(() => integrator.run(oscillator, 0, start, Number.NaN, tolerances)).toThrow(RangeError);
    const none = { relativeTolerance: 0, absoluteTolerance: 0 };
    expect(() => integrator.run(oscillator, 0, start, 1, none)).toThrow(RangeError);
    const negative = { relativeTolerance: 1e-3, absoluteTolerance: Float64Array.of(1, -1) };
    expect(() => integrator.run(oscillator, 0, start, 1, negative)).toThrow(RangeError);
  });
});
