/** Nodes and weights of a quadrature rule on [-1, 1]. Shared between callers: read only. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const rules = new Map<number, QuadratureRule>();

/**
 * Gauss-Legendre rule with n points on [-1, 1]: exact for polynomials of degree 2n - 1.
 *
 * Nodes ascend. They are the zeros of the Legendre polynomial P_n, found by Newton's method from
 * cos(pi (i - 1/4)/(n + 1/2)); weights are 2/((1 - x^2) P_n'(x)^2).
 *
 * @param n number of points, 1 to 1000
 * @returns the same object at every call with the same n: do not write to it
 * @throws RangeError where n is not a whole number from 1 to 1000
 * @see Abramowitz & Stegun, Handbook of Mathematical Functions, 25.4.29 and 22.16.6
 */
export function gaussLegendre(n: number): QuadratureRule {
  const known = rules.get(n);
  if (known !== undefined) return known;
  if (!Number.isInteger(n) || n < 1 || n > 1000) {
    throw new RangeError(`A Gauss-Legendre rule needs 1 to 1000 points, not ${n}`);
  }
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; 2 * i < n; i++) {
    const opposite = n - 1 - i;
    let x = i === opposite ? 0 : Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    for (let pass = 0; pass < 100 && i !== opposite; pass++) {
      const { value, slope } = legendre(n, x);
      const change = value / slope;
      x -= change;
      if (Math.abs(change) <= 1e-15) break;
    }
    const { slope } = legendre(n, x);
    nodes[i] = -x;
    nodes[opposite] = x;
    weights[i] = 2 / ((1 - x * x) * slope * slope);
    weights[opposite] = weights[i];
  }
  const rule = { nodes, weights };
  rules.set(n, rule);
  return rule;
}

/** P_n(x) by the three-term recurrence, and P_n'(x), for |x| < 1. */
function legendre(n: number, x: number): { value: number; slope: number } {
  let before = 1;
  let value = x;
  for (let k = 2; k <= n; k++) {
    const next = ((2 * k - 1) * x * value - (k - 1) * before) / k;
    before = value;
    value = next;
  }
  return { value, slope: (n * (before - x * value)) / (1 - x * x) };
}

/**
 * Integral of f from lo to hi by one Gauss-Legendre rule; lo > hi changes the sign.
 *
 * @param f integrand, called at n points inside the interval and never at its ends
 * @param points of the rule
 */
export function integrate(f: (x: number) => number, lo: number, hi: number, points = 16): number {
  const { nodes, weights } = gaussLegendre(points);
  const middle = 0.5 * (lo + hi);
  const half = 0.5 * (hi - lo);
  let sum = 0;
  for (let i = 0; i < points; i++) sum += weights[i] * f(middle + half * nodes[i]);
  return half * sum;
}

/**
 * Integral of f over consecutive panels, one Gauss-Legendre rule on each: for an integrand whose
 * scale changes along the way (geometric panels), or that has kinks at known places.
 *
 * @param edges ends of the panels in order; fewer than two give 0
 */
export function integratePanels(f: (x: number) => number, edges: ArrayLike<number>, points = 16): number {
  let sum = 0;
  for (let i = 1; i < edges.length; i++) sum += integrate(f, edges[i - 1], edges[i], points);
  return sum;
}
