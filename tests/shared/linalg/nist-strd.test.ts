/**
 * NIST StRD linear least squares: tests/reference/nist (public data, coefficients in exact rational arithmetic).
 * The digits asked for are those that a double-precision QR or SVD of unit-norm columns reaches; a Gram matrix cannot.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { householderQr } from '#shared/linalg/qr.ts';
import { rankAt, singularValues } from '#shared/linalg/svd.ts';

interface Set {
  X: string[][];
  y: string[];
  beta: string[];
}

const sets = JSON.parse(readFileSync(new URL('../../reference/nist/nist_strd_linear_exact.json', import.meta.url), 'utf8')) as Record<string, Set>;

/** Cut of the singular values: below the smallest of Filip (unit-norm columns), so that all eleven coefficients are fitted. */
const CUT = 1e-16;

function rational(text: string): number {
  const [numerator, denominator = '1'] = text.split('/');
  return Number(numerator) / Number(denominator);
}

function prepared({ X, y }: Set) {
  const m = X.length;
  const n = X[0]!.length;
  const a = Float64Array.from(X.flat(), rational);
  const norms = Array.from({ length: n }, (_, j) => Math.sqrt(X.reduce((s, _row, i) => s + a[i * n + j]! ** 2, 0)));
  const scaled = a.map((v, k) => v / norms[k % n]!);
  return { m, n, scaled, norms, y: Float64Array.from(y, rational) };
}

function byQr(set: Set): number[] {
  const { m, n, scaled, norms, y } = prepared(set);
  const { r, applyQt } = householderQr(scaled, m, n);
  const x = Array.from(applyQt(y));
  for (let i = n - 1; i >= 0; i--) {
    for (let j = i + 1; j < n; j++) x[i]! -= r[i * n + j]! * x[j]!;
    x[i]! /= r[i * n + i]!;
  }
  return x.map((v, j) => v / norms[j]!);
}

function bySvd(set: Set): number[] {
  const { m, n, scaled, norms, y } = prepared(set);
  const svd = singularValues(scaled, m, n);
  const x = new Array<number>(n).fill(0);
  for (let k = 0; k < rankAt(svd.values, CUT); k++) {
    const along = svd.left[k]!.reduce((s, u, i) => s + u * y[i]!, 0) / svd.values[k]!;
    for (let j = 0; j < n; j++) x[j]! += along * svd.right[k]![j]!;
  }
  return x.map((v, j) => v / norms[j]!);
}

/** Least number of correct digits over the coefficients: −log₁₀ of the relative error, at most 16. */
function digits(found: number[], set: Set): number {
  return Math.min(...set.beta.map((b, j) => Math.min(16, -Math.log10(Math.max(1e-16, Math.abs(found[j]! - Number(b)) / Math.abs(Number(b)))))));
}

describe.each([['Norris', 12], ['Longley', 10], ['Wampler1', 8.5], ['Wampler2', 8.5], ['Wampler3', 8.5], ['Wampler4', 7], ['Wampler5', 5], ['Filip', 6]] as const)('%s', (name, least) => {
  test(`QR reaches ${least} digits`, () => expect(digits(byQr(sets[name]!), sets[name]!)).toBeGreaterThanOrEqual(least));
  test(`SVD reaches ${least} digits`, () => expect(digits(bySvd(sets[name]!), sets[name]!)).toBeGreaterThanOrEqual(least));
});
