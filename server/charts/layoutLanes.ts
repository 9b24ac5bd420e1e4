import { onAxis, type Scale, scaleOf } from "./axes.js";
import type { Lane, LaneMark, LanesPanel } from "./figure.js";
import { placeFlags } from "./flags.js";
import type { Box, Point } from "./geometry.js";
import { drawArea, drawMark, flagWords, type LaidOutPanel } from "./layoutPlot.js";
import { textSizes } from "./palette.js";
import { axisAcross, axisRoom, gridAcross } from "./plotAxes.js";
import type { Primitive } from "./primitive.js";
import { filledBox, rectangle, shapeAt, strokeAlong, textAt, textBox } from "./strokes.js";
import { textWidth } from "./textWidth.js";

const heights = { rung: 25, lane: 24, thick: 34 } as const;
const apartGap = 14;
const aboveRoom = 16;

/** Room left of the frame for the names of the lanes where they stand beside them. */
export function lanesLeft(panel: LanesPanel): number {
  return (
    14 +
    Math.max(0, ...panel.lanes.map((lane) => Math.max(labelWidth(lane.label), labelWidth(lane.detail ?? ""))))
  );
}

function labelWidth(text: string): number {
  return textWidth(text, textSizes.small);
}

interface LanePlace {
  readonly lane: Lane;
  /** baseline of a label above the lane; null where it stands beside it */
  readonly labelAbove: number | null;
  readonly box: Box;
}

/**
 * Lays out named rows over one horizontal axis.
 *
 * @param labelsLeft x at which the names begin; the same as `left` where they stand above their lanes
 * @param left x of the frame's left edge
 * @param right x of the frame's right edge
 * @param top y at which the panel may begin
 */
export function layoutLanes(
  panel: LanesPanel,
  labelsLeft: number,
  left: number,
  right: number,
  top: number,
): LaidOutPanel {
  const x = scaleOf(panel.xAxis, left, right);
  const flags = placeFlags(
    panel.marks.flatMap((mark) =>
      mark.type === "rule" && mark.label !== undefined && onAxis(panel.xAxis, mark.value)
        ? [{ x: x(mark.value), text: mark.label }]
        : [],
    ),
    [labelsLeft, right + 12],
  );
  const rows = flags.length === 0 ? 0 : 1 + Math.max(...flags.map((flag) => flag.row));
  const frameTop = top + 4 + rows * 15;
  const places = placeLanes(panel.lanes, labelsLeft === left, left, right, frameTop, x);
  const bottom = (places.at(-1)?.box.bottom ?? frameTop) + 4;
  const box: Box = { left, right, top: frameTop, bottom };
  const frame = { box, x, y: scaleOf({ scale: "linear", domain: [0, 1], label: "" }, bottom, frameTop) };
  const primitives: Primitive[] = [
    ...panel.marks.flatMap((mark) => (mark.type === "area" ? drawArea(mark, frame) : [])),
    ...gridAcross(panel.xAxis, box, x),
    ...places.flatMap((place) => drawSpans(place, x)),
    ...panel.marks.flatMap((mark) => (mark.type === "rule" ? drawMark(mark, frame) : [])),
    ...places.flatMap((place) => drops(place, x, bottom)),
    ...places.flatMap((place) => drawLane(place, labelsLeft, x)),
    ...flagWords(flags, frameTop),
    ...(panel.axisShown ? axisAcross(panel.xAxis, box, x) : []),
  ];
  return { primitives, bottom: panel.axisShown ? bottom + axisRoom : bottom };
}

function placeLanes(
  lanes: readonly Lane[],
  above: boolean,
  left: number,
  right: number,
  top: number,
  x: Scale,
): LanePlace[] {
  let y = top;
  return lanes.map((lane) => {
    if (lane.apart) y += apartGap;
    const labelAbove = above ? y + 12 : null;
    if (above) y += aboveRoom;
    const crowded = lane.marks.some((mark) => besideMark(mark, left, right, x) === null);
    const height = heights[lane.height] + (crowded ? 15 : 0);
    const box = { left, right, top: y, bottom: y + height };
    y += height;
    return { lane, labelAbove, box };
  });
}

