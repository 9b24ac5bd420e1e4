import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bisectPredicate, findRoot, maximise } from "../../server/numeric/roots.js";

/** Counts how often a function is called. */
function counted<A, B>(f: (x: A) => B): { f: (x: A) => B; calls: () => number } {
  let calls = 0;
  return {
    f: (x) => {
      calls++;
      return f(x);
    },
    calls: () => calls,
  };
}

describe("a bracketed root", () => {
  it("of smooth functions is found to rounding in few calls", () => {
    const cases: [(x: number) => number, number, number, number][] = [
      [(x) => x * x - 2, 0, 2, Math.SQRT2],
      [(x) => Math.cos(x), 0, 3, Math.PI / 2],
      [(x) => Math.exp(x) - 1e6, 0, 100, Math.log(1e6)],
      [(x) => Math.log(x) + 14, 1e-310, 1, Math.exp(-14)],
      [(x) => 1 / x - 1e-9, 1, 1e12, 1e9],
    ];
    for (const [g, lo, hi, root] of cases) {
      const { f, calls } = counted(g);
      expect(Math.abs(findRoot(f, lo, hi) / root - 1)).toBeLessThan(1e-14);
      expect(calls()).toBeLessThan(80);
    }
    const { f, calls } = counted((x: number) => x ** 3 - 2 * x - 5);
    // Wallis's equation, root 2.0945514815423265.
    expect(findRoot(f, 2, 3)).toBeCloseTo(2.0945514815423265, 14);
    expect(calls()).toBeLessThan(14);
  });

  it("takes no more than four times the calls of bisection, however nasty the function", () => {
    const nasty: ((x: number) => number)[] = [
      (x) => (x - 0.7) ** 19,
      (x) => Math.sign(x - 0.7),
      (x) => (x < 0.7 ? -1e-300 : 1e300),
      (x) => (x < 0.7 ? Number.NEGATIVE_INFINITY : 1),
      (x) => Math.exp(1000 * (x - 0.7)) - 1,
      (x) => (x === 0.7 ? 0 : (x - 0.7) * Math.exp(-1 / (x - 0.7) ** 2)),
    ];
    for (const g of nasty) {
      const { f, calls } = counted(g);
      const root = findRoot(f, -1, 2, { tolerance: 1e-9 });
      expect(calls()).toBeLessThanOrEqual(2 + 4 * Math.ceil(Math.log2(3e9)));
      expect(Math.sign(g(root - 1e-9)) * Math.sign(g(root + 1e-9))).toBeLessThanOrEqual(0);
    }
  });

  it("stays within the tolerance for any cubic with one root in the bracket", () => {
    const inUnit = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(inUnit, fc.double({ min: 0, max: 1e6, noNaN: true }), (root, bend) => {
        const f = (x: number) => (x - root) * (1 + bend * x * x);
        expect(Math.abs(findRoot(f, 0, 1, { tolerance: 1e-10 }) - root)).toBeLessThanOrEqual(1e-10);
      }),
    );
  });

  it("hundreds of orders of magnitude below its bracket is found all the same", () => {
    const root = Math.exp(-700);
    expect(Math.abs(findRoot((x) => Math.log(x) + 700, 1e-310, 1) / root - 1)).toBeLessThan(1e-12);
  });

  it("may lie at an end, and the ends may come in either order", () => {
    expect(findRoot((x) => x, 0, 1)).toBe(0);
    expect(findRoot((x) => x - 1, 0, 1)).toBe(1);
    expect(findRoot((x) => x - 0.25, 1, 0)).toBeCloseTo(0.25, 15);
    expect(findRoot((x) => x, -3, 1)).toBe(0);
  });

  it("is refused without a change of sign, and where the function is not a number", () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(RangeError);
    expect(() => findRoot(() => Number.NaN, -1, 1)).toThrow(RangeError);
    expect(() => findRoot((x) => (Math.abs(x) < 0.9 ? Number.NaN : x), -1, 1)).toThrow(RangeError);
  });

  it("gives the best point so far when calls run out", () => {
    const root = findRoot((x) => x * x - 2, 0, 2, { maxIterations: 3 });
    expect(Math.abs(root - Math.SQRT2)).toBeLessThan(0.5);
  });
});

describe("the boundary of a predicate", () => {
  it("comes back with both sides, closer than the tolerance", () => {
    const { inside, outside } = bisectPredicate((x) => x <= Math.PI, 0, 10, 1e-3);
    expect(inside).toBeLessThanOrEqual(Math.PI);
    expect(outside).toBeGreaterThan(Math.PI);
    expect(outside - inside).toBeLessThanOrEqual(1e-3);
  });

  it("works downwards, and stops where doubles end", () => {
    const { inside, outside } = bisectPredicate((x) => x > 1.5, 2, 1, 0);
    expect(inside).toBe(1.5 + Number.EPSILON);
    expect(outside).toBe(1.5);
  });

  it("asks for nothing that is already known", () => {
    const { f, calls } = counted((x: number) => x < 1);
    expect(bisectPredicate(f, 0, 0.4, 0.5)).toEqual({ inside: 0, outside: 0.4 });
    expect(calls()).toBe(0);
  });
});

describe("a maximum", () => {
  it("in the interior is found to half the digits, its value to rounding", () => {
    const { f, calls } = counted((x: number) => x * Math.exp(-x));
    const top = maximise(f, 0, 10, 1e-9);
    expect(Math.abs(top.x - 1)).toBeLessThan(5e-8);
    expect(top.value).toBeCloseTo(1 / Math.E, 15);
    expect(calls()).toBeLessThan(40);
  });

  it("at an end is that end", () => {
    expect(maximise((x) => x, 0, 1)).toEqual({ x: 1, value: 1 });
    expect(maximise((x) => 1 - x, 0, 1)).toEqual({ x: 0, value: 1 });
    expect(maximise((x) => 1 - x, 1, 0)).toEqual({ x: 0, value: 1 });
  });

  it("at a kink is met within the tolerance", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 0.99, noNaN: true }), (kink) => {
        const top = maximise((x) => (x < kink ? x / kink : (1 - x) / (1 - kink)), 0, 1, 1e-6);
        expect(Math.abs(top.x - kink)).toBeLessThanOrEqual(1e-6);
      }),
    );
  });

  it("of a constant is that constant", () => {
    expect(maximise(() => 3, 0, 1).value).toBe(3);
  });

  it("is refused where the function is not a number", () => {
    expect(() => maximise(() => Number.NaN, 0, 1)).toThrow(RangeError);
  });
});
