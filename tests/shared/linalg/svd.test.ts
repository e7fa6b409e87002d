import { describe, expect, test } from 'vitest';
import { invertSvd, rankAt, singularValues } from '#shared/linalg/svd.ts';
import { RANK_CUT } from '#shared/linalg/tolerances.ts';
import { flat, largestDifference, product, randomMatrix, transposeOf } from '#tests/shared/linalg/matrices.ts';
import { seeded } from '#tests/shared/method/made.ts';

function pseudoInverse(a: Float64Array, m: number, n: number): { inverse: Float64Array; rank: number } {
  const svd = singularValues(a, m, n);
  const rank = rankAt(svd.values, RANK_CUT);
  return { inverse: invertSvd(svd, rank, m, n), rank };
}

/** Exact rational pseudo-inverses; recomputed with numpy. */
const exact: [string, number[][], number[][], number][] = [
  ['3×2 of full rank', [[1, 2], [3, 4], [5, 6]], [[-4 / 3, -1 / 3, 2 / 3], [13 / 12, 1 / 3, -5 / 12]], 2],
  ['3×3 of rank 2', [[1, 2, 3], [4, 5, 6], [7, 8, 9]], [[-23 / 36, -1 / 6, 11 / 36], [-1 / 18, 0, 1 / 18], [19 / 36, 1 / 6, -7 / 36]], 2],
  ['2×2 of rank 1', [[1, 2], [2, 4]], [[1 / 25, 2 / 25], [2 / 25, 4 / 25]], 1],
  ['cyclic difference with a null direction', [[1, -1, 0], [0, 1, -1], [-1, 0, 1]], [[1 / 3, 0, -1 / 3], [-1 / 3, 1 / 3, 0], [0, -1 / 3, 1 / 3]], 2],
  ['fewer rows than columns', [[1, 3, 5], [2, 4, 6]], [[-4 / 3, 13 / 12], [-1 / 3, 1 / 3], [2 / 3, -5 / 12]], 2],
];

test.each(exact)('pseudo-inverse of a %s is the exact one to 1e-14', (_, a, want, rank) => {
  const found = pseudoInverse(flat(a), a.length, a[0]!.length);
  expect(found.rank).toBe(rank);
  expect(largestDifference(found.inverse, flat(want))).toBeLessThan(1e-14);
});

describe('Penrose conditions ("A generalized inverse for matrices", Math. Proc. Camb. Phil. Soc. 51, 406, 1955)', () => {
  test.each([[40, 12, 12], [40, 12, 7], [12, 40, 9], [25, 25, 24]])('%i×%i of rank %i', (m, n, r) => {
    const g = seeded(`penrose ${m} ${n} ${r}`);
    const a = product(randomMatrix(m, r, g), randomMatrix(r, n, g), m, r, n);
    const { inverse: x, rank } = pseudoInverse(a, m, n);
    expect(rank).toBe(r);
    const ax = product(a, x, m, n, m);
    const xa = product(x, a, n, m, n);
    expect(largestDifference(product(ax, a, m, m, n), a)).toBeLessThan(1e-12);
    expect(largestDifference(product(xa, x, n, n, m), x)).toBeLessThan(1e-11);
    expect(largestDifference(transposeOf(ax, m, m), ax)).toBeLessThan(1e-12);
    expect(largestDifference(transposeOf(xa, n, n), xa)).toBeLessThan(1e-12);
  });
});

test.each([1e-3, 1e-7, 1e-9])('Läuchli matrix keeps its small singular value %d, which its Gram matrix would lose', (e) => {
  const { values } = singularValues(flat([[1, 1, 1], [e, 0, 0], [0, e, 0], [0, 0, e]]), 4, 3);
  expect(Math.abs(values[0]! - Math.sqrt(3 + e * e))).toBeLessThan(1e-14);
  expect(Math.abs(values[1]! / e - 1)).toBeLessThan(1e-5);
  expect(Math.abs(values[2]! / e - 1)).toBeLessThan(1e-5);
});

test('a zero matrix has rank 0 and a zero inverse', () => {
  const { inverse, rank } = pseudoInverse(new Float64Array(6), 3, 2);
  expect(rank).toBe(0);
  expect(Array.from(inverse)).toEqual([0, 0, 0, 0, 0, 0]);
});
