import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { difference } from '#shared/stats/difference.ts';
import { quantileAbove } from '#shared/stats/quantile.ts';
import { rankRanges, rangesOf, type RankEntry } from '#shared/stats/rank-ranges.ts';

interface Board { better: 'higher' | 'lower'; level: number; estimates: number[]; replicates: number[][]; ranges: number[][] }
const reference = JSON.parse(readFileSync(new URL('../../reference/ranks/ranks.json', import.meta.url), 'utf8')) as { boards: Board[] };

/** Replicates with exactly the given deviation and different orders: a permutation of equally spaced points for each entry. */
const spread = (estimate: number, deviation: number, key: number, count = 199): RankEntry => {
  const replicates = Float64Array.from({ length: count }, (_, b) => estimate + (deviation * (((b * (2 * key + 3) * 7) % count) - (count - 1) / 2) * Math.sqrt(12)) / count);
  return { estimate, replicates };
};

const pair = (ranges: { low: number; high: number }[]) => ranges.map((r) => [r.low, r.high]);

test('rank ranges equal those of a separate numpy script, step by step down (tests/reference/ranks)', () => {
  for (const board of reference.boards) {
    const entries = board.estimates.map((estimate, i) => ({ estimate, replicates: board.replicates[i]! }));
    expect(pair(rankRanges(entries, board.better, board.level))).toEqual(board.ranges);
  }
});

test('by hand: 1, 2, 3, 10 with half-width 1.5, small = better, gives {1–2}, {1–3}, {2–3}, {4}', () => {
  const estimates = [1, 2, 3, 10];
  const ranges = rangesOf(4, (i, j) => estimates[j]! - estimates[i]! > 1.5);
  expect(pair(ranges)).toEqual([[1, 2], [1, 3], [2, 3], [4, 4]]);
  expect(ranges.map((r) => r.tiedWith)).toEqual([[1], [0, 2], [1], []]);
});

describe('special cases', () => {
  test('no entry, one entry', () => {
    expect(rankRanges([], 'higher')).toEqual([]);
    expect(rankRanges([spread(0.9, 0.1, 0)], 'higher')).toEqual([{ low: 1, high: 1, tiedWith: [] }]);
  });

  test('equal estimates are told apart from nobody, with scatter and without', () => {
    for (const deviation of [0, 0.1]) {
      expect(pair(rankRanges([0, 1, 2].map((k) => spread(0.5, deviation, k)), 'higher'))).toEqual([[1, 3], [1, 3], [1, 3]]);
    }
  });

  test('entries without scatter differ if their estimates do', () => {
    expect(pair(rankRanges([spread(0.1, 0, 0), spread(0.3, 0, 1), spread(0.2, 0, 2)], 'lower'))).toEqual([[1, 1], [3, 3], [2, 2]]);
  });

  test('an entry without an estimate or without replicates may have any rank, and widens all others’', () => {
    const lost = { estimate: 0.5, replicates: new Float64Array(199).fill(NaN) };
    const clear = [spread(0.9, 1e-6, 0), spread(0.1, 1e-6, 1)];
    for (const entry of [lost, { estimate: NaN, replicates: clear[0]!.replicates }]) {
      expect(pair(rankRanges([...clear, entry], 'higher'))).toEqual([[1, 2], [2, 3], [1, 3]]);
    }
  });

  test('dropped replicates are left out', () => {
    const holed = spread(0.9, 1e-3, 0);
    (holed.replicates as Float64Array)[7] = NaN;
    expect(pair(rankRanges([holed, spread(0.1, 1e-3, 1)], 'higher'))).toEqual([[1, 1], [2, 2]]);
  });

  test('a level outside 0 to 1 is refused by name', () => {
    expect(() => rankRanges([], 'higher', 1)).toThrow('a level lies between 0 and 1, not 1');
  });
});

const boards = fc.array(fc.record({ estimate: fc.double({ min: 0, max: 1, noNaN: true }), deviation: fc.double({ min: 0.001, max: 0.3, noNaN: true }) }), { minLength: 1, maxLength: 8 });

