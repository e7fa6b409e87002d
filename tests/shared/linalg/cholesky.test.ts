import { expect, test } from 'vitest';
import { Cholesky } from '#shared/linalg/cholesky.ts';
import { addGram, addRowProducts } from '#shared/linalg/gram.ts';
import { largestEigenvalue } from '#shared/linalg/lanczos.ts';
import { orthonormalBasis } from '#shared/linalg/orthonormal.ts';
import { multiplyFour, multiplyVector, SparseBuilder, toDense, transposeSparse, type SparseRows } from '#shared/linalg/sparse.ts';
import { singularValues } from '#shared/linalg/svd.ts';
import { largestDifference, product, randomMatrix, transposeOf } from '#tests/shared/linalg/matrices.ts';
import { seeded } from '#tests/shared/method/made.ts';

function sparse(m: number, n: number, share: number, text: string): SparseRows {
  const g = seeded(text);
  const builder = new SparseBuilder(n);
  for (let i = 0; i < m; i++) builder.push(Float64Array.from({ length: n }, () => (g.next() < share ? g.next() - 0.5 : 0)));
  return builder.build();
}

function fullFromLower(a: Float64Array, n: number): Float64Array {
  return a.map((_, k) => a[Math.max(Math.floor(k / n), k % n) * n + Math.min(Math.floor(k / n), k % n)]!);
}

test.each([0.1, 0.9])('a Gram matrix equals the plain product, with %d of the entries there', (share) => {
  const [m, n] = [70, 37];
  const a = sparse(m, n, share, `gram ${share}`);
  const dense = toDense(a);
  const out = new Float64Array(n * n);
  addGram(a, out);
  expect(largestDifference(fullFromLower(out, n), product(transposeOf(dense, m, n), dense, n, m, n))).toBeLessThan(1e-13);
});

test('row products add scale·XXᵀ', () => {
  const [n, m] = [23, 1100];
  const x = randomMatrix(n, m, seeded('rows'));
  const out = new Float64Array(n * n).fill(1);
  addRowProducts(x, n, m, 0.25, out);
  const want = product(x, transposeOf(x, n, m), n, m, n).map((v) => 1 + v / 4);
  expect(largestDifference(fullFromLower(out, n), want)).toBeLessThan(1e-11);
});

test.each([1, 5, 48, 49, 150])('order %i: every vector of every group solves A·x = b', (n) => {
  const g = seeded(`cholesky ${n}`);
  const x = randomMatrix(n, n + 5, g);
  const a = product(x, transposeOf(x, n, n + 5), n, n + 5, n);
  const factor = Cholesky.factor(a.slice(), n)!;
  const groups = 3;
  const b = randomMatrix(groups * n, 4, g);
  const solved = b.slice();
  factor.solve(solved, groups);
  for (let group = 0; group < groups; group++) {
    const back = product(a, solved.subarray(group * n * 4, (group + 1) * n * 4), n, n, 4);
    expect(largestDifference(back, b.subarray(group * n * 4, (group + 1) * n * 4))).toBeLessThan(1e-9);
  }
});

test('a matrix that is not positive definite has no factor', () => {
  expect(Cholesky.factor(Float64Array.from([1, 0, 2, 1]), 2)).toBeNull();
  expect(Cholesky.factor(Float64Array.from([NaN]), 1)).toBeNull();
});

test('four vectors at once give the same bits as one at a time', () => {
  const a = sparse(50, 31, 0.4, 'four');
  const x = randomMatrix(31, 4, seeded('x'));
  const y = new Float64Array(200);
  multiplyFour(a, x, 0, y, 0);
  for (let l = 0; l < 4; l++) {
    const single = new Float64Array(50);
    multiplyVector(a, x.filter((_, i) => i % 4 === l), single);
    expect(Array.from(y.filter((_, i) => i % 4 === l))).toEqual(Array.from(single));
  }
  expect(largestDifference(toDense(transposeSparse(a)), transposeOf(toDense(a), 50, 31))).toBe(0);
});

test('Lanczos finds the extreme singular values of a Gram matrix to 1e-12, even when they are close together', () => {
  const n = 60;
  const q = orthonormalBasis(randomMatrix(n, n, seeded('q')), n, n).basis;
  const values = Float64Array.from({ length: n }, (_, i) => (i < 3 ? 9 - i * 1e-6 : 1 + i / n));
  const scaled = q.map((v, k) => v * values[Math.floor(k / n)]!);
  const a = product(transposeOf(q, n, n), scaled, n, n, n);
  const largest = largestEigenvalue(n, (x, y) => y.set(product(a, x, n, n, 1)));
  expect(Math.abs(largest - 9)).toBeLessThan(1e-11);
  expect(Math.abs(singularValues(a, n, n).values[0]! - 9)).toBeLessThan(1e-11);
});

test('an orthonormal basis spans dependent vectors with the right dimension', () => {
  const g = seeded('span');
  const [count, length, rank] = [12, 30, 7];
  const v = product(randomMatrix(count, rank, g), randomMatrix(rank, length, g), count, rank, length);
  const { basis, dimension } = orthonormalBasis(v.slice(), count, length);
  expect(dimension).toBe(rank);
  const gram = product(basis, transposeOf(basis, rank, length), rank, length, rank);
  gram.forEach((x, k) => expect(Math.abs(x - (k % (rank + 1) === 0 ? 1 : 0))).toBeLessThan(1e-13));
  const inside = product(product(v, transposeOf(basis, rank, length), count, length, rank), basis, count, rank, length);
  expect(largestDifference(inside, v)).toBeLessThan(1e-13);
});
