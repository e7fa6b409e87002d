import type { Interval } from '#shared/formats/types.ts';
import { DEFAULT_REPLICATES } from '#shared/method/constants.ts';
import { LEVELS } from '#shared/stats/bootstrap-intervals.ts';

/**
 * Where a type 7 quantile q of the published 2,000 replicates lies among fewer. A further draw of the same law falls below the
 * (0-based) place h of B ordered ones with the chance (h + 1)/(B + 1); the published place has h = 1,999q. The study's place has the
 * same chance among its own B, so that its intervals are neither narrower nor wider on average than those published.
 */
export function placeAmong(replicates: number, q: number): number {
  const chance = ((DEFAULT_REPLICATES - 1) * q + 1) / (DEFAULT_REPLICATES + 1);
  return Math.min(replicates - 1, Math.max(0, (replicates + 1) * chance - 1));
}

function at(sorted: Float64Array, place: number): number {
  const below = Math.floor(place);
  const low = sorted[below]!;
  return low + (place - below) * (sorted[Math.min(below + 1, sorted.length - 1)]! - low);
}

/** The method's intervals from the study's replicates: percentile, or reflected and cut at 0 for distances. */
export function studyIntervals(sorted: Float64Array, estimate: number, distance: boolean): Interval[] {
  return LEVELS.map((level): Interval => {
    const low = at(sorted, placeAmong(sorted.length, (1 - level) / 2));
    const high = at(sorted, placeAmong(sorted.length, (1 + level) / 2));
    return distance ? { level, low: Math.max(0, 2 * estimate - high), high: Math.max(0, 2 * estimate - low) } : { level, low, high };
  });
}
