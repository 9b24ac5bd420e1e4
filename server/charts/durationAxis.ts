import type { Axis, Tick } from "./figure.js";

const minute = 60;
const hour = 3600;
const day = 86400;
const year = 365.25 * day;

function ticksIn(unit: number, name: string, counts: readonly number[]): Tick[] {
  return counts.map((count) => ({ value: count * unit, text: `${count} ${name}` }));
}

/** For axes over many decades. */
const coarse: readonly Tick[] = [
  ...ticksIn(1, "s", [0.01, 0.1, 1, 10]),
  ...ticksIn(minute, "min", [1, 10]),
  ...ticksIn(hour, "h", [1, 10]),
  ...ticksIn(day, "days", [4, 40]),
  { value: year, text: "1 year" },
  ...ticksIn(year, "years", [10, 100]),
];

/** For axes over two decades or so. */
const fine: readonly Tick[] = [
  ...ticksIn(1, "s", [0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 30]),
  ...ticksIn(minute, "min", [1, 2, 5, 10, 20, 30]),
  ...ticksIn(hour, "h", [1, 2, 4, 8, 16]),
  { value: day, text: "1 day" },
  ...ticksIn(day, "days", [2, 4, 8, 20, 40, 100, 200]),
  { value: year, text: "1 year" },
  ...ticksIn(year, "years", [2, 5, 10, 20, 50, 100]),
];

/** Shortest and longest time that a logarithmic axis of times shows, s. */
const reach = [0.01, 100 * year] as const;

/** A logarithmic axis of times in words that people use, over all the times given, s. */
export function durationAxis(times: readonly number[], label: string): Axis {
  const inReach = times
    .filter((each) => each > 0)
    .map((each) => Math.min(reach[1], Math.max(reach[0], each)));
  const low = Math.min(...inReach);
  const high = Math.max(...inReach);
  const domain: readonly [number, number] = low <= high ? [low / 1.6, high * 1.6] : [hour / 10, 100 * hour];
  return { scale: "log", domain, label, ticks: domain[1] / domain[0] > 1000 ? coarse : fine };
}

/** The unit in which a linear axis of times is read: that in which its longest time is a handy number. */
export function timeUnit(longest: number): {
  readonly name: string;
  readonly seconds: number;
} {
  if (longest <= 3 * minute) return { name: "s", seconds: 1 };
  if (longest <= 4 * hour) return { name: "min", seconds: minute };
  if (longest <= 4 * day) return { name: "h", seconds: hour };
  return { name: "days", seconds: day };
}
