import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';

export function flat(rows: number[][]): Float64Array {
  return Float64Array.from(rows.flat());
}

export function randomMatrix(m: number, n: number, generator: Xoshiro256): Float64Array {
  return Float64Array.from({ length: m * n }, () => generator.next() - 0.5);
}

/** A·B for A m×k and B k×n, row-major. */
export function product(a: Float64Array, b: Float64Array, m: number, k: number, n: number): Float64Array {
  const out = new Float64Array(m * n);
  for (let i = 0; i < m; i++) for (let l = 0; l < k; l++) for (let j = 0; j < n; j++) out[i * n + j]! += a[i * k + l]! * b[l * n + j]!;
  return out;
}

export function transposeOf(a: Float64Array, m: number, n: number): Float64Array {
  const out = new Float64Array(m * n);
  for (let i = 0; i < m; i++) for (let j = 0; j < n; j++) out[j * m + i] = a[i * n + j]!;
  return out;
}

export function largestDifference(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let worst = a.length === b.length ? 0 : Infinity;
  for (let i = 0; i < a.length; i++) worst = Math.max(worst, Math.abs(a[i]! - b[i]!));
  return worst;
}
