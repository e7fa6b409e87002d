import { rankRanges, type RankEntry } from '#shared/stats/rank-ranges.ts';
import { quantileSorted } from '#shared/stats/quantile.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { BASE, REFERENCE_SHOTS, type Scenario } from '#tests/studies/ranks/scenarios.ts';

/** Ideal probabilities of the first outcome of twenty circuits: certain ones, and ones in between. */
const IDEAL: readonly number[] = Array.from({ length: 20 }, (_, c) => (c % 4 === 0 ? 1 : c % 4 === 1 ? 0 : c % 4 === 2 ? 0.85 : 0.15));
const SIZE = IDEAL.reduce((sum, p) => sum + (p - 0.5) ** 2, 0);

/** True probabilities of a device that retains the share r of every signal. */
const probabilities = (r: number): number[] => IDEAL.map((p) => 0.5 + r * (p - 0.5));

/** Standard error of the retained signal R̂ = Σ(p − ½)(f − ½)/Σ(p − ½)². */
export const standardError = (r: number, shots: number): number => Math.sqrt(probabilities(r).reduce((sum, q, c) => sum + ((IDEAL[c]! - 0.5) ** 2 * q * (1 - q)) / shots, 0)) / SIZE;

export const trueValue = (offset: number): number => BASE + offset * standardError(BASE, REFERENCE_SHOTS);

/** One device measured once: its estimate and its replicates, drawn as the method draws them from smoothed frequencies. */
function measure(r: number, shots: number, replicates: number, generator: Xoshiro256): RankEntry {
  const circuits = IDEAL.length;
  const each = new Float64Array(circuits).fill(shots);
  const rows = (values: readonly number[]): Float64Array => Float64Array.from({ length: 2 * circuits }, (_, i) => (i % 2 === 0 ? values[i >> 1]! : 1 - values[i >> 1]!));
  const f = new Float64Array(circuits);
  const retained = (): number => f.reduce((sum, v, c) => sum + (IDEAL[c]! - 0.5) * (v - 0.5), 0) / SIZE;
  new MultinomialTable(rows(probabilities(r)), each, 2).draw(generator, f, 0, 1);
  const estimate = retained();
  const smoothed = Array.from(f, (v) => (v * shots + 0.5) / (shots + 1));
  const centre = smoothed.reduce((sum, v, c) => sum + (IDEAL[c]! - 0.5) * (v - 0.5), 0) / SIZE;
  const table = new MultinomialTable(rows(smoothed), each, 2);
  const out = new Float64Array(replicates);
  for (let b = 0; b < replicates; b++) {
    table.draw(generator, f, 0, 1);
    out[b] = estimate + retained() - centre;
  }
  return { estimate, replicates: out };
}

export interface BoardResult {
  /** Every rank that a device may truly claim lies in its range, for all devices at once. */
  covered: boolean;
  /** The same asked of the percentile interval of the bootstrap rank, with ties ranked in an order fixed beforehand. */
  naive: boolean;
  /** Ranks in a range, mean over the devices. */
  width: number;
}

/** One board: ten devices measured, ranked, and compared with the truth. */
export function runBoard({ offsets, shots }: Scenario, replicates: number, level: number, generator: Xoshiro256): BoardResult {
  const entries = offsets.map((offset, i) => measure(trueValue(offset), shots[i]!, replicates, generator));
  const ranges = rankRanges(entries, 'higher', level);
  const m = entries.length;
  const covered = ranges.every(({ low, high }, i) => low <= 1 + offsets.filter((o) => o > offsets[i]!).length && high >= m - offsets.filter((o) => o < offsets[i]!).length);
  const naive = naiveIntervals(entries, replicates, level).every(({ low, high }, i) => {
    const rank = 1 + offsets.filter((o, j) => o > offsets[i]! || (o === offsets[i] && j < i)).length;
    return low <= rank && rank <= high;
  });
  return { covered, naive, width: ranges.reduce((sum, { low, high }) => sum + high - low + 1, 0) / m };
}

/** Central share of each device's rank among replicates of the same number: what is not to be used. */
export function naiveIntervals(entries: readonly RankEntry[], replicates: number, level: number): { low: number; high: number }[] {
  const ranks = entries.map(() => new Float64Array(replicates));
  for (let b = 0; b < replicates; b++) {
    const order = entries.map((_, i) => i).sort((i, j) => entries[j]!.replicates[b]! - entries[i]!.replicates[b]!);
    order.forEach((i, place) => (ranks[i]![b] = place + 1));
  }
  return ranks.map((own) => {
    const sorted = own.sort();
    return { low: quantileSorted(sorted, (1 - level) / 2), high: quantileSorted(sorted, (1 + level) / 2) };
  });
}
