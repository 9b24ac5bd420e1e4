import { clearAcross, clearUp, type Scale, ticksOf } from "./axes.js";
import type { Axis, PlotPanel } from "./figure.js";
import type { Box } from "./geometry.js";
import { textSizes } from "./palette.js";
import type { Primitive } from "./primitive.js";
import { strokeAlong, textAt } from "./strokes.js";
import { textWidth } from "./textWidth.js";

/** A panel's frame with its two scales. */
export interface Frame {
  readonly box: Box;
  readonly x: Scale;
  readonly y: Scale;
}

/** Room under a frame for ticks and label of its horizontal axis. */
export const axisRoom = 40;

/** Room over a frame for a second horizontal axis. */
export const topAxisRoom = 36;

function upTicks(panel: PlotPanel) {
  return ticksOf(panel.yAxis, Math.max(2, Math.round(panel.height / 42)));
}

function acrossTicks(axis: Axis, box: Box) {
  return ticksOf(axis, Math.max(3, Math.round((box.right - box.left) / 75)));
}

function widest(texts: readonly { readonly text: string }[]): number {
  return Math.max(0, ...texts.map((tick) => textWidth(tick.text, textSizes.small)));
}

/** Room left of the frame for the vertical axis. */
export function roomLeft(panel: PlotPanel): number {
  return 30 + widest(upTicks(panel));
}

/** Room right of the frame. */
export function roomRight(panel: PlotPanel): number {
  return panel.rightAxis === undefined ? 14 : 30 + widest(panel.rightAxis.ticks);
}

/** Faint lines at the ticks, drawn first. */
export function gridLines(panel: PlotPanel, { box, x, y }: Frame): Primitive[] {
  return [
    ...clearAcross(acrossTicks(panel.xAxis, box), x).map(({ value }) =>
      verticalAt(x(value), box.top, box.bottom),
    ),
    ...clearUp(upTicks(panel), y).map(({ value }) =>
      strokeAlong(
        [
          [box.left, y(value)],
          [box.right, y(value)],
        ],
        "faint",
        "solid",
        "thin",
      ),
    ),
  ];
}

function verticalAt(x: number, top: number, bottom: number): Primitive {
  return strokeAlong(
    [
      [x, top],
      [x, bottom],
    ],
    "faint",
    "solid",
    "thin",
  );
}

/** Ticks, numbers and label of the horizontal axis under a frame. */
export function axisAcross(axis: Axis, box: Box, x: Scale): Primitive[] {
  const primitives: Primitive[] = [
    strokeAlong(
      [
        [box.left, box.bottom],
        [box.right, box.bottom],
      ],
      "quiet",
      "solid",
      "thin",
    ),
  ];
  for (const tick of clearAcross(acrossTicks(axis, box), x)) {
    const at = x(tick.value);
    primitives.push(
      tickMark(at, box.bottom, 4),
      textAt(at, box.bottom + 16, tick.text, { anchor: "middle", tone: "ink" }),
    );
  }
  primitives.push(
    textAt((box.left + box.right) / 2, box.bottom + 33, axis.label, {
      anchor: "middle",
    }),
  );
  return primitives;
}

/** Faint lines at the ticks of a horizontal axis alone. */
export function gridAcross(axis: Axis, box: Box, x: Scale): Primitive[] {
  return clearAcross(acrossTicks(axis, box), x).map(({ value }) => verticalAt(x(value), box.top, box.bottom));
}

function tickMark(x: number, y: number, length: number): Primitive {
  return strokeAlong(
    [
      [x, y],
      [x, y + length],
    ],
    "quiet",
    "solid",
    "thin",
  );
}

/** All axes of a panel, over its marks. */
export function plotAxes(panel: PlotPanel, frame: Frame): Primitive[] {
  const { box, x, y } = frame;
  const middle = (box.top + box.bottom) / 2;
  const primitives: Primitive[] = [
    strokeAlong(
      [
        [box.left, box.top],
        [box.left, box.bottom],
      ],
      "quiet",
      "solid",
      "thin",
    ),
    ...clearUp(upTicks(panel), y).map((tick) =>
      textAt(box.left - 7, y(tick.value) + 4, tick.text, {
        anchor: "end",
        tone: "ink",
      }),
    ),
    textAt(box.left - roomLeft(panel) + 11, middle, panel.yAxis.label, {
      anchor: "middle",
      upright: true,
    }),
    ...axisAcross(panel.xAxis, box, x),
  ];
  if (panel.rightAxis !== undefined) {
    const ticks = clearUp(panel.rightAxis.ticks, y);
    primitives.push(
      ...ticks.map((tick) => textAt(box.right + 7, y(tick.value) + 4, tick.text, { tone: "ink" })),
      textAt(box.right + 20 + widest(ticks), middle, panel.rightAxis.label, {
        anchor: "middle",
        upright: true,
      }),
    );
  }
  if (panel.topAxis !== undefined) {
    primitives.push(
      strokeAlong(
        [
          [box.left, box.top],
          [box.right, box.top],
        ],
        "quiet",
        "solid",
        "thin",
      ),
      ...clearAcross(panel.topAxis.ticks, x).flatMap((tick) => [
        tickMark(x(tick.value), box.top - 4, 4),
        textAt(x(tick.value), box.top - 8, tick.text, {
          anchor: "middle",
          tone: "ink",
        }),
      ]),
      textAt((box.left + box.right) / 2, box.top - 24, panel.topAxis.label, {
        anchor: "middle",
      }),
    );
  }
  return primitives;
}
