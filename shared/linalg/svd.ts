import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { householderQr } from '#shared/linalg/qr.ts';
import { toRows } from '#shared/linalg/rows.ts';

/** A = U·diag(s)·Vᵀ with A m×n. Columns stored one after another: u[k] has length m, v[k] length n; all n right vectors are there. */
export interface Svd {
  values: Float64Array;
  left: Float64Array[];
  right: Float64Array[];
}

/** From this ratio of rows to columns on, a QR first saves more than it costs. */
const TALL = 1.6;

/**
 * Singular value decomposition of a dense m×n matrix (row-major), singular values descending, n of them: a matrix with
 * fewer rows than columns is padded with zero rows, so the whole null space is spanned. Tall ones go through QR first.
 * Accurate to rounding relative to the largest value; no tolerance is applied here.
 */
export function singularValues(a: Float64Array, m: number, n: number): Svd {
  if (m > TALL * n) {
    const qr = householderQr(a, m, n);
    const inner = decompose(qr.r, n, n);
    return { values: inner.values, left: inner.left.map((u) => qr.applyQ(u)), right: inner.right };
  }
  if (m >= n) return decompose(a, m, n);
  const padded = new Float64Array(n * n);
  padded.set(a);
  const out = decompose(padded, n, n);
  return { ...out, left: out.left.map((u) => u.slice(0, m)) };
}

function decompose(a: Float64Array, m: number, n: number): Svd {
  const svd = new SingularValueDecomposition(new Matrix(toRows(a, m, n)), { computeLeftSingularVectors: true, computeRightSingularVectors: true });
  const u = svd.leftSingularVectors;
  const v = svd.rightSingularVectors;
  return {
    values: Float64Array.from(svd.diagonal),
    left: Array.from({ length: n }, (_, k) => Float64Array.from(u.getColumn(k))),
    right: Array.from({ length: n }, (_, k) => Float64Array.from(v.getColumn(k))),
  };
}

/** Number of singular values above cut·largest. */
export function rankAt(values: Float64Array, cut: number): number {
  const least = cut * (values[0] ?? 0);
  let rank = 0;
  while (rank < values.length && values[rank]! > least) rank++;
  return rank;
}

/** Moore–Penrose inverse (n×m row-major) keeping the first `rank` singular values. Cost n·m·rank. */
export function invertSvd(svd: Svd, rank: number, m: number, n: number): Float64Array {
  const out = new Float64Array(n * m);
  for (let k = 0; k < rank; k++) {
    const u = svd.left[k]!;
    const v = svd.right[k]!;
    for (let i = 0; i < n; i++) {
      const w = v[i]! / svd.values[k]!;
      if (w === 0) continue;
      for (let j = 0; j < m; j++) out[i * m + j]! += w * u[j]!;
    }
  }
  return out;
}
