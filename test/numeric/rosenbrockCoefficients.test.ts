import { describe, expect, it } from "vitest";
import { RODAS5P } from "../../server/numeric/rosenbrockCoefficients.js";
import { density, drawn, type RootedTree, rootedTrees, vertices } from "./rootedTrees.js";

// The conditions are those of Hairer & Wanner 1996, Solving ODEs II, IV.7, theorem 7.1 to 7.5: one for
// each rooted tree, with beta = alpha + gamma at a vertex with one branch and alpha at one with several.

const s = RODAS5P.stages;
const stages = Array.from({ length: s }, (_, i) => i);
const entry = (table: Float64Array, i: number, j: number) => table[i * s + j];

/** Row vector times the inverse of the lower triangular matrix I/gamma - C. */
function overInverse(row: readonly number[]): number[] {
  const x = [...row];
  for (let j = s - 1; j >= 0; j--) {
    for (let i = j + 1; i < s; i++) x[j] += x[i] * entry(RODAS5P.c, i, j);
    x[j] *= RODAS5P.gamma;
  }
  return x;
}

const unit = (i: number) => stages.map((j) => (i === j ? 1 : 0));
/** Gamma = (I/gamma - C)^-1, alpha = a Gamma, b = m Gamma. */
const gamma = stages.map((i) => overInverse(unit(i)));
const alpha = stages.map((i) => overInverse(stages.map((j) => entry(RODAS5P.a, i, j))));
const beta = alpha.map((row, i) => row.map((value, j) => value + gamma[i][j]));

const lastArgument = stages.map((j) => entry(RODAS5P.a, s - 1, j));
const result = lastArgument.map((value, j) => (j === s - 1 ? 1 : value));
const b = overInverse(result);
const bEmbedded = overInverse(lastArgument);
const bDense = (theta: number) =>
  overInverse(
    result.map((value, j) => {
      const [p1, p2, p3] = [0, 1, 2].map((row) => entry(RODAS5P.h, row, j));
      return theta * (value + (1 - theta) * (p1 + theta * (p2 + theta * p3)));
    }),
  );

const dot = (x: readonly number[], y: readonly number[]) =>
  x.reduce((sum, value, i) => sum + value * y[i], 0);
const sum = (x: readonly number[]) => x.reduce((total, value) => total + value, 0);

/** Elementary weight of every stage. */
function weights(tree: RootedTree): number[] {
  if (tree.length === 1) return beta.map((row) => dot(row, weights(tree[0])));
  return stages.map((i) => tree.reduce((product, branch) => product * dot(alpha[i], weights(branch)), 1));
}

const residual = (weightsOfResult: readonly number[], tree: RootedTree, theta = 1) =>
  Math.abs(dot(weightsOfResult, weights(tree)) - theta ** vertices(tree) / density(tree));

const trees = rootedTrees(6);
const upTo = (order: number) =>
  trees
    .slice(1, order + 1)
    .flat()
    .map((tree) => ({ name: drawn(tree), tree }));

describe("the coefficients of Rodas5P", () => {
  it("are checked against every rooted tree: 1, 1, 2, 4, 9 and 20 of them", () => {
    expect(trees.slice(1).map((ofOneSize) => ofOneSize.length)).toEqual([1, 1, 2, 4, 9, 20]);
    // Densities 1, 2, 3, 6 of the first four: Hairer, Norsett & Wanner, Solving ODEs I, table II.2.1.
    expect(upTo(3).map(({ tree }) => density(tree))).toEqual([1, 2, 6, 3]);
  });

  it.each(upTo(5))("meet the condition of order 5 for $name", ({ tree }) => {
    expect(residual(b, tree)).toBeLessThan(1e-13);
  });

  it.each(upTo(4))("meet the condition of the embedded order 4 for $name", ({ tree }) => {
    expect(residual(bEmbedded, tree)).toBeLessThan(1e-13);
  });

  it.each(upTo(4))("meet the condition of the dense order 4 for $name, all along the step", ({ tree }) => {
    for (const theta of [0, 0.1, 0.25, 0.5, 0.7, 0.9, 1]) {
      expect(residual(bDense(theta), tree, theta)).toBeLessThan(1e-13);
    }
  });

  it("claim no more than they hold: order 6, embedded 5 and dense 5 each fail", () => {
    const worst = (weightsOfResult: readonly number[], order: number, theta = 1) =>
      Math.max(...trees[order].map((tree) => residual(weightsOfResult, tree, theta)));
    expect(worst(b, 6)).toBeGreaterThan(1e-4);
    expect(worst(bEmbedded, 5)).toBeGreaterThan(1e-4);
    expect(worst(bDense(0.5), 5, 0.5)).toBeGreaterThan(1e-5);
  });

  it("place the stages in time where the sums of their rows say", () => {
    for (const i of stages) {
      expect(Math.abs(sum(alpha[i]) - RODAS5P.nodes[i])).toBeLessThan(1e-13);
      expect(Math.abs(sum(gamma[i]) - RODAS5P.slopes[i])).toBeLessThan(1e-13);
    }
  });

  it("are stiffly accurate, the embedded result too", () => {
    for (const j of stages) {
      expect(Math.abs(beta[s - 1][j] - b[j])).toBeLessThan(1e-12);
      expect(Math.abs(beta[s - 2][j] - bEmbedded[j])).toBeLessThan(1e-12);
    }
  });
});

