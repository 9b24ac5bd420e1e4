/**
 * How a decomposition's rate depends on its progress alpha, d alpha/dt = k(T) f(alpha):
 * f = (1 - alpha)^n for an order law, f = (1 - alpha)^n (w + alpha^m) for an autocatalytic one.
 */
export interface RateLaw {
  readonly autocatalytic: boolean;
  /** n >= 0 */
  readonly order: number;
  /** m > 0; means nothing for an order law */
  readonly productOrder: number;
  /** w > 0; means nothing for an order law */
  readonly initiation: number;
}

function power(base: number, exponent: number): number {
  if (exponent === 1) return base;
  if (exponent === 0) return 1;
  return exponent === 2 ? base * base : base ** exponent;
}

/**
 * f(alpha) of the rate law.
 *
 * @param law rate law
 * @param alpha progress; clipped to [0, 1]
 * @returns dimensionless, >= 0
 * @see Šesták & Berggren 1971, Thermochim. Acta 3:1 (form of the autocatalytic law, from memory)
 */
export function lawValue(law: RateLaw, alpha: number): number {
  if (alpha >= 1) {
    if (law.order > 0) return 0;
    return law.autocatalytic ? law.initiation + 1 : 1;
  }
  const progress = Math.max(alpha, 0);
  const left = power(1 - progress, law.order);
  return law.autocatalytic ? left * (law.initiation + power(progress, law.productOrder)) : left;
}

/**
 * d ln f/d alpha = -n/(1 - alpha) + m alpha^(m-1)/(w + alpha^m).
 *
 * @param law rate law
 * @param alpha progress, 0 <= alpha < 1 (0 < alpha for m < 1)
 * @returns dimensionless
 */
export function lawLogSlope(law: RateLaw, alpha: number): number {
  const falling = law.order === 0 ? 0 : -law.order / (1 - alpha);
  if (!law.autocatalytic) return falling;
  const raised = power(alpha, law.productOrder);
  const slope = law.productOrder === 1 ? 1 : law.productOrder * alpha ** (law.productOrder - 1);
  return falling + slope / (law.initiation + raised);
}

/**
 * The largest f on [0, 1]: at constant temperature the largest rate of the law.
 *
 * @param law rate law
 * @returns dimensionless, > 0
 */
export function largestLawValue(law: RateLaw): number {
  if (!law.autocatalytic) return 1;
  if (law.order === 0) return law.initiation + 1;
  // f has at most one interior maximum; between the ends its slope changes sign there.
  let best = law.initiation;
  let at = 0;
  const cells = 200;
  for (let i = 1; i < cells; i += 1) {
    const value = lawValue(law, i / cells);
    if (value > best) {
      best = value;
      at = i / cells;
    }
  }
  let low = Math.max(at - 1 / cells, 0);
  let high = Math.min(at + 1 / cells, 1);
  for (let i = 0; i < 100 && high - low > 1e-13; i += 1) {
    const first = low + (high - low) / 3;
    const second = high - (high - low) / 3;
    if (lawValue(law, first) < lawValue(law, second)) low = first;
    else high = second;
  }
  return Math.max(best, lawValue(law, (low + high) / 2));
}
