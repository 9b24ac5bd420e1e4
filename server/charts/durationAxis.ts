import type { Axis, Tick } from "./figure.js";

const minute = 60;
const hour = 3600;
const day = 86400;
const year = 365.25 * day;

const named: readonly Tick[] = [
  { value: 0.01, text: "0.01 s" },
  { value: 0.1, text: "0.1 s" },
  { value: 1, text: "1 s" },
  { value: 10, text: "10 s" },
  { value: minute, text: "1 min" },
  { value: 10 * minute, text: "10 min" },
  { value: hour, text: "1 h" },
  { value: 10 * hour, text: "10 h" },
  { value: 4 * day, text: "4 days" },
  { value: 40 * day, text: "40 days" },
  { value: year, text: "1 year" },
  { value: 10 * year, text: "10 years" },
  { value: 100 * year, text: "100 years" },
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
  return {
    scale: "log",
    domain: low <= high ? [low / 1.6, high * 1.6] : [hour / 10, 100 * hour],
    label,
    ticks: named,
  };
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
