import type { Interval } from '#shared/formats/types.ts';
import { quantileSorted } from '#shared/stats/quantile.ts';

/** The levels of every graded interval. */
export const LEVELS = [0.5, 0.8, 0.95] as const;

/** Percentile interval: the central share of the replicates. */
export function percentileInterval(sorted: ArrayLike<number>, level: number): Interval {
  return { level, low: quantileSorted(sorted, (1 - level) / 2), high: quantileSorted(sorted, (1 + level) / 2) };
}

/**
 * Reflected percentile interval 2θ̂ − q, cut at 0: for distances, whose replicates lie above the estimate by as much as the
 * estimate lies above the truth.
 */
export function reflectedInterval(sorted: ArrayLike<number>, estimate: number, level: number): Interval {
  const { low, high } = percentileInterval(sorted, level);
  return { level, low: Math.max(0, 2 * estimate - high), high: Math.max(0, 2 * estimate - low) };
}
