import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { designMatrix } from '#shared/method/design.ts';
import { fastInverse } from '#shared/method/fast-inverse.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { pairGates } from '#tests/shared/method/made.ts';

interface InverseCase { chained: boolean; rows: number; columns: number; rank: number; ratio: number; images: { norm: number; every: number[] }[]; circuits: string[] }

/** Made by tests/reference/inverse/make_inverse.py: C⁺ from a full SVD of numpy 2.4.6 (seed 20261205), designs of the independent implementation. */
const { every, cases } = JSON.parse(gunzipSync(readFileSync(new URL('../../reference/inverse/inverse.json.gz', import.meta.url))).toString('utf8')) as { every: number; cases: InverseCase[] };

const gates = pairGates('cz');

/** The k-th vector of the script: integers modulo a prime, so that both sides have the same doubles. */
const probe = (k: number, rows: number): Float64Array => Float64Array.from({ length: rows }, (_, i) => ((7919 * (2 * k + 3) * i + 104729 * k) % 10007) / 10007 - 0.5);

test('the designs go up to 8,001 × 1,263', () => {
  expect(cases.map((c) => [c.rows, c.columns, c.rank])).toEqual([[3600, 1263, 1023], [1800, 240, 240], [8001, 240, 240], [8001, 1263, 1023]]);
});

describe.each(cases.map((c) => ({ ...c, all: c })))('a design of $rows × $columns, rank $rank', ({ all }) => {
  test('C⁺ in closed form times four vectors differs from the SVD by at most 1e-12 of the product\'s length', () => {
    const set = idealGateSet(gates, [0, 1]);
    const layout = layoutOf(set, all.chained ? new Set([4]) : undefined);
    const circuits = indexCircuits(set, all.circuits.map((word) => ({ gates: [...word].map((letter) => gates['abcde'.indexOf(letter)]!.label) })));
    const inverse = fastInverse(designMatrix(set, layout, circuits), gaugeDirections(set, layout))!;
    expect([inverse.rows, inverse.columns, inverse.rank]).toEqual([all.rows, all.columns, all.rank]);
    expect(Math.abs(inverse.conditionRatio / all.ratio - 1)).toBeLessThan(1e-9);
    const [x, y] = [new Float64Array(4 * all.rows), new Float64Array(4 * all.columns)];
    all.images.forEach((_, k) => probe(k, all.rows).forEach((v, i) => (x[4 * i + k] = v)));
    inverse.apply(x, y, 1);
    all.images.forEach((image, k) => {
      const own = y.filter((_, j) => j % 4 === k);
      // The elements that are kept stand for a twentieth of the vector, so that their share of the difference does too.
      const difference = Math.sqrt(image.every.reduce((sum, v, i) => sum + (own[every * i]! - v) ** 2, 0) * (all.columns / image.every.length));
      expect(difference / image.norm).toBeLessThan(1e-12);
      expect(Math.abs(Math.sqrt(own.reduce((sum, v) => sum + v * v, 0)) / image.norm - 1)).toBeLessThan(1e-12);
    });
  });
});
