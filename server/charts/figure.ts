import type { Reading } from "./readings.js";

/**
 * A figure as plain data: what it shows, in which panels, and the same numbers as a table. Nothing here knows
 * how wide the paper is; `layout` turns a figure into rectangles, paths and texts for one width.
 */
export interface Figure {
  readonly id: string;
  readonly title: string;
  /** what the figure shows, with the numbers of this case */
  readonly sentence: string;
  /** drawn one above the other; those with the same `xAxis` object line up */
  readonly panels: readonly Panel[];
  /** what a reader must know to read the marks, one line each, printed under the panels */
  readonly captions: readonly string[];
  readonly table: Table;
  /** what a pointer is answered with; absent where every value stands beside its mark */
  readonly readings?: readonly Reading[];
}

interface Table {
  readonly columns: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

export type Panel = PlotPanel | LanesPanel;

/** Marks over two axes. */
export interface PlotPanel {
  readonly type: "plot";
  /** of the frame alone, without axes and labels */
  readonly height: number;
  readonly xAxis: Axis;
  readonly yAxis: Axis;
  /** the same horizontal scale read in another unit, along the top */
  readonly topAxis?: SecondAxis;
  /** the same vertical scale read in another unit, on the right */
  readonly rightAxis?: SecondAxis;
  readonly marks: readonly Mark[];
}

/** Named rows over one horizontal axis. */
export interface LanesPanel {
  readonly type: "lanes";
  readonly xAxis: Axis;
  /** false where the next panel continues the same axis */
  readonly axisShown: boolean;
  readonly lanes: readonly Lane[];
  /** vertical rules, areas and hatching across all lanes; those with a name stand in the key */
  readonly marks: readonly (Rule | Area)[];
  /** further samples for the key, such as the fills of spans */
  readonly key: readonly (Area & { readonly name: string })[];
}

export interface Axis {
  readonly scale: "linear" | "log";
  readonly domain: readonly [number, number];
  readonly label: string;
  /** named places; absent: round numbers, or powers of ten where the scale is logarithmic */
  readonly ticks?: readonly Tick[];
}

interface SecondAxis {
  readonly label: string;
  /** `value` is on the scale of the axis it stands beside */
  readonly ticks: readonly Tick[];
}

export interface Tick {
  readonly value: number;
  readonly text: string;
}

export type Mark = Band | Line | Points | Rule | Area | Note;

/** The area between two curves. */
export interface Band {
  readonly type: "band";
  readonly tone: Tone;
  readonly points: readonly {
    readonly x: number;
    readonly low: number;
    readonly high: number;
  }[];
  /** for the key under the panel */
  readonly name?: string;
}

export interface Line {
  readonly type: "line";
  readonly tone: Tone;
  readonly dash: Dash;
  readonly weight: Weight;
  /** null interrupts the line */
  readonly points: readonly (readonly [number, number] | null)[];
  /** a short word that stands on the line whatever the room */
  readonly tag?: string;
  /** written beside the line where there is room, otherwise in the key */
  readonly name?: string;
  /** the name belongs in the key: beside the line it could be taken for that of something else */
  readonly keyed?: true;
}

export interface Points {
  readonly type: "points";
  readonly tone: Tone;
  readonly shape: Shape;
  readonly points: readonly (readonly [number, number])[];
  /** for the key under the panel */
  readonly name?: string;
}

/** A straight line across the panel at one value of one axis. */
export interface Rule {
  readonly type: "rule";
  readonly across: "x" | "y";
  readonly value: number;
  readonly tone: Tone;
  readonly dash: Dash;
  readonly weight: Weight;
  /** a rule across x is labelled over the panel, one across y at its right end */
  readonly label?: string;
  /** for the key under the panel */
  readonly name?: string;
}

/** A part of an axis, marked over the whole panel. */
export interface Area {
  readonly type: "area";
  readonly across: "x" | "y";
  readonly from: number;
  readonly to: number;
  readonly fill: Fill;
  readonly tone: Tone;
  /** for the key under the panel */
  readonly name?: string;
}

/** A mark at one place with words beside it. */
interface Note {
  readonly type: "note";
  readonly x: number;
  readonly y: number;
  readonly tone: Tone;
  readonly shape: Shape;
  readonly text: string;
}

export interface Lane {
  readonly label: string;
  /** a second, quieter line of the label */
  readonly detail: string | null;
  readonly height: "rung" | "lane" | "thick";
  /** set apart from the lane above by a gap and a thin line */
  readonly apart: boolean;
  readonly spans: readonly LaneSpan[];
  readonly marks: readonly LaneMark[];
  /** words in the lane where no mark can stand */
  readonly text: string | null;
  /** a word at the lane's right end: what it says about the plan */
  readonly verdict: string | null;
}

/** A stretch of a lane. */
export interface LaneSpan {
  readonly from: number;
  readonly to: number;
  readonly fill: Fill;
  readonly tone: Tone;
  /** part of the lane's height, about its middle */
  readonly breadth: number;
  readonly outlined: boolean;
}

/** A value on a lane, with its interval and its words. */
export interface LaneMark {
  readonly value: number;
  readonly interval: readonly [number, number] | null;
  readonly tone: Tone;
  readonly shape: Shape;
  readonly text: string;
  /** a thin line from the mark to the bottom of the panel */
  readonly dropped: boolean;
}

export type Tone = "ink" | "quiet" | "faint" | "reaction" | "decomposition" | "limit" | "removal" | "plan";
export type Fill = "solid" | "tint" | "pale" | "hatched";
export type Dash = "solid" | "dashed" | "dotted" | "dashdot" | "longdash";
export type Weight = "thin" | "normal" | "strong";
export type Shape = "circle" | "ring" | "diamond" | "square" | "triangle" | "cross";
