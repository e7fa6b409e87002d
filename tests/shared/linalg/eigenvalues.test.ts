import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, test } from 'vitest';
import { optimalAssignment } from '#shared/linalg/assignment.ts';
import { eigenvalues } from '#shared/linalg/eigenvalues.ts';
import { luFactor } from '#shared/linalg/lu.ts';
import { smallestSymmetricEigenvalue } from '#shared/linalg/symmetric-eigen.ts';
import { largestTridiagonalEigenvalue } from '#shared/linalg/tridiagonal.ts';
import { flat, product, randomMatrix } from '#tests/shared/linalg/matrices.ts';
import { seeded } from '#tests/shared/method/made.ts';

function spectrum(a: Float64Array, n: number): [number, number][] {
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  expect(eigenvalues(a.slice(), n, re, im)).toBe(true);
  return Array.from(re, (r, i): [number, number] => [r, im[i]!]).sort((p, q) => p[0] - q[0] || p[1] - q[1]);
}

describe('eigenvalues of a real matrix', () => {
  test('a rotation by θ has e^{±iθ}', () => {
    const found = spectrum(flat([[0.6, -0.8, 0], [0.8, 0.6, 0], [0, 0, 1]]), 3);
    expect(found[0]![0]).toBeCloseTo(0.6, 14);
    expect(found[0]![1]).toBeCloseTo(-0.8, 14);
    expect(found[2]).toEqual([1, 0]);
  });

  test('the companion matrix of (x − 1)(x − 2)(x − 3)(x − 4) has the roots 1 to 4', () => {
    const found = spectrum(flat([[10, -35, 50, -24], [1, 0, 0, 0], [0, 1, 0, 0], [0, 0, 1, 0]]), 4);
    [1, 2, 3, 4].forEach((root, i) => expect(found[i]![0]).toBeCloseTo(root, 10));
  });

  test('a cyclic permutation of order 5 has the fifth roots of unity', () => {
    const a = new Float64Array(25);
    for (let i = 0; i < 5; i++) a[i * 5 + ((i + 1) % 5)] = 1;
    for (const [re, im] of spectrum(a, 5)) {
      expect(re * re + im * im).toBeCloseTo(1, 13);
      const angle = Math.atan2(im, re) / ((2 * Math.PI) / 5);
      expect(angle).toBeCloseTo(Math.round(angle), 12);
    }
  });

  test.each([1, 2, 3, 8, 15, 40])('order %i agrees with ml-matrix to 1e-11', (n) => {
    const a = randomMatrix(n, n, seeded(`eigen ${n}`));
    const evd = new EigenvalueDecomposition(new Matrix(Array.from({ length: n }, (_, i) => Array.from(a.subarray(i * n, (i + 1) * n)))));
    const want = evd.realEigenvalues.map((r, i): [number, number] => [r, evd.imaginaryEigenvalues[i]!]);
    for (const [re, im] of spectrum(a, n)) {
      const nearest = Math.min(...want.map(([r, i]) => Math.hypot(r - re, i - im)));
      expect(nearest).toBeLessThan(1e-11);
    }
  });

  test('zero, identity and triangular matrices are read off; a value that is not finite is refused', () => {
    expect(spectrum(new Float64Array(9), 3)).toEqual([[0, 0], [0, 0], [0, 0]]);
    expect(spectrum(flat([[1, 0], [0, 1]]), 2)).toEqual([[1, 0], [1, 0]]);
    expect(spectrum(flat([[3, 5], [0, 2]]), 2)).toEqual([[2, 0], [3, 0]]);
    expect(eigenvalues(Float64Array.from([1, NaN, 0, 1]), 2, new Float64Array(2), new Float64Array(2))).toBe(false);
  });
});

test('the optimal assignment equals the best of all permutations', () => {
  const g = seeded('assignment');
  const permutations = (items: number[]): number[][] => (items.length === 0 ? [[]] : items.flatMap((x) => permutations(items.filter((y) => y !== x)).map((p) => [x, ...p])));
  for (let n = 1; n <= 6; n++) {
    for (let trial = 0; trial < 20; trial++) {
      const cost = Float64Array.from({ length: n * n }, () => Math.floor(g.next() * 10));
      const total = (match: ArrayLike<number>) => Array.from(match, (j, i) => cost[i * n + j]!).reduce((s, c) => s + c, 0);
      const match = optimalAssignment(cost, n);
      expect(new Set(match).size).toBe(n);
      expect(total(match)).toBe(Math.min(...permutations(Array.from({ length: n }, (_, i) => i)).map(total)));
    }
  }
});

test('LU solves a system that needs pivoting', () => {
  const n = 30;
  const g = seeded('lu');
  const a = randomMatrix(n, n, g);
  a[0] = 0;
  const x = randomMatrix(n, 1, g);
  const b = product(a, x, n, n, 1);
  luFactor(a.slice(), n).solve(b);
  b.forEach((v, i) => expect(v).toBeCloseTo(x[i]!, 11));
});

test('symmetric and tridiagonal extremes: the second difference matrix has 2 − 2 cos(kπ/(n + 1))', () => {
  const n = 24;
  const a = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    a[i * n + i] = 2;
    if (i > 0) a[i * n + i - 1] = a[(i - 1) * n + i] = -1;
  }
  expect(smallestSymmetricEigenvalue(a, n)).toBeCloseTo(2 - 2 * Math.cos(Math.PI / (n + 1)), 13);
  const largest = largestTridiagonalEigenvalue(new Array<number>(n).fill(2), new Array<number>(n - 1).fill(-1));
  expect(largest).toBeCloseTo(2 - 2 * Math.cos((n * Math.PI) / (n + 1)), 13);
});
