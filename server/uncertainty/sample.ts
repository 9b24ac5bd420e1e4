import type { PairCovariance } from "../kinetics/interval.js";
import type { Estimate } from "../numeric/estimate.js";

/**
 * Where the numbers of a case come from when it is put into plain ones: its estimates, or one draw about them.
 * One walk through the case serves both, and the list of what is uncertain in it.
 */
export interface Sample {
  /** @param pointer JSON pointer of the input */
  normal(pointer: string, estimate: Estimate): number;
  logNormal(pointer: string, estimate: Estimate): number;
  /**
   * Deviations of ln A and E (J/mol) from a fitted pair.
   *
   * @param pointer JSON pointer of the rate constant
   * @param covariance null where none is known: the pair counts as exact
   * @param degreesOfFreedom points less two; null where the number of points is unknown
   */
  pair(
    pointer: string,
    covariance: PairCovariance | null,
    degreesOfFreedom: number | null,
  ): readonly [number, number];
}

/**
 * JSON pointers of the inputs that carry an error, in the order in which the case is walked. The two
 * parameters of an activation pair are one input.
 *
 * @param walk puts the case into plain numbers by the sample it is given
 */
export function uncertainInputs(walk: (sample: Sample) => unknown): readonly string[] {
  const found: string[] = [];
  const single = (pointer: string, estimate: Estimate): number => {
    if ((estimate.standardError ?? 0) > 0) found.push(pointer);
    return estimate.value;
  };
  walk({
    normal: single,
    logNormal: single,
    pair(pointer, covariance) {
      if (covariance !== null) found.push(pointer);
      return [0, 0];
    },
  });
  return found;
}

/**
 * JSON pointers of the inputs that carry no error although they could, in the order in which the case is walked. An
 * error typed as zero says that the input is exact.
 *
 * @param walk puts the case into plain numbers by the sample it is given
 */
export function errorFreeInputs(walk: (sample: Sample) => unknown): readonly string[] {
  const found: string[] = [];
  const single = (pointer: string, estimate: Estimate): number => {
    if (estimate.standardError === null) found.push(pointer);
    return estimate.value;
  };
  walk({
    normal: single,
    logNormal: single,
    pair(pointer, covariance) {
      if (covariance === null) found.push(pointer);
      return [0, 0];
    },
  });
  return found;
}

/**
 * The estimates but for one input, to see what depends on it.
 *
 * @param only its pointer
 * @param factor by which it is multiplied; of an activation pair, k
 */
export function moved(only: string, factor: number): Sample {
  const single = (pointer: string, { value }: Estimate): number =>
    pointer === only ? value * factor : value;
  return {
    normal: single,
    logNormal: single,
    pair: (pointer) => [pointer === only ? Math.log(factor) : 0, 0],
  };
}
