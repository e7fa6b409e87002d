/** Standard normal quantiles that leave 5 % and 1 % outside on both sides together. */
export const Z_95 = 1.959963984540054;
export const Z_99 = 2.5758293035489004;

/**
 * Wilson score interval of a proportion: the p for which k of n lies within z standard deviations of np,
 * (k + z²/2 ± z√(k(n − k)/n + z²/4))/(n + z²) ("Probable inference, the law of succession, and statistical inference",
 * J. Am. Stat. Assoc. 22, 209, 1927).
 * @param k successes, 0 … n @param n trials; none at all give [0, 1] @param z normal quantile, `Z_95` or `Z_99`
 */
export function wilsonInterval(k: number, n: number, z: number): { low: number; high: number } {
  if (n === 0) return { low: 0, high: 1 };
  const middle = k + (z * z) / 2;
  const half = z * Math.sqrt((k * (n - k)) / n + (z * z) / 4);
  return { low: Math.max(0, (middle - half) / (n + z * z)), high: Math.min(1, (middle + half) / (n + z * z)) };
}
