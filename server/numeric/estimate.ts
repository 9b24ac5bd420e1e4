/** A number as it was measured or assumed, SI, with its standard error where one was given. */
export interface Estimate {
  readonly value: number;
  readonly standardError: number | null;
}

/**
 * An estimate that carries no error of its own.
 *
 * @param value SI
 * @returns the estimate, treated as exact by every draw
 */
export function exact(value: number): Estimate {
  return { value, standardError: null };
}
