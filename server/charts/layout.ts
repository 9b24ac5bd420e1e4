import type { Figure, Panel } from "./figure.js";
import type { Box } from "./geometry.js";
import { lanesLeft, lanesRight, layoutLanes } from "./layoutLanes.js";
import { layoutPlot } from "./layoutPlot.js";
import { textSizes } from "./palette.js";
import { roomLeft, roomRight } from "./plotAxes.js";
import { type Layout, type Primitive, rounded } from "./primitive.js";
import { textAt } from "./strokes.js";
import { wrapText } from "./textWidth.js";

/** The two widths a figure is drawn for: a desk or a sheet of paper, and a telephone. */
export const widths = { wide: 720, narrow: 340 } as const;

export type Width = keyof typeof widths;

const panelGap = 12;
const captionRow = 15;

/**
 * Turns a figure into what is to be drawn: the only step that decides where anything stands, walked by the
 * drawer of the page and by that of the sheet.
 */
export function layout(figure: Figure, width: Width = "wide"): Layout {
  const whole = widths[width];
  const labelsAbove = width === "narrow";
  const left = Math.max(...figure.panels.map((panel) => leftOf(panel, labelsAbove)));
  const right = whole - Math.max(...figure.panels.map((panel) => rightOf(panel, labelsAbove)));
  const primitives: Primitive[] = [];
  const frames: Box[] = [];
  let y = 0;
  for (const panel of figure.panels) {
    const joined = panel.type === "lanes" && !panel.axisShown;
    const done =
      panel.type === "plot"
        ? layoutPlot(panel, left, right, y, whole)
        : layoutLanes(panel, labelsAbove ? left : 2, left, right, y);
    primitives.push(...done.primitives);
    if (done.frame !== undefined) frames.push(done.frame);
    y = done.bottom + (joined ? 0 : panelGap);
  }
  for (const caption of figure.captions)
    for (const line of wrapText(caption, textSizes.small, whole - 4)) {
      primitives.push(textAt(2, y + 5, line));
      y += captionRow;
    }
  return { width: whole, height: rounded(y), primitives, frame: around(frames) };
}

/** The smallest box round others; null without any. */
function around(boxes: readonly Box[]): Box | null {
  const [first, ...others] = boxes;
  if (first === undefined) return null;
  return others.reduce(
    (box, { left, right, top, bottom }) => ({
      left: Math.min(box.left, left),
      right: Math.max(box.right, right),
      top: Math.min(box.top, top),
      bottom: Math.max(box.bottom, bottom),
    }),
    first,
  );
}

function leftOf(panel: Panel, labelsAbove: boolean): number {
  if (panel.type === "plot") return roomLeft(panel);
  return labelsAbove ? 14 : lanesLeft(panel);
}

function rightOf(panel: Panel, labelsAbove: boolean): number {
  if (panel.type === "plot") return roomRight(panel);
  return labelsAbove ? 14 : lanesRight(panel);
}
