import type { SparseRows } from '#shared/linalg/sparse.ts';

/** Above this share of non-zeros the dense blocked product is faster than walking the entries. */
const DENSE_SHARE = 0.35;

/**
 * Adds scale·AᵀA to the lower triangle of `out` (n×n row-major, n = columns of A).
 * Sparse rows are walked entry by entry (cost Σ nnz²/2), full ones go through `addRowProducts`.
 */
export function addGram(a: SparseRows, out: Float64Array): void {
  const n = a.columns;
  if (a.start[a.rows]! > DENSE_SHARE * a.rows * n) {
    const columns = new Float64Array(n * a.rows);
    for (let i = 0; i < a.rows; i++) {
      for (let e = a.start[i]!; e < a.start[i + 1]!; e++) columns[a.index[e]! * a.rows + i] = a.value[e]!;
    }
    addRowProducts(columns, n, a.rows, 1, out);
    return;
  }
  const { start, index, value } = a;
  for (let i = 0; i < a.rows; i++) {
    const first = start[i]!;
    const end = start[i + 1]!;
    for (let e = first; e < end; e++) {
      const v = value[e]!;
      const row = index[e]! * n;
      for (let f = first; f <= e; f++) out[row + index[f]!]! += v * value[f]!;
    }
  }
}

/**
 * Adds scale·X·Xᵀ to the lower triangle of `out`: X is n×m row-major, so that both factors run along memory.
 * Tiles of 2×4 stay in registers. Cost n²m/2 multiply-adds.
 */
export function addRowProducts(x: Float64Array, n: number, m: number, scale: number, out: Float64Array): void {
  const SPAN = 512;
  for (let k0 = 0; k0 < m; k0 += SPAN) {
    const k1 = Math.min(m, k0 + SPAN);
    for (let i = 0; i < n; i++) {
      const p = i * m;
      let j = 0;
      for (; j + 3 <= i; j += 4) {
        const q0 = j * m, q1 = q0 + m, q2 = q1 + m, q3 = q2 + m;
        let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
        for (let k = k0; k < k1; k++) {
          const v = x[p + k]!;
          s0 += v * x[q0 + k]!;
          s1 += v * x[q1 + k]!;
          s2 += v * x[q2 + k]!;
          s3 += v * x[q3 + k]!;
        }
        const o = i * n + j;
        out[o]! += scale * s0;
        out[o + 1]! += scale * s1;
        out[o + 2]! += scale * s2;
        out[o + 3]! += scale * s3;
      }
      for (; j <= i; j++) {
        const q = j * m;
        let s = 0;
        for (let k = k0; k < k1; k++) s += x[p + k]! * x[q + k]!;
        out[i * n + j]! += scale * s;
      }
    }
  }
}
