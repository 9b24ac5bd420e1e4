import type { StiffSystem } from "../../server/numeric/rosenbrockStep.js";

/** Robertson's chemical reaction; Hairer & Wanner 1996, Solving ODEs II, IV.1 (1.4). */
export const robertson: StiffSystem = {
  size: 3,
  derivative(_t, y, out) {
    out[0] = -0.04 * y[0] + 1e4 * y[1] * y[2];
    out[2] = 3e7 * y[1] * y[1];
    out[1] = -out[0] - out[2];
  },
  jacobian(_t, y, out) {
    out.set([-0.04, 1e4 * y[2], 1e4 * y[1]]);
    out.set([0.04, -1e4 * y[2] - 6e7 * y[1], -1e4 * y[1]], 3);
    out.set([0, 6e7 * y[1], 0], 6);
  },
};

/** Van der Pol's oscillator in the scaled form, mu^2 = 1e6; Hairer & Wanner 1996, IV.1 (1.5'). */
export const vanDerPol: StiffSystem = {
  size: 2,
  derivative(_t, y, out) {
    out[0] = y[1];
    out[1] = ((1 - y[0] * y[0]) * y[1] - y[0]) * 1e6;
  },
  jacobian(_t, y, out) {
    out[0] = 0;
    out[1] = 1;
    out[2] = (-2 * y[0] * y[1] - 1) * 1e6;
    out[3] = (1 - y[0] * y[0]) * 1e6;
  },
};

/** y'' = -y: sine and cosine. */
export const oscillator: StiffSystem = {
  size: 2,
  derivative(_t, y, out) {
    out[0] = y[1];
    out[1] = -y[0];
  },
  jacobian(_t, _y, out) {
    out.set([0, 1, -1, 0]);
  },
};

/** A nonlinear system that depends on t, with y1 = exp(sin t), y2 = exp(cos t) for y(0) = (1, e). */
export const exponentials: StiffSystem = {
  size: 2,
  derivative(t, y, out) {
    out[0] = y[0] * Math.log(y[1]);
    out[1] = -y[1] * Math.log(y[0]) + 0.5 * (y[1] - Math.exp(Math.cos(t)));
  },
  jacobian(_t, y, out) {
    out[0] = Math.log(y[1]);
    out[1] = y[0] / y[1];
    out[2] = -y[1] / y[0];
    out[3] = -Math.log(y[0]) + 0.5;
  },
  timeDerivative(t, _y, out) {
    out[0] = 0;
    out[1] = 0.5 * Math.sin(t) * Math.exp(Math.cos(t));
  },
};

/** Prothero & Robinson's problem, y' = lambda (y - sin t) + cos t: exact solution sin t from y(0) = 0. */
export function protheroRobinson(lambda: number): StiffSystem {
  return {
    size: 1,
    derivative(t, y, out) {
      out[0] = lambda * (y[0] - Math.sin(t)) + Math.cos(t);
    },
    jacobian(_t, _y, out) {
      out[0] = lambda;
    },
    timeDerivative(t, _y, out) {
      out[0] = -lambda * Math.cos(t) - Math.sin(t);
    },
  };
}

const R = 8.31446261815324;

/**
 * Invented: a batch of 2000 kg that loses its cooling, second-order reaction and autocatalytic
 * decomposition, adiabatic. States: temperature, A, B, decomposed fraction.
 *
 * @param decompositionEnergy activation energy, J/mol: the larger, the more violent the end
 */
export function runaway(decompositionEnergy = 130e3): StiffSystem {
  const volume = 2;
  const heatCapacity = 4e6;
  const reactionHeat = 90e3;
  const decompositionHeat = 2000 * 450e3;
  const initiation = 1e-3;
  const rate = (T: number) => 2e-7 * Math.exp((-70e3 / R) * (1 / T - 1 / 353.15));
  const decay = (T: number) => 2e-6 * Math.exp((-decompositionEnergy / R) * (1 / T - 1 / 393.15));
  return {
    size: 4,
    derivative(_t, [T, a, b, alpha], out) {
      const r = (rate(T) * a * b) / volume;
      const d = decay(T) * (1 - alpha) * (initiation + alpha);
      out[0] = (r * reactionHeat + d * decompositionHeat) / heatCapacity;
      out[1] = -r;
      out[2] = -r;
      out[3] = d;
    },
    jacobian(_t, [T, a, b, alpha], out) {
      const byA = (rate(T) * b) / volume;
      const byB = (rate(T) * a) / volume;
      const r = byB * b;
      const byT = (r * 70e3) / (R * T * T);
      const d = decay(T) * (1 - alpha) * (initiation + alpha);
      const decayByT = (d * decompositionEnergy) / (R * T * T);
      const byAlpha = decay(T) * (1 - initiation - 2 * alpha);
      out[0] = (byT * reactionHeat + decayByT * decompositionHeat) / heatCapacity;
      out[1] = (byA * reactionHeat) / heatCapacity;
      out[2] = (byB * reactionHeat) / heatCapacity;
      out[3] = (byAlpha * decompositionHeat) / heatCapacity;
      for (const row of [4, 8]) {
        out[row] = -byT;
        out[row + 1] = -byA;
        out[row + 2] = -byB;
        out[row + 3] = 0;
      }
      out[12] = decayByT;
      out[13] = 0;
      out[14] = 0;
      out[15] = byAlpha;
    },
  };
}

/** State of `runaway` when cooling is lost. */
export const runawayStart = Float64Array.of(353.15, 4000, 4200, 0);

/** Largest difference between the Jacobian and central differences of the derivative, relative to each row. */
export function jacobianError(system: StiffSystem, t: number, y: Float64Array): number {
  const n = system.size;
  const jacobian = new Float64Array(n * n);
  system.jacobian(t, y, jacobian);
  const up = new Float64Array(n);
  const down = new Float64Array(n);
  let worst = 0;
  for (let j = 0; j < n; j++) {
    const step = 1e-6 * Math.max(Math.abs(y[j]), 1e-3);
    const moved = y.slice();
    moved[j] = y[j] + step;
    system.derivative(t, moved, up);
    moved[j] = y[j] - step;
    system.derivative(t, moved, down);
    for (let i = 0; i < n; i++) {
      const difference = (up[i] - down[i]) / (2 * step);
      let largest = 0;
      for (let k = 0; k < n; k++) largest = Math.max(largest, Math.abs(jacobian[i * n + k] * y[k]));
      if (largest === 0) continue;
      worst = Math.max(worst, (Math.abs(difference - jacobian[i * n + j]) * Math.abs(y[j])) / largest);
    }
  }
  return worst;
}
