import type { PairCovariance } from "../kinetics/interval.js";
import { normalQuantile } from "../numeric/normal.js";
import { fixedSeed, latinColumn } from "../numeric/sampling.js";
import { logNormalValue, normalValue } from "./distribution.js";
import type { Sample } from "./sample.js";

/** Draws of a screening unless another number is asked for. */
export const usualCount = 2000;

/** A Latin hypercube whose dimensions come into being when they are asked for. */
export interface Draws {
  readonly count: number;
  readonly seed: number;
  /**
   * The numbers of one draw.
   *
   * @param index 0 to count - 1
   * @param only pointer of the one input that is drawn while all others keep their estimates; all are drawn
   * unless said
   */
  sample(index: number, only?: string): Sample;
}

/**
 * Draws for any case. A dimension is named by the JSON pointer of its input, and its scores depend on that
 * name, the count and the seed alone: two cases share the draws of what they have in common, and as a score
 * counts standard deviations, the unit in which an input was typed changes nothing.
 *
 * An activation pair is v + L z sqrt(nu/chi2): L the Cholesky factor of its covariance, chi2 a sum of nu
 * squared normals, so that it follows Student's t with the degrees of freedom of its fit; normal where the
 * number of points is unknown.
 *
 * @param count from 1
 * @param seed whole number
 * @see McKay, Beckman & Conover 1979, Technometrics 21:239 (Latin hypercube); Kotz & Nadarajah 2004,
 * Multivariate t Distributions and Their Applications, ch. 1
 */
export function createDraws(count: number = usualCount, seed: number = fixedSeed): Draws {
  const columns = new Map<string, Float64Array>();
  const kept = (name: string, make: (name: string) => Float64Array): Float64Array => {
    let column = columns.get(name);
    if (column === undefined) {
      column = make(name);
      columns.set(name, column);
    }
    return column;
  };
  const fresh = (name: string) => latinColumn(name, count, seed).map(normalQuantile);
  const scores = (name: string) => kept(name, fresh);
  const widening = (pointer: string, degreesOfFreedom: number) =>
    kept(`${pointer} widening ${degreesOfFreedom}`, () => {
      const chiSquared = new Float64Array(count);
      for (let k = 1; k <= degreesOfFreedom; k++) {
        const scatter = fresh(`${pointer} scatter ${k}`);
        for (let i = 0; i < count; i++) chiSquared[i] += scatter[i] * scatter[i];
      }
      return chiSquared.map((each) => Math.sqrt(degreesOfFreedom / each));
    });

  function pair(
    index: number,
    pointer: string,
    covariance: PairCovariance,
    degreesOfFreedom: number | null,
  ): readonly [number, number] {
    const wider = degreesOfFreedom === null ? 1 : widening(pointer, degreesOfFreedom)[index];
    const first = scores(`${pointer} barrier`)[index] * wider;
    const second = scores(`${pointer} intercept`)[index] * wider;
    const barrierError = Math.sqrt(covariance.barrier);
    const shared = barrierError > 0 ? covariance.both / barrierError : 0;
    const own = Math.sqrt(Math.max(0, covariance.intercept - shared ** 2));
    return [shared * first + own * second, barrierError * first];
  }

  return {
    count,
    seed,
    sample(index, only) {
      const scoreOf = (pointer: string, standardError: number | null) =>
        standardError === null || (only !== undefined && only !== pointer) ? 0 : scores(pointer)[index];
      return {
        normal: (pointer, estimate) => normalValue(estimate, scoreOf(pointer, estimate.standardError)),
        logNormal: (pointer, estimate) => logNormalValue(estimate, scoreOf(pointer, estimate.standardError)),
        pair: (pointer, covariance, degreesOfFreedom) =>
          covariance === null || (only !== undefined && only !== pointer)
            ? [0, 0]
            : pair(index, pointer, covariance, degreesOfFreedom),
      };
    },
  };
}
