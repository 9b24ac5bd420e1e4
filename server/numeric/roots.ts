/** How far a search is refined. */
export interface RootOptions {
  /** Largest width of the final bracket, in units of the argument; 0 (as far as doubles go) unless said. */
  readonly tolerance?: number;
  /** Evaluations after the two at the ends; 10,000 unless said, which no bracket of doubles outlasts. */
  readonly maxIterations?: number;
}

/** The two ends of the final bracket of a root: `before` on the side of lo, `after` on the side of hi. */
export interface Crossing {
  readonly before: number;
  /** Here f already has the sign it has at hi, or is zero. */
  readonly after: number;
  /** The one of the two with the smaller |f|. */
  readonly nearest: number;
}

/**
 * Change of sign of f on the way from lo to hi, where f has opposite signs (or is zero at one of them).
 *
 * The root stays bracketed throughout. Inverse quadratic interpolation where the three last points
 * allow it, else bisection (Chandrupatla's criterion); besides, whenever three steps have not halved
 * the bracket the next one does, so the worst case is four times the count of bisection.
 *
 * @param f may jump or be infinite: then the place where its sign changes is found
 * @throws RangeError without a change of sign, or where f is not a number
 * @see Chandrupatla 1997, Adv. Eng. Software 28:145; Brent 1973, Algorithms for Minimization without
 * Derivatives, ch. 4
 */
export function findCrossing(
  f: (x: number) => number,
  lo: number,
  hi: number,
  options: RootOptions = {},
): Crossing {
  const tolerance = options.tolerance ?? 0;
  const maxIterations = options.maxIterations ?? 10_000;
  // a is the newest point, b the other end of the bracket, c the point last dropped.
  let a = hi;
  let b = lo;
  let fa = number(f, a);
  let fb = number(f, b);
  if (fa === 0) return { before: a, after: a, nearest: a };
  if (fb === 0) return { before: b, after: b, nearest: b };
  if (fa > 0 === fb > 0) {
    throw new RangeError(`No change of sign between ${lo} (${fb}) and ${hi} (${fa})`);
  }
  const rising = fa > 0;
  let fraction = 0.5;
  let widthBefore = Math.abs(b - a);
  let sinceHalved = 0;
  for (let i = 0; i < maxIterations; i++) {
    const x = a + fraction * (b - a);
    const fx = number(f, x);
    if (fx === 0) return { before: x, after: x, nearest: x };
    let c = a;
    let fc = fa;
    if (fx > 0 !== fa > 0) {
      c = b;
      fc = fb;
      b = a;
      fb = fa;
    }
    a = x;
    fa = fx;

    const width = Math.abs(b - a);
    const smallest =
      2 * Number.EPSILON * (Math.abs(fa) < Math.abs(fb) ? Math.abs(a) : Math.abs(b)) + Number.MIN_VALUE;
    if (width <= Math.max(tolerance, smallest)) break;

    if (width <= 0.5 * widthBefore) {
      widthBefore = width;
      sinceHalved = 0;
    } else sinceHalved++;

    fraction = sinceHalved >= 3 ? 0.5 : interpolated(a, b, c, fa, fb, fc);
    // The next point keeps clear of both ends, so that each evaluation narrows the bracket.
    const clear = Math.min(0.5, Math.max(0.5 * tolerance, smallest) / width);
    fraction = Math.min(1 - clear, Math.max(clear, fraction));
  }
  const nearest = Math.abs(fa) < Math.abs(fb) ? a : b;
  return fa > 0 === rising ? { before: b, after: a, nearest } : { before: a, after: b, nearest };
}

/**
 * Root of f between lo and hi, where f has opposite signs (or is zero at one of them).
 *
 * @returns the end of the final bracket with the smaller |f|; the method is that of `findCrossing`
 * @throws RangeError without a change of sign, or where f is not a number
 */
export function findRoot(
  f: (x: number) => number,
  lo: number,
  hi: number,
  options: RootOptions = {},
): number {
  return findCrossing(f, lo, hi, options).nearest;
}

/** Where between a (0) and b (1) the inverse parabola through three points vanishes, or the middle. */
function interpolated(a: number, b: number, c: number, fa: number, fb: number, fc: number): number {
  const xi = (a - b) / (c - b);
  const phi = (fa - fb) / (fc - fb);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  const step =
    (fa / (fb - fa)) * (fc / (fb - fc)) + ((c - a) / (b - a)) * (fa / (fc - fa)) * (fb / (fc - fb));
  return Number.isFinite(step) ? step : 0.5;
}

