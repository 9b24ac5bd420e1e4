import { describe, expect, it } from "vitest";
import { gaussLegendre, integrate, integratePanels } from "../../server/numeric/quadrature.js";

describe("Gauss-Legendre rules", () => {
  it("agree with the table of Abramowitz & Stegun 25.4 for 2, 3, 5 and 10 points", () => {
    // Abramowitz & Stegun, table 25.4, from memory; n = 2 and 3 are also 1/sqrt 3 and sqrt(3/5).
    const table: [number, number, number][] = [
      [2, 0.577350269189626, 1],
      [3, 0.774596669241483, 0.555555555555556],
      [5, 0.906179845938664, 0.236926885056189],
      [10, 0.973906528517172, 0.066671344308688],
    ];
    for (const [n, node, weight] of table) {
      const rule = gaussLegendre(n);
      expect(rule.nodes[n - 1]).toBeCloseTo(node, 14);
      expect(rule.nodes[0]).toBeCloseTo(-node, 14);
      expect(rule.weights[n - 1]).toBeCloseTo(weight, 14);
    }
    expect(gaussLegendre(1)).toEqual({
      nodes: Float64Array.of(0),
      weights: Float64Array.of(2),
    });
  });

  it.each([1, 2, 3, 4, 7, 8, 16, 33, 64, 200])("integrate every power up to 2n - 1 exactly, n = %i", (n) => {
    const { nodes, weights } = gaussLegendre(n);
    for (let power = 0; power <= 2 * n - 1; power++) {
      let sum = 0;
      for (let i = 0; i < n; i++) sum += weights[i] * nodes[i] ** power;
      const exact = power % 2 === 0 ? 2 / (power + 1) : 0;
      expect(Math.abs(sum - exact)).toBeLessThan(3e-14);
    }
  });

  it("are not exact one degree further", () => {
    const { nodes, weights } = gaussLegendre(3);
    let sum = 0;
    for (let i = 0; i < 3; i++) sum += weights[i] * nodes[i] ** 6;
    expect(Math.abs(sum - 2 / 7)).toBeGreaterThan(0.01);
  });

  it("are computed once", () => {
    expect(gaussLegendre(12)).toBe(gaussLegendre(12));
  });

  it("refuse a number of points that makes no rule", () => {
    for (const n of [0, -1, 1.5, Number.NaN, 1001]) expect(() => gaussLegendre(n)).toThrow(RangeError);
  });
});

describe("integrals", () => {
  it("of a smooth function reach rounding", () => {
    expect(integrate(Math.exp, 0, 1)).toBeCloseTo(Math.E - 1, 14);
    expect(integrate(Math.exp, 1, 0)).toBeCloseTo(1 - Math.E, 14);
  });

  it("over geometric panels resolve a scale of 1e-8 that one panel misses", () => {
    const w = 1e-8;
    const f = (x: number) => 1 / (w + x);
    const exact = Math.log((1 + w) / w);
    const edges = [0];
    for (let edge = w; edge < 1; edge *= 4) edges.push(edge);
    edges.push(1);
    expect(Math.abs(integratePanels(f, edges) / exact - 1)).toBeLessThan(1e-13);
    expect(Math.abs(integrate(f, 0, 1) / exact - 1)).toBeGreaterThan(0.1);
  });

  it("over no panel are zero", () => {
    expect(integratePanels(Math.exp, [1])).toBe(0);
  });
});
