import { onAxis, scaleOf } from "./axes.js";
import type { Area, Mark, PlotPanel, Rule } from "./figure.js";
import { placeFlags } from "./flags.js";
import { type Box, clipPolyline, type Point, simplified } from "./geometry.js";
import { type KeyEntry, layoutKey } from "./key.js";
import { type Obstacles, type PlacedText, placeAlong, placeBeside } from "./placing.js";
import { axisRoom, type Frame, gridLines, plotAxes, topAxisRoom } from "./plotAxes.js";
import type { Primitive } from "./primitive.js";
import { filledBox, filledOutline, rectangle, shapeAt, strokeAlong, textAt } from "./strokes.js";

/** What a panel became, and where the next one may begin. */
export interface LaidOutPanel {
  readonly primitives: readonly Primitive[];
  readonly bottom: number;
}

const flagRow = 15;

/**
 * Lays out a panel with two axes.
 *
 * @param left x of the frame's left edge
 * @param right x of the frame's right edge
 * @param top y at which the panel may begin
 */
export function layoutPlot(panel: PlotPanel, left: number, right: number, top: number): LaidOutPanel {
  const x = scaleOf(panel.xAxis, left, right);
  const flags = placeFlags(
    panel.marks.flatMap((mark) =>
      mark.type === "rule" &&
      mark.across === "x" &&
      mark.label !== undefined &&
      onAxis(panel.xAxis, mark.value)
        ? [{ x: x(mark.value), text: mark.label }]
        : [],
    ),
    [left - 24, right + 12],
  );
  const rows = flags.length === 0 ? 0 : 1 + Math.max(...flags.map((flag) => flag.row));
  const frameTop = top + 6 + (panel.topAxis === undefined ? 0 : topAxisRoom) + rows * flagRow;
  const box: Box = { left, right, top: frameTop, bottom: frameTop + panel.height };
  const frame: Frame = { box, x, y: scaleOf(panel.yAxis, box.bottom, box.top) };

  const key: KeyEntry[] = [];
  const primitives: Primitive[] = [
    ...panel.marks.flatMap((mark) => (mark.type === "area" ? drawArea(mark, frame) : [])),
    ...gridLines(panel, frame),
    ...panel.marks.flatMap((mark) => (mark.type === "area" ? [] : drawMark(mark, frame))),
    ...words(panel, frame, key),
    ...flagWords(flags, box.top),
    ...plotAxes(panel, frame),
  ];
  const named = layoutKey(key, left, right, box.bottom + axisRoom);
  return { primitives: [...primitives, ...named.primitives], bottom: named.bottom };
}

/** Words over vertical rules, with the line that ties each to its rule. */
export function flagWords(flags: ReturnType<typeof placeFlags>, top: number): Primitive[] {
  return flags.flatMap((flag) => {
    const base = top - 5 - flag.row * flagRow;
    const tie: readonly Point[] = [
      [flag.x, base - 8],
      [flag.x, top],
    ];
    return [
      strokeAlong(tie, "quiet", "solid", "thin"),
      flag.side === "right"
        ? textAt(flag.left + 4, base, flag.text, { tone: "ink" })
        : textAt(flag.right - 4, base, flag.text, { tone: "ink", anchor: "end" }),
    ];
  });
}

/** The part of an area that lies on the panel; null where none does. */
function areaBox(area: Area, { box, x, y }: Frame): Box | null {
  const scale = area.across === "x" ? x : y;
  const [low, high] = area.across === "x" ? [box.left, box.right] : [box.top, box.bottom];
  const ends = [scale(area.from), scale(area.to)].sort((a, b) => a - b) as [number, number];
  const [from, to] = [Math.max(low, ends[0]), Math.min(high, ends[1])];
  if (!(to > from)) return null;
  return area.across === "x" ? { ...box, left: from, right: to } : { ...box, top: from, bottom: to };
}

/** A part of an axis over the whole panel. */
export function drawArea(area: Area, frame: Frame): Primitive[] {
  const box = areaBox(area, frame);
  return box === null ? [] : filledBox(box, area.fill, area.tone, false);
}

function rulePoints(rule: Rule, { box, x, y }: Frame): readonly Point[] | null {
  const at = rule.across === "x" ? x(rule.value) : y(rule.value);
  const [low, high] = rule.across === "x" ? [box.left, box.right] : [box.top, box.bottom];
  if (!(at >= low && at <= high)) return null;
  return rule.across === "x"
    ? [
        [at, box.top],
        [at, box.bottom],
      ]
    : [
        [box.left, at],
        [box.right, at],
      ];
}

