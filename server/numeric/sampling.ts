import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plusFromState } from "pure-rand/generator/xoroshiro128plus";

/** The seed of every screening; it is printed with the result. */
export const fixedSeed = 1;

/**
 * Latin hypercube sample of one dimension: a point at a random place in each of n equal strata of (0, 1), in
 * random order. Dimensions drawn under different names are paired at random.
 *
 * The stream (xoroshiro128+) begins at a state made from seed and name alone. So a dimension keeps its points
 * whatever other dimensions there are, and two samples share those that they have in common.
 *
 * @param name of the dimension
 * @param count n, from 1
 * @param seed whole number
 * @returns n probabilities, never 0 or 1
 * @see McKay, Beckman & Conover 1979, Technometrics 21:239; Blackman & Vigna 2018 (the generator)
 */
export function latinColumn(name: string, count: number, seed: number = fixedSeed): Float64Array {
  const random = xoroshiro128plusFromState(stateOf(name, seed));
  const column = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    // The middle of the generator's own steps of 2^-53, so that no point falls on the edge of its stratum.
    column[i] = Math.min((i + uniformFloat64(random) + 2 ** -54) / count, 1 - 2 ** -53);
  }
  for (let i = count - 1; i > 0; i--) {
    const other = Math.floor(uniformFloat64(random) * (i + 1));
    const kept = column[i];
    column[i] = column[other];
    column[other] = kept;
  }
  return column;
}

/** Four well-mixed words from a text and a number: FNV-1a, then the finaliser of MurmurHash3. */
function stateOf(name: string, seed: number): readonly [number, number, number, number] {
  let hash = 0x811c9dc5 ^ seed;
  for (let i = 0; i < name.length; i++) hash = Math.imul(hash ^ name.charCodeAt(i), 0x01000193);
  const word = (index: number): number => {
    let mixed = (hash + Math.imul(index + 1, 0x9e3779b9)) ^ Math.imul(seed, index + 1);
    mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
    mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
    return mixed ^ (mixed >>> 16);
  };
  return [word(0), word(1), word(2), word(3)];
}