function number(f: (x: number) => number, x: number): number {
  const value = f(x);
  if (Number.isNaN(value)) throw new RangeError(`The function is not a number at ${x}`);
  return value;
}

/** The two sides of a boundary: `inside` still satisfies the predicate, `outside` no longer does. */
export interface Boundary {
  readonly inside: number;
  readonly outside: number;
}

/**
 * Narrows the boundary of a predicate by bisection. Both sides come back, so that the caller can
 * take the cautious one.
 *
 * @param holds called only strictly between the two sides
 * @param inside a point known to satisfy the predicate
 * @param outside a point known not to; may lie below `inside`
 * @param tolerance largest distance between the sides returned
 */
export function bisectPredicate(
  holds: (x: number) => boolean,
  inside: number,
  outside: number,
  tolerance: number,
): Boundary {
  let good = inside;
  let bad = outside;
  while (Math.abs(bad - good) > tolerance) {
    const middle = good + 0.5 * (bad - good);
    if (middle === good || middle === bad) break;
    if (holds(middle)) good = middle;
    else bad = middle;
  }
  return { inside: good, outside: bad };
}

/** A maximum: where, and how much. */
export interface Maximum {
  readonly x: number;
  readonly value: number;
}

const GOLDEN = 0.5 * (3 - Math.sqrt(5));

/**
 * Maximum of f on [lo, hi] by Brent's method (golden section, with parabolic steps where they help);
 * the two ends are candidates too.
 *
 * The global maximum where f has a single one; otherwise a local one not below the ends. A maximum is
 * flat: `x` cannot be told better than about 1.5e-8 of its size, `value` is good to rounding.
 *
 * @param tolerance on x; smaller ones than doubles resolve are raised
 * @throws RangeError where f is not a number
 * @see Brent 1973, Algorithms for Minimization without Derivatives, ch. 5
 */
export function maximise(f: (x: number) => number, lo: number, hi: number, tolerance = 0): Maximum {
  let a = Math.min(lo, hi);
  let b = Math.max(lo, hi);
  const atEnds = [a, b].map((x) => ({ x, value: number(f, x) }));
  // x is the best point, w the second best, v the one before w.
  let x = a + GOLDEN * (b - a);
  let [w, v] = [x, x];
  let fx = number(f, x);
  let [fw, fv] = [fx, fx];
  let step = 0;
  let stepBefore = 0;
  for (let i = 0; i < 200; i++) {
    const middle = 0.5 * (a + b);
    const resolution = 1.5e-8 * Math.abs(x) + Math.max(tolerance / 3, Number.MIN_VALUE);
    if (Math.abs(x - middle) <= 2 * resolution - 0.5 * (b - a)) break;
    let parabolic = false;
    if (Math.abs(stepBefore) > resolution) {
      const r = (x - w) * (fx - fv);
      const q = (x - v) * (fx - fw);
      const bottom = 2 * (q - r);
      const move = -((x - v) * q - (x - w) * r) / bottom;
      if (Math.abs(move) < 0.5 * Math.abs(stepBefore) && x + move > a && x + move < b) {
        parabolic = true;
        stepBefore = step;
        step = move;
        const next = x + move;
        if (next - a < 2 * resolution || b - next < 2 * resolution) {
          step = x < middle ? resolution : -resolution;
        }
      }
    }
    if (!parabolic) {
      stepBefore = x < middle ? b - x : a - x;
      step = GOLDEN * stepBefore;
    }
    const u = x + (Math.abs(step) >= resolution ? step : Math.sign(step) * resolution);
    const fu = number(f, u);
    if (fu >= fx) {
      if (u < x) b = x;
      else a = x;
      [v, fv, w, fw, x, fx] = [w, fw, x, fx, u, fu];
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu >= fw || w === x) [v, fv, w, fw] = [w, fw, u, fu];
      else if (fu >= fv || v === x || v === w) [v, fv] = [u, fu];
    }
  }
  let best = { x, value: fx };
  for (const end of atEnds) if (end.value >= best.value) best = end;
  return best;
}
