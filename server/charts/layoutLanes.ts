import { onAxis, type Scale, scaleOf } from "./axes.js";
import type { Lane, LanesPanel } from "./figure.js";
import { placeFlags } from "./flags.js";
import type { Box, Point } from "./geometry.js";
import { type KeyEntry, layoutKey } from "./key.js";
import { besideMark, crowdedRoom, drawLaneMark, onClearGround } from "./laneMarks.js";
import { flagWords, type LaidOutPanel } from "./layoutPlot.js";
import { drawArea, drawMark } from "./marks.js";
import { textSizes } from "./palette.js";
import { axisAcross, axisRoom, gridAcross } from "./plotAxes.js";
import type { Primitive } from "./primitive.js";
import { filledBox, strokeAlong, textAt } from "./strokes.js";
import { shortened, textWidth } from "./textWidth.js";

/** Heights of lanes whose names stand beside them, and of those whose names stand above. */
const heights = {
  beside: { rung: 25, lane: 32, thick: 36 },
  above: { rung: 23, lane: 22, thick: 28 },
} as const;
const apartGap = 14;
const aboveRoom = 17;

/** Room right of the frame for the lanes' verdicts where they stand beside them. */
export function lanesRight(panel: LanesPanel): number {
  return 14 + Math.max(0, ...panel.lanes.map((lane) => labelWidth(lane.verdict ?? "")));
}

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
  const frame = {
    box,
    x,
    y: scaleOf({ scale: "linear", domain: [0, 1], label: "" }, bottom, frameTop),
  };
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
  const entries = [
    ...panel.key,
    ...panel.marks.flatMap((mark): KeyEntry[] =>
      mark.name === undefined ? [] : [{ ...mark, name: mark.name }],
    ),
  ];
  const key = layoutKey(entries, labelsLeft, right, panel.axisShown ? bottom + axisRoom : bottom);
  return { primitives: [...primitives, ...key.primitives], bottom: key.bottom };
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
    const height = heights[above ? "above" : "beside"][lane.height] + (crowded ? crowdedRoom : 0);
    const box = { left, right, top: y, bottom: y + height };
    y += height;
    return { lane, labelAbove, box };
  });
}

function drawSpans({ lane, box }: LanePlace, x: Scale): Primitive[] {
  const middle = (box.top + box.bottom) / 2;
  const half = (box.bottom - box.top) / 2 - 3;
  return lane.spans.flatMap((span) => {
    const left = Math.max(box.left, x(span.from));
    const right = Math.min(box.right, x(span.to));
    const at = {
      left,
      right,
      top: middle - half * span.breadth,
      bottom: middle + half * span.breadth,
    };
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
  const bold = lane.height === "thick";
  if (labelAbove !== null) {
    const verdict = lane.verdict ?? "";
    const whole = lane.detail === null ? lane.label : `${lane.label}: ${lane.detail}`;
    const room = box.right - box.left - labelWidth(verdict) - 8;
    const label = textAt(box.left, labelAbove, labelWidth(whole) > room ? lane.label : whole, {
      tone: "ink",
      bold,
    });
    primitives.push(...onClearGround(label));
    if (verdict !== "")
      primitives.push(...onClearGround(textAt(box.right, labelAbove, verdict, { anchor: "end" })));
  } else {
    const base = lane.detail === null ? middle + 4 : middle - 2;
    primitives.push(textAt(labelsLeft, base, lane.label, { tone: "ink", bold }));
    if (lane.detail !== null) primitives.push(textAt(labelsLeft, base + 13, lane.detail));
    if (lane.verdict !== null)
      primitives.push(textAt(box.right + 8, middle + 4, lane.verdict, { tone: "ink" }));
  }
  for (const mark of lane.marks) primitives.push(...drawLaneMark(mark, box, x));
  if (lane.text !== null) {
    const start = Math.max(box.left, ...lane.spans.slice(0, 1).map((span) => x(span.from))) + 8;
    const words = shortened(lane.text, textSizes.small, box.right - start - 8);
    primitives.push(...onClearGround(textAt(start, middle + 4, words, { tone: "ink" })));
  }
  return primitives;
}
