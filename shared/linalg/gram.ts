import { HELD_GROUPS, PanelStore } from '#shared/linalg/panel-store.ts';
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
  for (let i = 0; i < a.rows; ) {
    const first = start[i]!;
    const length = start[i + 1]! - first;
    // The outcomes of one circuit often fill the same columns: three rows then share one pass over the sums.
    const three = i + 2 < a.rows && sameColumns(a, i, i + 1) && sameColumns(a, i, i + 2);
    for (let e = first; e < first + length; e++) {
      const row = index[e]! * n;
      const v = value[e]!;
      if (three) {
        const w = value[e + length]!;
        const x = value[e + 2 * length]!;
        for (let f = first; f <= e; f++) out[row + index[f]!]! += v * value[f]! + w * value[f + length]! + x * value[f + 2 * length]!;
      } else {
        for (let f = first; f <= e; f++) out[row + index[f]!]! += v * value[f]!;
      }
    }
    i += three ? 3 : 1;
  }
}

function sameColumns({ start, index }: SparseRows, i: number, j: number): boolean {
  const length = start[i + 1]! - start[i]!;
  if (start[j + 1]! - start[j]! !== length) return false;
  for (let e = 0; e < length; e++) if (index[start[i]! + e] !== index[start[j]! + e]) return false;
  return true;
}

/**
 * Adds scale·X·Xᵀ to the lower triangle of `out`: X is n×m row-major. Sixty-four columns of the product at a time go through
 * the panel kernel. Cost n²m/2 multiply-adds.
 */
export function addRowProducts(x: Float64Array, n: number, m: number, scale: number, out: Float64Array): void {
  const store = new PanelStore(n * m, n + m);
  store.matrix.set(x);
  const { vectors } = store;
  const images = HELD_GROUPS * m * 4;
  const width = 4 * HELD_GROUPS;
  for (let j0 = 0; j0 < n; j0 += width) {
    const groups = Math.ceil(Math.min(width, n - j0) / 4);
    vectors.fill(0);
    for (let j = j0; j < Math.min(n, j0 + width); j++) {
      const at = ((j - j0) >> 2) * m * 4 + ((j - j0) & 3);
      for (let k = 0; k < m; k++) vectors[at + 4 * k] = x[j * m + k]!;
    }
    for (let g = 0; g < groups; g++) store.subtract(0, m, j0, n, 0, m, g * m * 4, images + g * n * 4);
    for (let j = j0; j < Math.min(n, j0 + width); j++) {
      const at = images + ((j - j0) >> 2) * n * 4 + ((j - j0) & 3);
      for (let i = j; i < n; i++) out[i * n + j]! -= scale * vectors[at + 4 * i]!;
    }
  }
}
