import ln from '@stdlib/math-base-special-ln';

/** Mean below which the distribution is walked from zero, and above which rejection is quicker; the rejection needs at least 10. */
const WALK_BELOW = 10;

/**
 * Number of successes in n trials of probability p, exact for every n up to 2⁵³ (to the rounding of doubles; no normal or
 * Poisson approximation). With π = min(p, 1 − p), and n − result returned for p > ½:
 *
 * - nπ < 10: inversion. One uniform u is walked through P(0) = (1 − π)ⁿ (by repeated squaring), P(x) = P(x − 1)·(n − x + 1)/x·π/(1 − π);
 *   the result is the first x at which u falls below what is left. A walk past n (rounding) starts again with a new u.
 * - otherwise transformed rejection with squeeze, BTRS ("The generation of binomial random variates", J. Stat. Comput. Simul. 46,
 *   101, 1993): two uniforms u, v a trial, in this order; P(k)/P(mode) is multiplied out near the mode, else taken from
 *   Stirling's series.
 *
 * Only + − × ÷, sqrt, floor, abs and @stdlib's ln are used, so that the same seed gives the same numbers on every engine.
 */
export function binomial(next: { next: () => number }, n: number, p: number): number {
  if (n <= 0 || p <= 0) return 0;
  if (p >= 1) return n;
  if (p > 0.5) return n - drawSmall(next, n, 1 - p);
  return drawSmall(next, n, p);
}

function drawSmall(next: { next: () => number }, n: number, p: number): number {
  return n * p < WALK_BELOW ? walk(next, n, p) : rejection(next, n, p);
}

function walk(next: { next: () => number }, n: number, p: number): number {
  const odds = p / (1 - p);
  const none = wholePower(1 - p, n);
  for (;;) {
    let u = next.next();
    let probability = none;
    for (let x = 0; x <= n; ) {
      if (u < probability) return x;
      u -= probability;
      x++;
      probability *= ((n - x + 1) / x) * odds;
    }
  }
}

/** q to the whole power n by repeated squaring. */
function wholePower(q: number, n: number): number {
  let out = 1;
  let square = q;
  for (let left = n; left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) out *= square;
    square *= square;
  }
  return out;
}

function rejection(next: { next: () => number }, n: number, p: number): number {
  const spread = Math.sqrt(n * p * (1 - p));
  const b = 1.15 + 2.53 * spread;
  const a = -0.0873 + 0.0248 * b + 0.01 * p;
  const centre = n * p + 0.5;
  const squeeze = 0.92 - 4.2 / b;
  for (;;) {
    const u = next.next() - 0.5;
    const v = next.next();
    const us = 0.5 - Math.abs(u);
    const k = Math.floor(((2 * a) / us + b) * u + centre);
    if (us >= 0.07 && v <= squeeze) return k;
    if (!(k >= 0 && k <= n)) continue;
    const height = (v * (2.83 + 5.1 / b) * spread) / (a / (us * us) + b);
    if (isBelow(height, n, p, k)) return k;
  }
}

/** Within this many steps of the mode P(k)/P(mode) is multiplied out; the products stay finite up to the shots beside it. */
const NEAR = 25;
const NEAR_SHOTS = 1e9;

/** Whether height ≤ P(k)/P(m), m the mode. */
function isBelow(height: number, n: number, p: number, k: number): boolean {
  const odds = p / (1 - p);
  const m = Math.floor((n + 1) * p);
  if (Math.abs(k - m) <= NEAR && n <= NEAR_SHOTS) {
    let up = 1;
    let down = 1;
    for (let i = Math.min(k, m) + 1; i <= Math.max(k, m); i++) {
      up *= (n - i + 1) * odds;
      down *= i;
    }
    return k > m ? height * down <= up : height * up <= down;
  }
  const bound =
    (m + 0.5) * ln((m + 1) / (odds * (n - m + 1))) + (n + 1) * ln((n - m + 1) / (n - k + 1)) + (k + 0.5) * ln((odds * (n - k + 1)) / (k + 1)) +
    stirlingTail(m) + stirlingTail(n - m) - stirlingTail(k) - stirlingTail(n - k);
  return ln(height) <= bound;
}

/** ln k! − [½ ln 2π + (k + ½) ln(k + 1) − (k + 1)] for k = 0 … 9, computed to 17 digits. */
const TAIL = [
  0.08106146679532726, 0.0413406959554093, 0.02767792568499834, 0.0207906721037651, 0.01664469118982119,
  0.01387612882307075, 0.01189670994589177, 0.01041126526197209, 0.009255462182712733, 0.008330563433362871,
];

function stirlingTail(k: number): number {
  if (k < TAIL.length) return TAIL[k]!;
  const y = 1 / (k + 1);
  const yy = y * y;
  return y * (1 / 12 - yy * (1 / 360 - yy * (1 / 1260 - yy * (1 / 1680 - yy / 1188))));
}
