import type { Dash, Tone, Weight } from "./figure.js";
import type { Box } from "./geometry.js";
import type { TextSize } from "./palette.js";

/** What both drawers can draw; coordinates from the top left corner of the figure, y downwards. */
export type Primitive = Rectangle | Path | Text;

export type Paint = "tone" | "tint" | "pale" | "paper" | "none";

export interface Rectangle {
  readonly kind: "rect";
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly tone: Tone;
  readonly fill: Paint;
  readonly stroke: Stroke | null;
}

export interface Stroke {
  readonly dash: Dash;
  readonly weight: Weight;
}

export interface Path {
  readonly kind: "path";
  /** absolute commands M, L, A and Z only */
  readonly d: string;
  readonly tone: Tone;
  readonly fill: Paint;
  readonly stroke: Stroke | null;
}

export interface Text {
  readonly kind: "text";
  readonly x: number;
  /** of the baseline */
  readonly y: number;
  readonly text: string;
  readonly anchor: "start" | "middle" | "end";
  readonly size: TextSize;
  readonly bold: boolean;
  readonly tone: Tone;
  /** turned a quarter to the left about its anchor */
  readonly upright: boolean;
}

/** One figure at one width. */
export interface Layout {
  readonly width: number;
  readonly height: number;
  readonly primitives: readonly Primitive[];
  /** round all plots, without axes and labels; null without a plot */
  readonly frame: Box | null;
}

/** Two decimals are a fiftieth of a pixel: enough, and the pages stay small. */
export function rounded(value: number): number {
  return Math.round(value * 100) / 100 || 0;
}
