import { onAxis, scaleOf } from "./axes.js";
import type { PlotPanel } from "./figure.js";
import { type PlacedFlag, placeFlags } from "./flags.js";
import type { Box, Point } from "./geometry.js";
import { layoutKey } from "./key.js";
import { drawArea, drawMark } from "./marks.js";
import { axisRoom, type Frame, gridLines, plotAxes, topAxisRoom } from "./plotAxes.js";
import { plotWords } from "./plotWords.js";
import type { Primitive } from "./primitive.js";
import { rectangle, strokeAlong, textAt, textBox } from "./strokes.js";

/** What a panel became, and where the next one may begin. */
export interface LaidOutPanel {
  readonly primitives: readonly Primitive[];
  readonly bottom: number;
  /** of a plot, without axes and labels */
  readonly frame?: Box;
}

const flagRow = 15;

/**
 * Lays out a panel with two axes.
 *
 * @param left x of the frame's left edge
 * @param right x of the frame's right edge
 * @param top y at which the panel may begin
 * @param whole width of the figure
 */
export function layoutPlot(
  panel: PlotPanel,
  left: number,
  right: number,
  top: number,
  whole: number,
): LaidOutPanel {
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
    [2, whole - 2],
  );
  const rows = flags.length === 0 ? 0 : 1 + Math.max(...flags.map((flag) => flag.row));
  const frameTop = top + 6 + (panel.topAxis === undefined ? 0 : topAxisRoom) + rows * flagRow;
  const box: Box = {
    left,
    right,
    top: frameTop,
    bottom: frameTop + panel.height,
  };
  const frame: Frame = { box, x, y: scaleOf(panel.yAxis, box.bottom, box.top) };

  const words = plotWords(panel, frame);
  const primitives: Primitive[] = [
    ...panel.marks.flatMap((mark) => (mark.type === "area" ? drawArea(mark, frame) : [])),
    ...gridLines(panel, frame),
    ...panel.marks.flatMap((mark) => (mark.type === "area" ? [] : drawMark(mark, frame))),
    ...words.primitives,
    ...flagWords(flags, box.top),
    ...plotAxes(panel, frame),
  ];
  const named = layoutKey(words.key, left, right, box.bottom + axisRoom);
  return {
    primitives: [...primitives, ...named.primitives],
    bottom: named.bottom,
    frame: box,
  };
}

/** Words over vertical rules, with the line that ties each to its rule. */
export function flagWords(flags: readonly PlacedFlag[], top: number): Primitive[] {
  const baseOf = (flag: PlacedFlag) => top - 5 - flag.row * flagRow;
  const ties = flags.map((flag) => {
    const ends: readonly Point[] = [
      [flag.x, baseOf(flag) - 8],
      [flag.x, top],
    ];
    return strokeAlong(ends, "quiet", "solid", "thin");
  });
  const words = flags.flatMap((flag) => {
    const base = baseOf(flag);
    const text =
      flag.side === "right"
        ? textAt(flag.left + 4, base, flag.text, { tone: "ink" })
        : textAt(flag.right - 4, base, flag.text, {
            tone: "ink",
            anchor: "end",
          });
    const ground = flag.crossed ? [rectangle(textBox(text), "faint", "paper")] : [];
    return [...ground, text];
  });
  return [...ties, ...words];
}
