import { type Box, clipSegment, inside, overlap, type Point } from "./geometry.js";
import { rounded, type Text } from "./primitive.js";
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
  readonly text: Text;
  /** dislike of the place itself */
  readonly cost: number;
}

function crossings(box: Box, lines: readonly (readonly Point[])[]): number {
  let count = 0;
  for (const points of lines)
    for (let at = 1; at < points.length; at++)
      if (clipSegment(points[at - 1] as Point, points[at] as Point, box) !== null) count++;
  return count;
}

function best(candidates: readonly Candidate[], obstacles: Obstacles, limit: number): PlacedText | null {
  let chosen: PlacedText | null = null;
  let lowest = limit;
  for (const { text, cost } of candidates) {
    if (cost >= lowest) continue;
    const bare = textBox(text);
    const box = grown(bare, 3, 2);
    if (!inside(box, obstacles.frame) || obstacles.boxes.some((each) => overlap(each, box))) continue;
    const crossed = crossings(box, obstacles.lines);
    const hatched = obstacles.hatched.filter((each) => overlap(each, box)).length;
    const total = cost + 12 * Math.min(crossed, 3) + 4 * hatched;
    if (total < lowest) {
      lowest = total;
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
    around.map(({ dx, dy, anchor }, at) => {
      const text = textAt(x + dx * reach, y + (dy - 4) * reach + 4, words, { ...style, anchor });
      return { text: dx === 0 ? within(text, obstacles.frame) : text, cost: 0.2 * at + 6 * ring };
    }),
  );
  return best(candidates, obstacles, Number.POSITIVE_INFINITY);
}

/** Text moved sideways so that it stands in the frame. */
function within(text: Text, frame: Box): Text {
  const box = textBox(text);
  const shift = Math.max(frame.left + 4 - box.left, Math.min(0, frame.right - 4 - box.right));
  return { ...text, x: rounded(text.x + shift) };
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
  const places = alongEvenly(points, 40);
  const candidates = places.flatMap(([x, y], at) =>
    ([-6, 14, -12, 20] as const).flatMap((dy, turn) =>
      (["middle", "start", "end"] as const).map((anchor, which) => ({
        text: textAt(anchor === "start" ? x + 6 : anchor === "end" ? x - 6 : x, y + dy, words, {
          ...style,
          anchor,
        }),
        cost: 0.05 * (places.length - at) + 0.3 * turn + 0.2 * which,
      })),
    ),
  );
  return best(candidates, obstacles, where === "clear" ? 12 : Number.POSITIVE_INFINITY);
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
  const places = alongEvenly(points, 60);
  const candidates = places.map(([x, y], at) => ({
    text: textAt(x, y + 4, word, { ...style, anchor: "middle" as const }),
    cost: 0.1 * Math.abs(at - 0.8 * places.length),
  }));
  return best(candidates, obstacles, Number.POSITIVE_INFINITY);
}
