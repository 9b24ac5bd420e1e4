import { type ScaleContinuousNumeric, scaleLinear, scaleLog } from "d3-scale";
import { superscript } from "../words/numbers.js";
import type { Axis, Tick } from "./figure.js";
import { textSizes } from "./palette.js";
import { textWidth } from "./textWidth.js";

export type Scale = ScaleContinuousNumeric<number, number>;

/** The axis as a function from its numbers to places on the paper. */
export function scaleOf(axis: Axis, from: number, to: number): Scale {
  const scale = axis.scale === "log" ? scaleLog() : scaleLinear();
  return scale.domain(axis.domain).range([from, to]);
}

/** Whether a value lies on the axis. */
export function onAxis(axis: Axis, value: number): boolean {
  const [a, b] = axis.domain;
  return value >= Math.min(a, b) && value <= Math.max(a, b);
}

function powersOfTen(axis: Axis): Tick[] {
  const [a, b] = axis.domain.map(Math.log10) as [number, number];
  const lowest = Math.ceil(Math.min(a, b) - 1e-9);
  const highest = Math.floor(Math.max(a, b) + 1e-9);
  const step = Math.max(1, Math.ceil((highest - lowest) / 9));
  const ticks: Tick[] = [];
  for (let power = Math.ceil(lowest / step) * step; power <= highest; power += step)
    ticks.push({
      value: 10 ** power,
      text: power === 0 ? "1" : power === 1 ? "10" : `10${superscript(power)}`,
    });
  return ticks;
}

/**
 * Places on an axis that carry a number.
 *
 * @param about how many are wanted
 */
export function ticksOf(axis: Axis, about: number): readonly Tick[] {
  if (axis.ticks !== undefined) return axis.ticks.filter((tick) => onAxis(axis, tick.value));
  if (axis.scale === "log") return powersOfTen(axis);
  const scale = scaleOf(axis, 0, 1);
  const write = scale.tickFormat(about, "f");
  return scale.ticks(about).map((value) => ({ value, text: write(value) }));
}

/** Leaves out ticks whose text would touch the one before; `room` is the length that a text needs. */
function thinned<T>(ticks: readonly T[], place: (tick: T) => number, room: (tick: T) => number): T[] {
  const kept: T[] = [];
  for (const tick of [...ticks].sort((a, b) => place(a) - place(b))) {
    const last = kept.at(-1);
    if (last === undefined || place(tick) - place(last) >= (room(tick) + room(last)) / 2) kept.push(tick);
  }
  return kept;
}

/** The ticks of a horizontal axis whose texts stand clear of each other. */
export function clearAcross(ticks: readonly Tick[], scale: Scale): Tick[] {
  return thinned(
    ticks,
    (tick) => scale(tick.value),
    (tick) => textWidth(tick.text, textSizes.small) + 10,
  );
}

/** The ticks of a vertical axis whose texts stand clear of each other. */
export function clearUp(ticks: readonly Tick[], scale: Scale): Tick[] {
  return thinned(
    ticks,
    (tick) => scale(tick.value),
    () => textSizes.small + 3,
  );
}
