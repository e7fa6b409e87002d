import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { toRows } from '#shared/linalg/rows.ts';

/** Eigenvalues (ascending) of a symmetric matrix and the orthonormal eigenvectors that belong to them, each of length n. */
export interface SymmetricDecomposition {
  values: Float64Array;
  vectors: Float64Array[];
}

/** A = Σ λ_k v_k v_kᵀ of a symmetric matrix (n×n row-major). Cost about 9 n³. */
export function decomposeSymmetric(a: Float64Array, n: number): SymmetricDecomposition {
  const found = new EigenvalueDecomposition(new Matrix(toRows(a, n, n)), { assumeSymmetric: true });
  const { eigenvectorMatrix } = found;
  return { values: Float64Array.from(found.realEigenvalues), vectors: Array.from({ length: n }, (_, k) => Float64Array.from(eigenvectorMatrix.getColumn(k))) };
}
