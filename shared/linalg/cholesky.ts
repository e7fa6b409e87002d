import { HELD_GROUPS, PanelStore } from '#shared/linalg/panel-store.ts';

/** Rows handled together, and the length of the inner products: a panel of both fits the second-level cache. */
const BLOCK = 48;
const SPAN = 240;

/**
 * Cholesky factorisation A = L·Lᵀ of a symmetric positive definite matrix, and solutions for groups of four right-hand sides.
 * `lower` and its transpose are both kept, so that either substitution runs along memory. Cost n³/6, then n² a right-hand side.
 */
export class Cholesky {
  readonly n: number;
  private readonly store: PanelStore;

  private constructor(n: number, lower: Float64Array, plain: boolean) {
    this.n = n;
    this.store = new PanelStore(2 * n * n, n, plain);
    this.store.matrix.set(lower);
    const upper = this.store.matrix.subarray(n * n);
    for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) upper[j * n + i] = lower[i * n + j]!;
  }

  /** Reads the lower triangle of `a` (n×n row-major) and overwrites it; null when a pivot is not positive. */
  static factor(a: Float64Array, n: number, plain = false): Cholesky | null {
    for (let j0 = 0; j0 < n; j0 += BLOCK) {
      const j1 = Math.min(n, j0 + BLOCK);
      for (let i = j0; i < n; i++) subtractRowProducts(a, n, i, j0, Math.min(j1, i + 1), j0);
      for (let i = j0; i < n; i++) {
        for (let j = j0; j < Math.min(j1, i + 1); j++) {
          let s = a[i * n + j]!;
          for (let k = j0; k < j; k++) s -= a[i * n + k]! * a[j * n + k]!;
          if (i > j) a[i * n + j] = s / a[j * n + j]!;
          else if (!(s > 0) || !Number.isFinite(s)) return null;
          else a[i * n + i] = Math.sqrt(s);
        }
      }
    }
    return new Cholesky(n, a, plain);
  }

  /** Overwrites each of `groups` groups (n×4 interleaved, one after another) by the solution of A·x = b. */
  solve(x: Float64Array, groups: number): void {
    const size = 4 * this.n;
    for (let from = 0; from < groups; from += HELD_GROUPS) {
      const here = Math.min(HELD_GROUPS, groups - from);
      const part = x.subarray(from * size, (from + here) * size);
      this.store.vectors.set(part);
      this.substitute(here);
      part.set(this.store.vectors.subarray(0, here * size));
    }
  }

  private substitute(groups: number): void {
    const { n, store } = this;
    const { matrix, vectors } = store;
    for (let i0 = 0; i0 < n; i0 += BLOCK) {
      const i1 = Math.min(n, i0 + BLOCK);
      for (let k0 = 0; k0 < i0; k0 += SPAN) {
        const k1 = Math.min(i0, k0 + SPAN);
        for (let g = 0; g < groups; g++) store.subtract(0, n, i0, i1, k0, k1, g * n * 4, g * n * 4);
      }
      for (let g = 0; g < groups; g++) {
        for (let i = i0; i < i1; i++) {
          store.subtract(0, n, i, i + 1, i0, i, g * n * 4, g * n * 4);
          divideFour(vectors, (g * n + i) * 4, matrix[i * n + i]!);
        }
      }
    }
    const upper = n * n;
    for (let i1 = n; i1 > 0; i1 -= BLOCK) {
      const i0 = Math.max(0, i1 - BLOCK);
      for (let k0 = i1; k0 < n; k0 += SPAN) {
        const k1 = Math.min(n, k0 + SPAN);
        for (let g = 0; g < groups; g++) store.subtract(upper, n, i0, i1, k0, k1, g * n * 4, g * n * 4);
      }
      for (let g = 0; g < groups; g++) {
        for (let i = i1 - 1; i >= i0; i--) {
          store.subtract(upper, n, i, i + 1, i + 1, i1, g * n * 4, g * n * 4);
          divideFour(vectors, (g * n + i) * 4, matrix[i * n + i]!);
        }
      }
    }
  }
}

function divideFour(x: Float64Array, at: number, by: number): void {
  x[at]! /= by;
  x[at + 1]! /= by;
  x[at + 2]! /= by;
  x[at + 3]! /= by;
}

/** a[i][j] −= Σ_{k < span} a[i][k]·a[j][k] for j0 ≤ j < j1: the part of the factorisation that carries the cost. */
function subtractRowProducts(a: Float64Array, n: number, i: number, j0: number, j1: number, span: number): void {
  const p = i * n;
  let j = j0;
  for (; j + 3 < j1; j += 4) {
    const q0 = j * n, q1 = q0 + n, q2 = q1 + n, q3 = q2 + n;
    let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
    for (let k = 0; k < span; k++) {
      const v = a[p + k]!;
      s0 += v * a[q0 + k]!;
      s1 += v * a[q1 + k]!;
      s2 += v * a[q2 + k]!;
      s3 += v * a[q3 + k]!;
    }
    a[p + j]! -= s0;
    a[p + j + 1]! -= s1;
    a[p + j + 2]! -= s2;
    a[p + j + 3]! -= s3;
  }
  for (; j < j1; j++) {
    const q = j * n;
    let s = 0;
    for (let k = 0; k < span; k++) s += a[p + k]! * a[q + k]!;
    a[p + j]! -= s;
  }
}