interface Complex {
  readonly re: number;
  readonly im: number;
}
const plus = (x: Complex, y: Complex): Complex => ({ re: x.re + y.re, im: x.im + y.im });
const times = (x: Complex, y: Complex): Complex => ({
  re: x.re * y.re - x.im * y.im,
  im: x.re * y.im + x.im * y.re,
});
const over = (x: Complex, y: Complex): Complex => {
  const square = y.re * y.re + y.im * y.im;
  return { re: (x.re * y.re + x.im * y.im) / square, im: (x.im * y.re - x.re * y.im) / square };
};
const size = (x: Complex) => Math.hypot(x.re, x.im);

/** R(z) = 1 + z b (I - z beta)^-1 1, by forward substitution. */
function stability(z: Complex, weightsOfResult: readonly number[]): Complex {
  const x: Complex[] = [];
  for (const i of stages) {
    let right: Complex = { re: 1, im: 0 };
    for (let j = 0; j < i; j++) right = plus(right, times(times(z, { re: beta[i][j], im: 0 }), x[j]));
    x.push(over(right, plus({ re: 1, im: 0 }, times(z, { re: -beta[i][i], im: 0 }))));
  }
  let total: Complex = { re: 0, im: 0 };
  stages.forEach((i) => {
    total = plus(total, times(x[i], { re: weightsOfResult[i], im: 0 }));
  });
  return plus({ re: 1, im: 0 }, times(z, total));
}

describe("the stability function of Rodas5P", () => {
  it("is exp(z) to order 5", () => {
    // A ring around 0: the first term left out, z^6, keeps its size all around and grows as radius^6.
    const error = (radius: number) =>
      Math.max(
        ...Array.from({ length: 32 }, (_, k) => {
          const angle = (k * Math.PI) / 16;
          const z = { re: radius * Math.cos(angle), im: radius * Math.sin(angle) };
          const exp = { re: Math.exp(z.re) * Math.cos(z.im), im: Math.exp(z.re) * Math.sin(z.im) };
          return size(plus(stability(z, b), { re: -exp.re, im: -exp.im }));
        }),
      );
    expect(Math.log2(error(0.2) / error(0.1))).toBeGreaterThan(5.8);
    expect(error(0.1)).toBeLessThan(1e-9);
  });

  it("vanishes at infinity: 1 - b beta^-1 1 = 0", () => {
    for (const row of [b, bEmbedded]) {
      const x: number[] = [];
      for (const i of stages) {
        let right = 1;
        for (let j = 0; j < i; j++) right -= beta[i][j] * x[j];
        x.push(right / beta[i][i]);
      }
      expect(Math.abs(1 - dot(row, x))).toBeLessThan(1e-10);
    }
    expect(size(stability({ re: -1e6, im: 0 }, b))).toBeLessThan(1e-4);
  });

  it("stays within one on the imaginary axis, so the method is A-stable and, with the above, L-stable", () => {
    // R has its poles at 1/gamma in the right half plane; the maximum principle does the rest.
    for (let exponent = -3; exponent <= 6; exponent += 0.01) {
      expect(size(stability({ re: 0, im: 10 ** exponent }, b))).toBeLessThanOrEqual(1 + 1e-12);
    }
  });
});
