export type Point = readonly [number, number];

export interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** Whether two boxes share more than an edge. */
export function overlap(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

/** Whether `inner` lies wholly in `outer`. */
export function inside(inner: Box, outer: Box): boolean {
  return (
    inner.left >= outer.left &&
    inner.right <= outer.right &&
    inner.top >= outer.top &&
    inner.bottom <= outer.bottom
  );
}

/**
 * The part of a straight line inside a box (Liang & Barsky 1984, ACM Trans. Graph. 3:1; from memory).
 *
 * @returns null where none of it is
 */
export function clipSegment([x0, y0]: Point, [x1, y1]: Point, box: Box): readonly [Point, Point] | null {
  const dx = x1 - x0;
  const dy = y1 - y0;
  let enter = 0;
  let leave = 1;
  for (const [step, room] of [
    [-dx, x0 - box.left],
    [dx, box.right - x0],
    [-dy, y0 - box.top],
    [dy, box.bottom - y0],
  ] as const) {
    if (step === 0) {
      if (room < 0) return null;
    } else if (step < 0) enter = Math.max(enter, room / step);
    else leave = Math.min(leave, room / step);
  }
  if (enter > leave) return null;
  // ends are held to the box: far outside, the product loses all its digits
  const held = (x: number, y: number): Point => [
    Math.min(box.right, Math.max(box.left, x)),
    Math.min(box.bottom, Math.max(box.top, y)),
  ];
  const at = (part: number) => held(x0 + part * dx, y0 + part * dy);
  return [at(enter), leave === 1 ? held(x1, y1) : at(leave)];
}

/** A polyline cut to a box: as many pieces as it takes. A null or a number that is not finite interrupts it. */
export function clipPolyline(points: readonly (Point | null)[], box: Box): Point[][] {
  const pieces: Point[][] = [];
  let piece: Point[] = [];
  const finish = () => {
    if (piece.length > 1) pieces.push(piece);
    piece = [];
  };
  let previous: Point | null = null;
  for (const point of points) {
    const usable: Point | null = point?.every(Number.isFinite) ? point : null;
    const clipped: readonly [Point, Point] | null =
      previous !== null && usable !== null ? clipSegment(previous, usable, box) : null;
    if (clipped === null) finish();
    else {
      if (piece.length === 0) piece.push(clipped[0]);
      piece.push(clipped[1]);
      if (usable !== null && (clipped[1][0] !== usable[0] || clipped[1][1] !== usable[1])) finish();
    }
    previous = usable;
  }
  finish();
  return pieces;
}

function distance([x, y]: Point, [x0, y0]: Point, [x1, y1]: Point): number {
  const length = Math.hypot(x1 - x0, y1 - y0);
  return length === 0
    ? Math.hypot(x - x0, y - y0)
    : Math.abs((x1 - x0) * (y0 - y) - (x0 - x) * (y1 - y0)) / length;
}

/**
 * Fewer points for the same picture: none of those left out is further than `tolerance` from what is drawn
 * (Douglas & Peucker 1973; from memory).
 */
export function simplified(points: readonly Point[], tolerance: number): Point[] {
  const kept = new Set([0, points.length - 1]);
  const open: [number, number][] = [[0, points.length - 1]];
  for (let range = open.pop(); range !== undefined; range = open.pop()) {
    const [first, last] = range;
    let worst = 0;
    let worstAt = -1;
    for (let at = first + 1; at < last; at++) {
      const off = distance(points[at] as Point, points[first] as Point, points[last] as Point);
      if (off > worst) {
        worst = off;
        worstAt = at;
      }
    }
    if (worst > tolerance) {
      kept.add(worstAt);
      open.push([first, worstAt], [worstAt, last]);
    }
  }
  return points.filter((_, at) => kept.has(at));
}
