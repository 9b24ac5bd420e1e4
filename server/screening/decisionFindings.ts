/** What moves one figure of the findings. Outputs that are not known are left out. */
export interface DriverFindings {
  readonly output: "td24_K" | "mtsr_K" | "upper_K";
  /** inputs on which it depends and that carry no error, with a null share; then the others, greatest share first */
  readonly shares: readonly {
    readonly pointer: string;
    readonly label: string;
    /** (p95 - p05)^2 with only this input drawn, over the sum of all inputs */
    readonly share: number | null;
  }[];
  /** why the shares of inputs with an error are not told; null where they are */
  readonly why: string | null;
}

/** The rate constant to measure next. Null: no fitted pair to improve. */
export interface NextMeasurements {
  /** for ln k at the process temperature */
  readonly reaction: NextMeasurementFindings | null;
  /** for ln k at T_D24 */
  readonly decomposition: NextMeasurementFindings | null;
}

export interface NextMeasurementFindings {
  /** where one more rate constant helps most; null: see `why` */
  readonly at_K: number | null;
  /** of that rate constant: its standard error over its value */
  readonly relativeError: number;
  readonly relativeErrorFrom: "fit" | "assumed";
  /** the temperatures that were looked at: the fitted range */
  readonly range_K: readonly [number, number] | null;
  /** the temperature at which ln k matters */
  readonly matters_K: number | null;
  /** standard deviation of ln k there */
  readonly deviationNow: number | null;
  readonly deviationThen: number | null;
  /** the same deviation against the temperature of the new measurement */
  readonly curve: readonly { readonly temperature_K: number; readonly deviation: number }[];
  /** why nothing can be advised; null where it can */
  readonly why: string | null;
}
