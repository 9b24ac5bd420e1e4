import { type Box, clipSegment, inside, overlap, type Point } from "./geometry.js";
import type { Text } from "./primitive.js";
import { grown, textAt, textBox } from "./strokes.js";

/** What words inside a frame have to keep clear of. */
export interface Obstacles {
  readonly frame: Box;
  /** words and marks: never touched */
  readonly boxes: Box[];
  /** lines: crossed only where there is no other place */
  readonly lines: readonly (readonly Point[])[];
  /** hatched areas: avoided */
  readonly hatched: readonly Box[];
}

export interface PlacedText {
  readonly text: Text;
  readonly box: Box;
  /** something runs under the words, so that they need a clear ground */
  readonly crossed: boolean;
}

interface Candidate {
  readonly x: number;
  readonly y: number;
  readonly anchor: Text["anchor"];
  /** dislike of the place itself */
  readonly cost: number;
  /** may be moved sideways to stay in the frame */
  readonly slides?: boolean;
}

/** Lines that run through a box, counted up to three. */
function crossings({ left, right, top, bottom }: Box, lines: readonly (readonly Point[])[]): number {
  let count = 0;
  for (const points of lines)
    for (let at = 1; at < points.length; at++) {
      const [x0, y0] = points[at - 1] as Point;
      const [x1, y1] = points[at] as Point;
      const apart =
        (x0 < left && x1 < left) ||
        (x0 > right && x1 > right) ||
        (y0 < top && y1 < top) ||
        (y0 > bottom && y1 > bottom);
      if (apart || clipSegment([x0, y0], [x1, y1], { left, right, top, bottom }) === null) continue;
      count++;
      if (count === 3) return count;
    }
  return count;
}

/** What touching a line and a hatched area costs, against the dislikes of the places. */
const crossingCost = 12;
const hatchedCost = 4;

/**
 * The place with the least cost; crossed lines and hatching add to it, other words and marks exclude it.
 *
 * @param limit cost from which no place is good enough
 */
function best(
  words: string,
  style: Partial<Text>,
  candidates: readonly Candidate[],
  obstacles: Obstacles,
  limit: number,
): PlacedText | null {
  const origin = grown(textBox(textAt(0, 0, words, { ...style, anchor: "start" })), 3, 2);
  const width = origin.right - origin.left - 6;
  const { frame } = obstacles;
  let chosen: PlacedText | null = null;
  let lowest = limit;
  for (const { x, y, anchor, cost, slides } of candidates.toSorted((a, b) => a.cost - b.cost)) {
    if (cost >= lowest) break;
    const wanted = x - (anchor === "end" ? width : anchor === "middle" ? width / 2 : 0);
    const start = slides ? Math.max(frame.left + 4, Math.min(wanted, frame.right - 4 - width)) : wanted;
    const box = {
      left: start - 3,
      right: start + width + 3,
      top: y + origin.top,
      bottom: y + origin.bottom,
    };
    if (!inside(box, frame) || obstacles.boxes.some((each) => overlap(each, box))) continue;
    const crossed = crossings(box, obstacles.lines);
    const hatched = obstacles.hatched.filter((each) => overlap(each, box)).length;
    const total = cost + crossingCost * crossed + hatchedCost * hatched;
    if (total < lowest) {
      lowest = total;
      const text = textAt(x + start - wanted, y, words, { ...style, anchor });
      chosen = { text, box, crossed: crossed + hatched > 0 };
    }
  }
  if (chosen !== null) obstacles.boxes.push(grown(chosen.box, 8, 0));
  return chosen;
}

const around: readonly {
  readonly dx: number;
  readonly dy: number;
  readonly anchor: Text["anchor"];
}[] = [
  { dx: 9, dy: 4, anchor: "start" },
  { dx: -9, dy: 4, anchor: "end" },
  { dx: 7, dy: -7, anchor: "start" },
  { dx: -7, dy: -7, anchor: "end" },
  { dx: 7, dy: 15, anchor: "start" },
  { dx: -7, dy: 15, anchor: "end" },
  { dx: 0, dy: -10, anchor: "middle" },
  { dx: 0, dy: 19, anchor: "middle" },
];

/**
 * Words beside a mark, on whichever side is free, further off where nothing is; over or under it they may be
 * moved along to stay in the frame.
 */
export function placeBeside(
  [x, y]: Point,
  words: string,
  style: Partial<Text>,
  obstacles: Obstacles,
): PlacedText | null {
  const candidates = [1, 1.8, 2.8, 4].flatMap((reach, ring) =>
    around.map(({ dx, dy, anchor }, at) => ({
      x: x + dx * reach,
      y: y + (dy - 4) * reach + 4,
      anchor,
      cost: 0.2 * at + 6 * ring,
      slides: dx === 0,
    })),
  );
  return best(words, style, candidates, obstacles, Number.POSITIVE_INFINITY);
}

/**
 * Words along a line and close to it, by preference towards its end.
 *
 * @param where "clear": nowhere unless clear of every line; "anywhere": on a clear ground of its own if need be
 */
export function placeAlong(
  points: readonly Point[],
  words: string,
  style: Partial<Text>,
  obstacles: Obstacles,
  where: "clear" | "anywhere",
): PlacedText | null {
  const places = alongEvenly(points, 24);
  const candidates = places.flatMap(([x, y], at) =>
    ([-6, 14, -12, 20] as const).flatMap((dy, turn) =>
      (["middle", "start", "end"] as const).map((anchor, which) => ({
        x: anchor === "start" ? x + 6 : anchor === "end" ? x - 6 : x,
        y: y + dy,
        anchor,
        cost: 0.08 * (places.length - at) + 0.3 * turn + 0.2 * which,
      })),
    ),
  );
  return best(
    words,
    style,
    candidates,
    obstacles,
    where === "clear" ? crossingCost : Number.POSITIVE_INFINITY,
  );
}

/** Places at equal distances along a polyline. */
function alongEvenly(points: readonly Point[], count: number): Point[] {
  const lengths = points.slice(1).map((point, at) => {
    const [x, y] = points[at] as Point;
    return Math.hypot(point[0] - x, point[1] - y);
  });
  const total = lengths.reduce((sum, each) => sum + each, 0);
  const places: Point[] = [];
  let done = 0;
  let segment = 0;
  for (let at = 0; at <= count; at++) {
    const wanted = (total * at) / count;
    while (segment < lengths.length - 1 && done + (lengths[segment] ?? 0) < wanted)
      done += lengths[segment++] ?? 0;
    const length = lengths[segment] ?? 0;
    const part = length === 0 ? 0 : Math.min(1, (wanted - done) / length);
    const [x0, y0] = points[segment] ?? [0, 0];
    const [x1, y1] = points[segment + 1] ?? [x0, y0];
    places.push([x0 + part * (x1 - x0), y0 + part * (y1 - y0)]);
  }
  return places;
}

/** A short word on a line itself, by preference near its end. */
export function placeOn(
  points: readonly Point[],
  word: string,
  style: Partial<Text>,
  obstacles: Obstacles,
): PlacedText | null {
  const places = alongEvenly(points, 40);
  const candidates = places.map(([x, y], at) => ({
    x,
    y: y + 4,
    anchor: "middle" as const,
    cost: 0.1 * Math.abs(at - 0.8 * places.length),
  }));
  return best(word, style, candidates, obstacles, Number.POSITIVE_INFINITY);
}