/** Reach of a mark with its interval, cut to the frame. */
function reach(mark: LaneMark, left: number, right: number, x: Scale): readonly [number, number] {
  const ends = [mark.value, ...(mark.interval ?? [])].map(x);
  return [Math.max(left, Math.min(...ends)) - 6, Math.min(right, Math.max(...ends)) + 6];
}

/** The side of a mark on which its words fit; null where they do on neither. */
function besideMark(mark: LaneMark, left: number, right: number, x: Scale): "right" | "left" | null {
  const width = textWidth(mark.text, textSizes.normal, true) + 6;
  const [from, to] = reach(mark, left, right, x);
  if (to + width <= right + 10) return "right";
  return from - width >= left ? "left" : null;
}

function drawSpans({ lane, box }: LanePlace, x: Scale): Primitive[] {
  const middle = (box.top + box.bottom) / 2;
  const half = (box.bottom - box.top) / 2 - 3;
  return lane.spans.flatMap((span) => {
    const left = Math.max(box.left, x(span.from));
    const right = Math.min(box.right, x(span.to));
    const at = { left, right, top: middle - half * span.breadth, bottom: middle + half * span.breadth };
    return right > left ? filledBox(at, span.fill, span.tone, span.outlined) : [];
  });
}

function drops({ lane, box }: LanePlace, x: Scale, bottom: number): Primitive[] {
  return lane.marks.flatMap((mark) => {
    const at = x(mark.value);
    if (!mark.dropped || at < box.left || at > box.right) return [];
    const fall: readonly Point[] = [
      [at, (box.top + box.bottom) / 2],
      [at, bottom],
    ];
    return [strokeAlong(fall, mark.tone, "dotted", "thin")];
  });
}

function drawLane({ lane, labelAbove, box }: LanePlace, labelsLeft: number, x: Scale): Primitive[] {
  const middle = (box.top + box.bottom) / 2;
  const primitives: Primitive[] = [];
  if (lane.apart) {
    const y = (labelAbove === null ? box.top : labelAbove - 12) - apartGap / 2;
    primitives.push(
      strokeAlong(
        [
          [labelsLeft, y],
          [box.right, y],
        ],
        "quiet",
        "solid",
        "thin",
      ),
    );
  }
  const strong = lane.height === "thick";
  if (labelAbove !== null) {
    const detail = lane.detail === null ? "" : `: ${lane.detail}`;
    const label = textAt(box.left, labelAbove, `${lane.label}${detail}`, { tone: "ink", bold: strong });
    primitives.push(rectangle(textBox(label), "faint", "paper"), label);
  } else {
    const base = lane.detail === null ? middle + 4 : middle - 3;
    primitives.push(textAt(labelsLeft, base, lane.label, { tone: "ink", bold: strong }));
    if (lane.detail !== null) primitives.push(textAt(labelsLeft, base + 14, lane.detail));
  }
  for (const mark of lane.marks) primitives.push(...drawLaneMark(mark, box, x));
  if (lane.text !== null) {
    const text = textAt(box.left + 8, middle + 4, lane.text, { tone: "ink" });
    const ground = textBox(text);
    primitives.push(
      rectangle({ ...ground, left: ground.left - 4, right: ground.right + 4 }, "faint", "paper"),
      text,
    );
  }
  return primitives;
}

function drawLaneMark(mark: LaneMark, box: Box, x: Scale): Primitive[] {
  const side = besideMark(mark, box.left, box.right, x);
  const middle = side === null ? box.top + heights.rung / 2 : (box.top + box.bottom) / 2;
  const primitives: Primitive[] = [];
  if (mark.interval !== null) primitives.push(...whisker(mark.interval, middle, mark, box, x));
  const at = Math.min(box.right, Math.max(box.left, x(mark.value)));
  primitives.push(shapeAt([at, middle], mark.shape, mark.tone, 5));
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
          [at, y - 4.5],
          [at, y + 4.5],
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
