import type { Interval } from '#shared/formats/types.ts';
import { LEVELS, percentileInterval } from '#shared/stats/bootstrap-intervals.ts';
import { moments } from '#shared/stats/moments.ts';
import type { RankEntry } from '#shared/stats/rank-ranges.ts';

export interface Difference {
  /** A − B. */
  value: number;
  standardError: number;
  intervals: Interval[];
  /** Share of replicate pairs in which A is better; ties count half. */
  shareBetter: number;
}

/**
 * Difference A − B of one figure of two entries estimated from independent data. Replicate b of the difference is θ_Ab − θ_Bb;
 * pairs with a dropped replicate are left out, and the shorter list sets how many there are. Intervals: percentile; for distances
 * (`reflected`) 2(θ_A − θ_B) − q, not cut, since a difference may have either sign.
 * @returns null where an estimate is not finite or fewer than two pairs are left
 */
export function difference(a: RankEntry, b: RankEntry, better: 'higher' | 'lower', reflected = false): Difference | null {
  const value = a.estimate - b.estimate;
  const count = Math.min(a.replicates.length, b.replicates.length);
  const draws = new Float64Array(count);
  let n = 0;
  for (let r = 0; r < count; r++) {
    const drawn = a.replicates[r]! - b.replicates[r]!;
    if (Number.isFinite(drawn)) draws[n++] = drawn;
  }
  if (!Number.isFinite(value) || n < 2) return null;
  const sorted = draws.slice(0, n).sort();
  const intervals = LEVELS.map((level): Interval => {
    const { low, high } = percentileInterval(sorted, level);
    return reflected ? { level, low: 2 * value - high, high: 2 * value - low } : { level, low, high };
  });
  let wins = 0;
  for (const drawn of sorted) wins += drawn === 0 ? 0.5 : drawn > 0 === (better === 'higher') ? 1 : 0;
  return { value, standardError: moments(sorted).deviation, intervals, shareBetter: wins / n };
}
