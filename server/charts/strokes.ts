import { line } from "d3-shape";
import type { Dash, Fill, Shape, Tone, Weight } from "./figure.js";
import { type Box, clipSegment, type Point } from "./geometry.js";
import { textSizes } from "./palette.js";
import { type Paint, type Path, type Primitive, type Rectangle, rounded, type Text } from "./primitive.js";
import { textWidth } from "./textWidth.js";

const toPath = line<Point>().digits(2);

/** A stroke along a polyline. */
export function strokeAlong(points: readonly Point[], tone: Tone, dash: Dash, weight: Weight): Path {
  return {
    kind: "path",
    d: toPath(points) ?? "",
    tone,
    fill: "none",
    stroke: { dash, weight },
  };
}

/** A filled outline. */
export function filledOutline(points: readonly Point[], tone: Tone, fill: Paint): Path {
  return {
    kind: "path",
    d: `${toPath(points) ?? ""}Z`,
    tone,
    fill,
    stroke: null,
  };
}

/** A rectangle; `outlined` draws its edge in the tone. */
export function rectangle(box: Box, tone: Tone, fill: Paint, outlined = false): Rectangle {
  return {
    kind: "rect",
    x: rounded(box.left),
    y: rounded(box.top),
    width: rounded(box.right - box.left),
    height: rounded(box.bottom - box.top),
    tone,
    fill,
    stroke: outlined ? { dash: "solid", weight: "thin" } : null,
  };
}

/** Strokes at 45 degrees that fill a box, as one path: the same in every drawing, whatever knows patterns. */
function hatching(box: Box, tone: Tone): Path {
  const spacing = 7;
  const height = box.bottom - box.top;
  let d = "";
  for (let x = Math.ceil((box.left - height) / spacing) * spacing; x < box.right; x += spacing) {
    const cut = clipSegment([x, box.bottom], [x + height, box.top], box);
    if (cut !== null) d += toPath(cut) ?? "";
  }
  return {
    kind: "path",
    d,
    tone,
    fill: "none",
    stroke: { dash: "solid", weight: "thin" },
  };
}

/** A stretch or an area in one of the four fills. */
export function filledBox(box: Box, fill: Fill, tone: Tone, outlined: boolean): Primitive[] {
  if (fill === "hatched")
    return outlined ? [rectangle(box, tone, "none", true), hatching(box, tone)] : [hatching(box, tone)];
  return [rectangle(box, tone, fill === "solid" ? "tone" : fill, outlined)];
}

/** A mark about a place. Each shape has its own outline, so that marks differ without colour. */
export function shapeAt([x, y]: Point, shape: Shape, tone: Tone, radius = 4.5): Path {
  const corners = (...around: readonly Point[]) =>
    around.map(([dx, dy]): Point => [x + dx * radius, y + dy * radius]);
  switch (shape) {
    case "circle":
    case "ring": {
      const [left, right, r, middle] = [x - radius, x + radius, radius, y].map(rounded);
      const d = `M${left},${middle}A${r},${r},0,1,1,${right},${middle}A${r},${r},0,1,1,${left},${middle}Z`;
      return shape === "circle"
        ? { kind: "path", d, tone, fill: "tone", stroke: null }
        : {
            kind: "path",
            d,
            tone,
            fill: "paper",
            stroke: { dash: "solid", weight: "normal" },
          };
    }
    case "diamond":
      return filledOutline(corners([0, -1.3], [1.3, 0], [0, 1.3], [-1.3, 0]), tone, "tone");
    case "square":
      return filledOutline(corners([-0.9, -0.9], [0.9, -0.9], [0.9, 0.9], [-0.9, 0.9]), tone, "tone");
    case "triangle":
      return filledOutline(corners([0, -1.2], [1.15, 0.9], [-1.15, 0.9]), tone, "tone");
    case "cross": {
      const d = `${toPath(corners([-0.8, -0.8], [0.8, 0.8])) ?? ""}${toPath(corners([-0.8, 0.8], [0.8, -0.8])) ?? ""}`;
      return {
        kind: "path",
        d,
        tone,
        fill: "none",
        stroke: { dash: "solid", weight: "normal" },
      };
    }
  }
}

/** A line of text; what is not said is small, quiet and starts at its place. */
export function textAt(x: number, y: number, text: string, more: Partial<Omit<Text, "kind">> = {}): Text {
  return {
    kind: "text",
    x: rounded(x),
    y: rounded(y),
    text,
    anchor: "start",
    size: "small",
    bold: false,
    tone: "quiet",
    upright: false,
    ...more,
  };
}

/** The room a line of text takes, upright text aside. */
export function textBox({ x, y, text, anchor, size, bold }: Text): Box {
  const height = textSizes[size];
  const width = textWidth(text, height, bold);
  const left = anchor === "start" ? x : anchor === "end" ? x - width : x - width / 2;
  return {
    left,
    top: y - 0.8 * height,
    right: left + width,
    bottom: y + 0.24 * height,
  };
}

/** A box with a margin. */
export function grown(box: Box, across: number, up: number): Box {
  return {
    left: box.left - across,
    right: box.right + across,
    top: box.top - up,
    bottom: box.bottom + up,
  };
}
