import type { FullRun } from "./run.js";
import type { Vessel } from "./vessel.js";

/** One point of a drawn failure. */
export interface TracePoint {
  /** s after the failure */
  readonly time: number;
  /** K */
  readonly temperature: number;
  /** K */
  readonly jacket: number;
}

const mostPoints = 200;

/** Part of the drawn height that a curve may be off its points: less than a line is wide. */
const straightness = 5e-4;

/** How far above MTT a trace goes on, part of the way from the hold to MTT, and at least so many kelvin. */
const beyond = { part: 0.05, least: 3 } as const;

/** Readings of a run in each of its steps. */
const readings = 6;

/**
 * Points through which a run can be drawn smoothly, few where it is straight. Where MTT is passed the trace stops a
 * little above it: what comes after is beyond the model.
 */
export function traceOf(vessel: Vessel, run: FullRun): TracePoint[] {
  const stretches = stretchesOf(vessel, run);
  return stretches.length === 0 ? [] : thinned(stretches);
}

/** The run read densely, one list for each leg: between two of them the state may jump. */
function stretchesOf(vessel: Vessel, run: FullRun): TracePoint[][] {
  const { contents } = vessel;
  const { reference, places, step } = contents;
  const mtt = step.limits.maximumTechnicalTemperature;
  const ceiling = mtt + Math.max(beyond.part * (mtt - reference), beyond.least);
  const state = new Float64Array(contents.system.size);
  const times = run.trajectory.times();
  const stretches: TracePoint[][] = [];
  let leg = -1;
  let current: TracePoint[] = [];
  const read = (time: number, before: boolean): boolean => {
    run.trajectory.evaluate(time, state, before);
    const temperature = reference + state[0];
    const jacket =
      places.jacket === null ? run.legs[leg].conditions.coolantTemperature : reference + state[places.jacket];
    current.push({ time, temperature, jacket });
    return temperature <= ceiling || run.marks.mtt === null;
  };
  for (let i = 1; i < times.length; i += 1) {
    const [start, end] = [times[i - 1], times[i]];
    const entered = run.legs.findLastIndex((each) => each.time <= start);
    if (entered !== leg) {
      leg = entered;
      current = [];
      stretches.push(current);
      read(start, false);
    }
    for (let part = 1; part <= readings; part += 1) {
      const time = part === readings ? end : start + ((end - start) * part) / readings;
      if (!read(time, true)) return stretches;
    }
  }
  return stretches;
}

/** A part of a stretch between two kept points, with the point that lies farthest off the line between them. */
interface Piece {
  readonly points: readonly TracePoint[];
  readonly from: number;
  readonly to: number;
  readonly farthest: number;
  readonly off: number;
}

/** Keeps the ends of every stretch, then again and again the point farthest off the line drawn so far. */
function thinned(stretches: readonly (readonly TracePoint[])[]): TracePoint[] {
  const all = stretches.flat();
  const heights = all.flatMap((point) => [point.temperature, point.jacket]);
  const height = Math.max(...heights) - Math.min(...heights);
  const width = all[all.length - 1].time - all[0].time;
  const scale = { height: height > 0 ? height : 1, width: width > 0 ? width : 1 };
  const kept = new Set<TracePoint>(stretches.flatMap((points) => [points[0], points[points.length - 1]]));
  const pieces = stretches.map((points) => pieceOf(points, 0, points.length - 1, scale));
  while (kept.size < mostPoints) {
    let worst = 0;
    for (let i = 1; i < pieces.length; i += 1) if (pieces[i].off > pieces[worst].off) worst = i;
    const { points, from, to, farthest, off } = pieces[worst];
    if (!(off > straightness)) break;
    kept.add(points[farthest]);
    pieces[worst] = pieceOf(points, from, farthest, scale);
    pieces.push(pieceOf(points, farthest, to, scale));
  }
  return all.filter((point) => kept.has(point));
}

function pieceOf(
  points: readonly TracePoint[],
  from: number,
  to: number,
  scale: { readonly height: number; readonly width: number },
): Piece {
  const [first, last] = [points[from], points[to]];
  const span = last.time - first.time;
  let farthest = from;
  let off = 0;
  for (let i = from + 1; i < to; i += 1) {
    const point = points[i];
    const part = span > 0 ? (point.time - first.time) / span : 0;
    const distance = (of: "temperature" | "jacket"): number =>
      distanceOff(
        (point[of] - first[of] - part * (last[of] - first[of])) / scale.height,
        (last[of] - first[of]) / scale.height,
        span / scale.width,
      );
    const distanceHere = Math.max(distance("temperature"), distance("jacket"));
    if (distanceHere > off) {
      off = distanceHere;
      farthest = i;
    }
  }
  return { points, from, to, farthest, off };
}

/** Distance from a line of which the vertical distance, the rise and the run are known. */
function distanceOff(vertical: number, rise: number, run: number): number {
  const length = Math.hypot(rise, run);
  return length > 0 ? (Math.abs(vertical) * run) / length : 0;
}
