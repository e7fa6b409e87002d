import { describe, expect, it } from 'vitest';
import { createGenerator } from '#api/demo/simulator/generator.ts';
import { sampleCounts } from '#api/demo/simulator/sample-counts.ts';

/** Draws of n = 1000 shots; limits are five standard errors of the moment in question, seed fixed. */
const p = [0.5, 0.3, 0.2];
const draws = 20_000;
const shots = 1000;

describe('sampleCounts', () => {
  const stream = createGenerator('moments');
  const rows = Array.from({ length: draws }, () => sampleCounts(p, shots, stream));
  const mean = (f: (row: number[]) => number): number => rows.reduce((sum, row) => sum + f(row), 0) / draws;

  it('takes every shot once', () => expect(rows.every((row) => row.reduce((a, b) => a + b) === shots)).toBe(true));

  it('has the means np', () => p.forEach((x, o) => {
    const error = Math.sqrt((shots * x * (1 - x)) / draws);
    expect(Math.abs(mean((row) => row[o]!) - shots * x)).toBeLessThan(5 * error);
  }));

  it('has the variances 250, 210, 160 and the covariance −150 of a multinomial', () => {
    const second = (i: number, j: number): number => mean((row) => (row[i]! - shots * p[i]!) * (row[j]! - shots * p[j]!));
    const limit = 5 * 250 * Math.sqrt(2 / draws);
    [250, 210, 160].forEach((v, o) => expect(Math.abs(second(o, o) - v)).toBeLessThan(limit));
    expect(Math.abs(second(0, 1) + 150)).toBeLessThan(limit);
  });

  it('never reports an outcome that cannot occur, even where rounding leaves the sum below 1', () => {
    expect(sampleCounts([0, 1 - 1e-16, 0], 1000, createGenerator('edge'))).toEqual([0, 1000, 0]);
    expect(sampleCounts([1e-17, 0.3, 0], 1000, { next: () => 0.999999 })).toEqual([0, 1000, 0]);
  });
});

describe('createGenerator', () => {
  it('repeats with its seed and differs without', () => {
    const take = (seed: string): number[] => { const g = createGenerator(seed); return Array.from({ length: 5 }, () => g.next()); };
    expect(take('a')).toEqual(take('a'));
    expect(take('a')).not.toEqual(take('b'));
  });

  it('follows its documented recurrence (first numbers recomputed in Python with exact integers)', () => {
    const g = createGenerator('moments');
    expect(Array.from({ length: 3 }, () => g.next())).toEqual([0.25340356172775735, 0.9249739832563951, 0.6130393379624203]);
  });

  it('fills ten equal cells evenly: chi-square on nine degrees of freedom below 27.9 (its 99.9 % point)', () => {
    const g = createGenerator('even');
    const cells = new Array<number>(10).fill(0);
    for (let i = 0; i < 100_000; i += 1) { const k = Math.floor(g.next() * 10); cells[k] = cells[k]! + 1; }
    expect(cells.reduce((sum, c) => sum + (c - 10_000) ** 2 / 10_000, 0)).toBeLessThan(27.9);
  });
});
