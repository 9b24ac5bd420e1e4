/** A number as it was measured or assumed, SI, with its standard error where one was given. */
export interface Estimate {
  readonly value: number;
  readonly standardError: number | null;
}
