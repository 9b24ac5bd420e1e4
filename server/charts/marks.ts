import type { Area, Mark, Rule } from "./figure.js";
import { type Box, clipPolyline, type Point, simplified } from "./geometry.js";
import type { Frame } from "./plotAxes.js";
import type { Primitive } from "./primitive.js";
import { filledBox, filledOutline, shapeAt, strokeAlong } from "./strokes.js";

/** The part of an area that lies on the panel; null where none does. */
export function areaBox(area: Area, { box, x, y }: Frame): Box | null {
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

/** The two ends of a rule; null where it lies beyond the panel. */
export function rulePoints(rule: Rule, { box, x, y }: Frame): readonly Point[] | null {
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

/** Points of a line on the paper. */
export function placesOf(
  points: readonly (readonly [number, number] | null)[],
  { x, y }: Frame,
): (Point | null)[] {
  return points.map((point) => (point === null ? null : [x(point[0]), y(point[1])]));
}

/** Whether a place lies in the frame. */
export function onFrame([x, y]: Point, { box }: Frame): boolean {
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