function placesOf(points: readonly (readonly [number, number] | null)[], { x, y }: Frame): (Point | null)[] {
  return points.map((point) => (point === null ? null : [x(point[0]), y(point[1])]));
}

function onFrame([x, y]: Point, { box }: Frame): boolean {
  return x >= box.left && x <= box.right && y >= box.top && y <= box.bottom;
}

/** The primitives of one mark, cut to the frame. */
export function drawMark(mark: Mark, frame: Frame): Primitive[] {
  switch (mark.type) {
    case "area":
      return drawArea(mark, frame);
    case "band": {
      const inFrame = (value: number) => Math.min(frame.box.bottom, Math.max(frame.box.top, frame.y(value)));
      const xs = mark.points.filter(({ x }) => frame.x(x) >= frame.box.left && frame.x(x) <= frame.box.right);
      if (xs.length < 2) return [];
      const upper = simplified(
        xs.map(({ x, high }): Point => [frame.x(x), inFrame(high)]),
        0.2,
      );
      const lower = simplified(
        xs.map(({ x, low }): Point => [frame.x(x), inFrame(low)]),
        0.2,
      );
      return [filledOutline([...upper, ...lower.reverse()], mark.tone, "tint")];
    }
    case "line":
      return clipPolyline(placesOf(mark.points, frame), frame.box).map((piece) =>
        strokeAlong(simplified(piece, 0.2), mark.tone, mark.dash, mark.weight),
      );
    case "points":
      return mark.points.flatMap(([x, y]) => {
        const place: Point = [frame.x(x), frame.y(y)];
        return onFrame(place, frame) ? [shapeAt(place, mark.shape, mark.tone)] : [];
      });
    case "rule": {
      const points = rulePoints(mark, frame);
      return points === null ? [] : [strokeAlong(points, mark.tone, mark.dash, mark.weight)];
    }
    case "note": {
      const place: Point = [frame.x(mark.x), frame.y(mark.y)];
      return onFrame(place, frame) ? [shapeAt(place, mark.shape, mark.tone)] : [];
    }
  }
}

/** Names and notes where there is room; what finds none is added to the key. */
function words(panel: PlotPanel, frame: Frame, key: KeyEntry[]): Primitive[] {
  const obstacles = obstaclesOf(panel, frame);
  const placed: (PlacedText | null)[] = [];
  for (const mark of panel.marks) {
    const style = { tone: mark.tone === "faint" ? "quiet" : mark.tone } as const;
    if (mark.type === "note") {
      const place: Point = [frame.x(mark.x), frame.y(mark.y)];
      if (onFrame(place, frame))
        placed.push(placeBeside(place, mark.text, { ...style, bold: true }, obstacles));
    } else if (mark.type === "rule" && mark.across === "y" && mark.label !== undefined) {
      const points = rulePoints(mark, frame);
      if (points !== null) placed.push(placeAlong(points, mark.label, style, obstacles, "anywhere"));
    }
  }
  for (const mark of panel.marks) {
    if (!("name" in mark) || mark.name === undefined) continue;
    const direct = mark.type === "line" && mark.keyed === undefined;
    const pieces = mark.type === "line" ? clipPolyline(placesOf(mark.points, frame), frame.box) : [];
    const longest = pieces.sort((a, b) => b.length - a.length)[0];
    const found =
      longest === undefined || !direct
        ? null
        : placeAlong(longest, mark.name, { tone: mark.tone }, obstacles, "clear");
    if (found !== null) placed.push(found);
    else if (mark.type !== "line" || pieces.length > 0) key.push({ ...mark, name: mark.name });
  }
  return placed.flatMap((each) => {
    if (each === null) return [];
    return each.crossed ? [rectangle(each.box, "faint", "paper"), each.text] : [each.text];
  });
}

function obstaclesOf(panel: PlotPanel, frame: Frame): Obstacles {
  const lines: Point[][] = [];
  const boxes: Box[] = [];
  const hatched: Box[] = [];
  const keepOff = (place: Point) => {
    if (onFrame(place, frame))
      boxes.push({ left: place[0] - 5, right: place[0] + 5, top: place[1] - 5, bottom: place[1] + 5 });
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
