/** A failure and what happens after it, in plain SI numbers. */
export interface Timeline {
  readonly name: string;
  /** s from the start of the feed (batch: of the reaction), or the start that is worst */
  readonly at: number | "worst";
  /** temperature of the contents until the failure, K; null: the process temperature */
  readonly startTemperature: number | null;
  /** s after the failure; can only lengthen what is shown, never change a verdict */
  readonly horizon: number | null;
  /** s; null: not stated */
  readonly response: Response | null;
  /** in the order of time, the first of them the failure itself, after 0 */
  readonly changes: readonly Change[];
}

/** How long people and plant take, s. */
export interface Response {
  readonly detection: number;
  readonly decision: number;
  readonly action: number;
}

/** One moment of a timeline. A field that is absent stays as it was. */
export interface Change {
  /** s after the failure */
  readonly after: number;
  /** part of the full coolant flow, 0..1 */
  readonly coolantFlow?: number;
  /** part of the heat transfer UA, 0..1 */
  readonly heatTransfer?: number;
  /** K */
  readonly coolantTemperature?: number;
  readonly feed?: "stop" | "continue";
  readonly agitator?: "on" | "off";
  /** part of the contents that reacts as if mixed, 0..1 */
  readonly mixing?: number;
  readonly quench?: Quench;
}

/** A cold charge dropped into the contents at once: kg, J/(kg K), kg/m^3, K. */
export interface Quench {
  readonly mass: number;
  readonly heatCapacity: number;
  readonly density: number;
  readonly temperature: number;
}

/** Nothing is watched for less than this after the last thing that happens, s. */
export const watch = 86_400;

/**
 * Time of the last change of a timeline.
 *
 * @returns s after the failure
 */
export function lastChange(timeline: Timeline): number {
  return timeline.changes.reduce((latest, change) => Math.max(latest, change.after), 0);
}

/**
 * Whether the feed stops with the failure and stays stopped: then MTSR covers it.
 */
export function feedStaysStopped(timeline: Timeline): boolean {
  const [first, ...later] = timeline.changes;
  return first?.feed === "stop" && later.every((change) => change.feed !== "continue");
}

/**
 * Whether the agitator is off for any time, so that the run has to be made with both assumptions on mixing.
 */
export function agitatorStops(timeline: Timeline): boolean {
  return timeline.changes.some((change) => change.agitator === "off");
}
