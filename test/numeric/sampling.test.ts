import { xoroshiro128plusFromState } from "pure-rand/generator/xoroshiro128plus";
import { describe, expect, test } from "vitest";
import { fixedSeed, latinColumn } from "../../server/numeric/sampling.js";

/** Largest distance between the sample's distribution and the uniform one. */
function distanceFromUniform(values: Float64Array): number {
  const sorted = values.toSorted();
  return Math.max(
    ...Array.from(sorted, (each, i) => Math.max(each - i / values.length, (i + 1) / values.length - each)),
  );
}

function correlation(a: Float64Array, b: Float64Array): number {
  let [sum, sumA, sumB] = [0, 0, 0];
  a.forEach((each, i) => {
    sum += (each - 0.5) * (b[i] - 0.5);
    sumA += (each - 0.5) ** 2;
    sumB += (b[i] - 0.5) ** 2;
  });
  return sum / Math.sqrt(sumA * sumB);
}

describe("a Latin hypercube", () => {
  test.each([1, 2, 7, 1000, 50_000])(
    "of %i points has exactly one in each stratum, none at an end",
    (count) => {
      const column = latinColumn("/mixture/mass", count);
      const strata = Array.from(column, (each) => Math.floor(each * count)).sort((a, b) => a - b);
      expect(strata).toEqual(Array.from({ length: count }, (_, i) => i));
      expect(Math.min(...column)).toBeGreaterThan(0);
      expect(Math.max(...column)).toBeLessThan(1);
    },
  );

  test("places its points at random within their strata", () => {
    const places = latinColumn("/mixture/mass", 5000).map((each) => (each * 5000) % 1);
    // Kolmogorov and Smirnov: 1.63/sqrt(n) is passed by 99 of 100 uniform samples.
    expect(distanceFromUniform(places)).toBeLessThan(1.63 / Math.sqrt(5000));
    expect(distanceFromUniform(places)).toBeGreaterThan(0.3 / Math.sqrt(5000));
  });

  test("puts them in random order: each one tells nothing of the next", () => {
    const column = latinColumn("/mixture/mass", 5000);
    expect(Math.abs(correlation(column.subarray(1), column.subarray(0, -1)))).toBeLessThan(
      3.3 / Math.sqrt(5000),
    );
  });

  test("pairs its dimensions at random, also those whose names differ by one character", () => {
    const columns = Array.from({ length: 40 }, (_, i) => latinColumn(`/reaction/rateConstant#${i}`, 2000));
    const scores: number[] = [];
    columns.forEach((a, i) => {
      for (const b of columns.slice(i + 1)) scores.push(correlation(a, b) * Math.sqrt(2000));
    });
    // 780 standard normal scores: the largest is near 3.2, their mean square near 1.
    expect(Math.max(...scores.map(Math.abs))).toBeLessThan(4.5);
    expect(scores.reduce((sum, each) => sum + each ** 2, 0) / scores.length).toBeCloseTo(1, 0);
    expect(Math.abs(scores.reduce((sum, each) => sum + each, 0) / scores.length)).toBeLessThan(0.15);
  });

  test("gives the same points to the same name and seed, others to another", () => {
    expect(latinColumn("/mixture/mass", 100)).toEqual(latinColumn("/mixture/mass", 100, fixedSeed));
    expect(latinColumn("/mixture/mass", 100)).not.toEqual(latinColumn("/mixture/mass", 100, fixedSeed + 1));
    expect(latinColumn("/mixture/mass", 100)).not.toEqual(latinColumn("/mixture/density", 100));
  });

  test("estimates a mean far better than plain random points would", () => {
    const mean = (name: string) => latinColumn(name, 2000).reduce((sum, each) => sum + each ** 2, 0) / 2000;
    const errors = Array.from({ length: 50 }, (_, i) => mean(`/${i}`) - 1 / 3);
    const spread = Math.sqrt(errors.reduce((sum, each) => sum + each ** 2, 0) / 50);
    // Plain points: sqrt(4/45/2000) = 6.7e-3.
    expect(spread).toBeLessThan(2e-5);
  });
});

test("the generator is xoroshiro128+ as published", () => {
  // Blackman & Vigna 2018: result = s0 + s1 modulo 2^64; s1 ^= s0; s0 = rotl(s0, 24) ^ s1 ^ (s1 << 16);
  // s1 = rotl(s1, 37). Here in whole numbers; the package gives the lower half.
  const mask = (1n << 64n) - 1n;
  const rotate = (x: bigint, k: bigint) => ((x << k) | (x >> (64n - k))) & mask;
  let [s0, s1] = [(1n << 32n) | 2n, (3n << 32n) | 4n];
  const generator = xoroshiro128plusFromState([1, 2, 3, 4]);
  for (let i = 0; i < 100; i++) {
    expect(BigInt.asUintN(32, BigInt(generator.next()))).toBe((s0 + s1) & 0xffffffffn);
    s1 ^= s0;
    s0 = rotate(s0, 24n) ^ s1 ^ ((s1 << 16n) & mask);
    s1 = rotate(s1, 37n);
  }
});
