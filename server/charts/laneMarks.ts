import type { Scale } from "./axes.js";
import type { LaneMark } from "./figure.js";
import type { Box, Point } from "./geometry.js";
import { textSizes } from "./palette.js";
import type { Primitive, Text } from "./primitive.js";
import { filledOutline, grown, rectangle, shapeAt, strokeAlong, textAt, textBox } from "./strokes.js";
import { textWidth } from "./textWidth.js";

/** Where a mark stands in a lane that has its words underneath. */
const crowdedMiddle = 12;

/** What such a lane is higher by. */
export const crowdedRoom = 15;

/** Reach of a mark with its interval, cut to the frame. */
function reach(mark: LaneMark, left: number, right: number, x: Scale): readonly [number, number] {
  const ends = [mark.value, ...(mark.interval ?? [])].map(x);
  const low = Math.min(right, Math.max(left, Math.min(...ends)));
  const high = Math.max(left, Math.min(right, Math.max(...ends)));
  return [low - 6, high + 6];
}

/** The side of a mark on which its words fit; null where they do on neither. */
export function besideMark(mark: LaneMark, left: number, right: number, x: Scale): "right" | "left" | null {
  const width = textWidth(mark.text, textSizes.normal, true) + 6;
  const [from, to] = reach(mark, left, right, x);
  if (to + width <= right + 10) return "right";
  return from - width >= left ? "left" : null;
}

/** Words over a ground that hides what runs under them. */
export function onClearGround(text: Text): Primitive[] {
  return [rectangle(grown(textBox(text), 4, 0), "faint", "paper"), text];
}

/** A value on a lane with its interval and its words. */
export function drawLaneMark(mark: LaneMark, box: Box, x: Scale): Primitive[] {
  const side = besideMark(mark, box.left, box.right, x);
  const middle = side === null ? box.top + crowdedMiddle : (box.top + box.bottom) / 2;
  const primitives: Primitive[] = [];
  if (mark.interval !== null) primitives.push(...whisker(mark.interval, middle, mark, box, x));
  const at = Math.min(box.right, Math.max(box.left, x(mark.value)));
  if (at === x(mark.value)) primitives.push(shapeAt([at, middle], mark.shape, mark.tone, 4.5));
  else primitives.push(arrowAt(at, middle, at === box.left ? -1 : 1, mark));
  const [from, to] = reach(mark, box.left, box.right, x);
  const style = { size: "normal", bold: true, tone: mark.tone } as const;
  const half = textWidth(mark.text, textSizes.normal, true) / 2;
  const text =
    side === "right"
      ? textAt(to + 3, middle + 4.3, mark.text, style)
      : side === "left"
        ? textAt(from - 3, middle + 4.3, mark.text, { ...style, anchor: "end" })
        : textAt(Math.max(box.left + half, Math.min(box.right - half, at)), middle + 20, mark.text, {
            ...style,
            anchor: "middle",
          });
  if (side !== "right") primitives.push(rectangle(textBox(text), "faint", "paper"));
  return [...primitives, text];
}

/** A value beyond the axis: an arrow that points on from its edge. */
function arrowAt(x: number, y: number, direction: 1 | -1, mark: LaneMark): Primitive {
  const tip = x + 9 * direction;
  return filledOutline(
    [
      [x - 3 * direction, y - 6],
      [tip, y],
      [x - 3 * direction, y + 6],
    ],
    mark.tone,
    "tone",
  );
}

/** The interval of a value; an end beyond the axis is an arrow. */
function whisker(
  interval: readonly [number, number],
  y: number,
  mark: LaneMark,
  box: Box,
  x: Scale,
): Primitive[] {
  const [low, high] = interval.map(x) as [number, number];
  const left = Math.max(box.left, low);
  const right = Math.min(box.right, high);
  const end = (at: number, beyond: boolean, inward: number): readonly Point[] =>
    beyond
      ? [
          [at + 5 * inward, y - 4],
          [at, y],
          [at + 5 * inward, y + 4],
        ]
      : [
          [at, y - 7],
          [at, y + 7],
        ];
  return [
    strokeAlong(
      [
        [left, y],
        [right, y],
      ],
      mark.tone,
      "solid",
      "normal",
    ),
    strokeAlong(end(left, low < box.left, 1), mark.tone, "solid", "normal"),
    strokeAlong(end(right, high > box.right, -1), mark.tone, "solid", "normal"),
  ];
}
