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

  private constructor(n: number, store: PanelStore) {
    this.n = n;
    this.store = store;
    const lower = store.matrix;
    const upper = lower.subarray(n * n);
    for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) upper[j * n + i] = lower[i * n + j]!;
  }

  /** Reads the lower triangle of `a` (n×n row-major); null when a pivot is not positive. */
  static factor(a: Float64Array, n: number, plain = false): Cholesky | null {
    const store = new PanelStore(2 * n * n, 2 * n, plain);
    store.matrix.set(a.subarray(0, n * n));
    const l = store.matrix;
    for (let j0 = 0; j0 < n; j0 += BLOCK) {
      const j1 = Math.min(n, j0 + BLOCK);
      if (j0 > 0) subtractEarlier(store, n, j0, j1);
      for (let i = j0; i < n; i++) {
        for (let j = j0; j < Math.min(j1, i + 1); j++) {
          let s = l[i * n + j]!;
          for (let k = j0; k < j; k++) s -= l[i * n + k]! * l[j * n + k]!;
          if (i > j) l[i * n + j] = s / l[j * n + j]!;
          else if (!(s > 0) || !Number.isFinite(s)) return null;
          else l[i * n + i] = Math.sqrt(s);
        }
      }
    }
    return new Cholesky(n, store);
  }

  /** Rows of the lower triangle end to end, n(n + 1)/2 numbers: all that has to be kept. */
  packed(): Float64Array {
    const { n } = this;
    const out = new Float64Array((n * (n + 1)) / 2);
    for (let i = 0, at = 0; i < n; at += ++i) out.set(this.store.matrix.subarray(i * n, i * n + i + 1), at);
    return out;
  }

  /** The factor that was packed. */
  static unpack(packed: Float64Array, n: number): Cholesky {
    const store = new PanelStore(2 * n * n, 2 * n);
    for (let i = 0, at = 0; i < n; at += ++i) store.matrix.set(packed.subarray(at, at + i + 1), i * n);
    return new Cholesky(n, store);
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

/** l[i][j] −= Σ_{k < j0} l[i][k]·l[j][k] for columns j0 … j1 and the rows from j0 on: the part that carries the cost. */
function subtractEarlier(store: PanelStore, n: number, j0: number, j1: number): void {
  const { matrix, vectors } = store;
  const groups = Math.ceil((j1 - j0) / 4);
  const images = groups * n * 4;
  vectors.fill(0, 0, 2 * images);
  for (let j = j0; j < j1; j++) {
    const at = ((j - j0) >> 2) * n * 4 + ((j - j0) & 3);
    for (let k = 0; k < j0; k++) vectors[at + 4 * k] = matrix[j * n + k]!;
  }
  for (let k0 = 0; k0 < j0; k0 += SPAN) {
    const k1 = Math.min(j0, k0 + SPAN);
    for (let g = 0; g < groups; g++) store.subtract(0, n, j0, n, k0, k1, g * n * 4, images + g * n * 4);
  }
  for (let j = j0; j < j1; j++) {
    const at = images + ((j - j0) >> 2) * n * 4 + ((j - j0) & 3);
    for (let i = j; i < n; i++) matrix[i * n + j]! += vectors[at + 4 * i]!;
  }
}