test('ranges do not depend on the order of the entries, and hold the order of the estimates', () => {
  fc.assert(fc.property(boards, (board) => {
    const entries = board.map(({ estimate, deviation }, k) => spread(estimate, deviation, k));
    const ranges = rankRanges(entries, 'higher');
    const turned = rankRanges([...entries].reverse(), 'higher').reverse();
    expect(pair(turned)).toEqual(pair(ranges));
    ranges.forEach(({ low, high }, i) => {
      const above = board.filter((b) => b.estimate > board[i]!.estimate).length;
      expect(low).toBeLessThanOrEqual(above + 1);
      expect(high).toBeGreaterThan(above);
    });
  }), { seed: 1, numRuns: 200 });
});

test('better low on the negatives is better high; less scatter everywhere never widens a range', () => {
  fc.assert(fc.property(boards, (board) => {
    const scaled = (sign: number, factor: number) => board.map(({ estimate, deviation }, k) => {
      const entry = spread(0, deviation * factor, k);
      return { estimate: sign * estimate, replicates: Float64Array.from(entry.replicates, (r) => sign * (r + estimate)) };
    });
    const wide = rankRanges(scaled(1, 1), 'higher');
    expect(pair(rankRanges(scaled(-1, 1), 'lower'))).toEqual(pair(wide));
    rankRanges(scaled(1, 0.5), 'higher').forEach((narrow, i) => {
      expect(narrow.low).toBeGreaterThanOrEqual(wide[i]!.low);
      expect(narrow.high).toBeLessThanOrEqual(wide[i]!.high);
    });
  }), { seed: 2, numRuns: 200 });
});

test('the critical value is the ⌈(n + 1)q⌉-th smallest: of 1 … 19 at 0.95 the 19th, of 1 … 39 the 38th', () => {
  const first = (n: number) => Array.from({ length: n }, (_, i) => i + 1);
  expect(quantileAbove(first(19), 0.95)).toBe(19);
  expect(quantileAbove(first(39), 0.95)).toBe(38);
  expect(quantileAbove(first(5), 0.95)).toBe(5);
});

describe('difference of two entries', () => {
  const a = { estimate: 0.9, replicates: [0.88, 0.92, NaN, 0.9] };
  const b = { estimate: 0.8, replicates: [0.89, 0.8, 0.8, 0.7] };

  test('by hand: −0.01, 0.12, 0.2; dropped pairs left out, type 7 quantiles, the share counts who is better', () => {
    const found = difference(a, b, 'higher')!;
    expect(found.value).toBeCloseTo(0.1, 12);
    expect(found.shareBetter).toBeCloseTo(2 / 3, 12);
    expect(difference(a, b, 'lower')!.shareBetter).toBeCloseTo(1 / 3, 12);
    expect(found.intervals[0]!.low).toBeCloseTo(0.055, 12);
    expect(found.intervals[0]!.high).toBeCloseTo(0.16, 12);
    // sd of (−0.01, 0.12, 0.2), recomputed with numpy 2.4 (ddof = 1)
    expect(found.standardError).toBeCloseTo(0.10598742063723098, 12);
  });

  test('reflected intervals turn about the difference and may be negative; equal draws count half', () => {
    const found = difference(a, b, 'lower', true)!;
    expect(found.intervals[0]!.low).toBeCloseTo(0.2 - 0.16, 12);
    expect(found.intervals[0]!.high).toBeCloseTo(0.2 - 0.055, 12);
    expect(difference(a, a, 'higher')).toMatchObject({ value: 0, shareBetter: 0.5, standardError: 0 });
  });

  test('null without an estimate or with fewer than two pairs', () => {
    expect(difference({ ...a, estimate: NaN }, b, 'higher')).toBeNull();
    expect(difference({ ...a, replicates: [0.9] }, b, 'higher')).toBeNull();
  });
});
