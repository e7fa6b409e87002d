/**
 * Quantile of type 7: linear interpolation at (n − 1)q of the ordered sample ("Sample quantiles in statistical packages",
 * The American Statistician 50, 361, 1996).
 * @param sorted ascending, not empty
 */
export function quantileSorted(sorted: ArrayLike<number>, q: number): number {
  const h = (sorted.length - 1) * q;
  const below = Math.floor(h);
  const low = sorted[below]!;
  const high = sorted[Math.min(below + 1, sorted.length - 1)]!;
  return low + (h - below) * (high - low);
}

/**
 * The critical value of a test by n simulated values: the ⌈(n + 1)q⌉-th smallest, so that with a further value of the same law
 * the chance to lie above it is at most 1 − q. The greatest where n is too small for that.
 * @param sorted ascending, not empty
 */
export function quantileAbove(sorted: ArrayLike<number>, q: number): number {
  return sorted[Math.min(Math.ceil((sorted.length + 1) * q), sorted.length) - 1]!;
}
