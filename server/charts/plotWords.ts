import type { Mark, PlotPanel } from "./figure.js";
import { type Box, clipPolyline, type Point, simplified } from "./geometry.js";
import type { KeyEntry } from "./key.js";
import { areaBox, onFrame, placesOf, rulePoints } from "./marks.js";
import { type Obstacles, type PlacedText, placeAlong, placeBeside, placeOn } from "./placing.js";
import type { Frame } from "./plotAxes.js";
import type { Primitive } from "./primitive.js";
import { rectangle } from "./strokes.js";

/** The words on a panel, and what found no room and goes to the key. */
export interface PlotWords {
  readonly primitives: readonly Primitive[];
  readonly key: readonly KeyEntry[];
}

/** Stands names, tags and notes where there is room. Notes come first, then short words, names of lines last. */
export function plotWords(panel: PlotPanel, frame: Frame): PlotWords {
  const obstacles = obstaclesOf(panel, frame);
  const placed: PlacedText[] = [];
  const key: KeyEntry[] = [];
  const settle = (found: PlacedText | null, otherwise: KeyEntry | null) => {
    if (found !== null) placed.push(found);
    else if (otherwise !== null) key.push(otherwise);
  };
  for (const mark of panel.marks) {
    if (mark.type === "note") {
      const place: Point = [frame.x(mark.x), frame.y(mark.y)];
      if (!onFrame(place, frame)) continue;
      const { tone, shape, text } = mark;
      settle(placeBeside(place, text, { tone, bold: true }, obstacles), {
        type: "points",
        tone,
        shape,
        points: [],
        name: text,
      });
    } else if (mark.type === "rule" && mark.across === "y" && mark.label !== undefined) {
      const points = rulePoints(mark, frame);
      if (points === null) continue;
      settle(placeAlong(points, mark.label, { tone: mark.tone }, obstacles, "anywhere"), {
        ...mark,
        name: mark.label,
      });
    } else if (mark.type === "line" && mark.tag !== undefined) {
      const drawn = longestPiece(mark, frame);
      if (drawn !== null) settle(placeOn(drawn, mark.tag, { tone: mark.tone, bold: true }, obstacles), null);
    }
  }
  for (const mark of panel.marks) {
    if (mark.type === "note" || mark.name === undefined) continue;
    const entry: KeyEntry = { ...mark, name: mark.name };
    if (mark.type !== "line") key.push(entry);
    else {
      const drawn = longestPiece(mark, frame);
      if (drawn === null) continue;
      settle(
        mark.keyed ? null : placeAlong(drawn, mark.name, { tone: mark.tone }, obstacles, "clear"),
        entry,
      );
    }
  }
  const primitives = placed.flatMap((each): Primitive[] =>
    each.crossed ? [rectangle(each.box, "faint", "paper"), each.text] : [each.text],
  );
  return { primitives, key };
}

function longestPiece(mark: Extract<Mark, { type: "line" }>, frame: Frame): readonly Point[] | null {
  const pieces = clipPolyline(placesOf(mark.points, frame), frame.box);
  return pieces.sort((a, b) => lengthOf(b) - lengthOf(a))[0] ?? null;
}

function lengthOf(points: readonly Point[]): number {
  return points.slice(1).reduce((sum, [x, y], at) => {
    const [x0, y0] = points[at] as Point;
    return sum + Math.hypot(x - x0, y - y0);
  }, 0);
}

function obstaclesOf(panel: PlotPanel, frame: Frame): Obstacles {
  const lines: Point[][] = [];
  const boxes: Box[] = [];
  const hatched: Box[] = [];
  const keepOff = (place: Point) => {
    if (onFrame(place, frame))
      boxes.push({
        left: place[0] - 5,
        right: place[0] + 5,
        top: place[1] - 5,
        bottom: place[1] + 5,
      });
  };
  for (const mark of panel.marks) {
    if (mark.type === "line")
      lines.push(
        ...clipPolyline(placesOf(mark.points, frame), frame.box).map((piece) => simplified(piece, 0.5)),
      );
    if (mark.type === "rule") {
      const points = rulePoints(mark, frame);
      if (points !== null) lines.push([...points]);
    }
    if (mark.type === "points") for (const [x, y] of mark.points) keepOff([frame.x(x), frame.y(y)]);
    if (mark.type === "note") keepOff([frame.x(mark.x), frame.y(mark.y)]);
    if (mark.type === "area" && mark.fill === "hatched") {
      const box = areaBox(mark, frame);
      if (box !== null) hatched.push(box);
    }
  }
  return { frame: frame.box, boxes, lines, hatched };
}
