import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { toRows } from '#shared/linalg/rows.ts';

/** Smallest eigenvalue of a symmetric matrix (n×n row-major). */
export function smallestSymmetricEigenvalue(a: Float64Array, n: number): number {
  const values = new EigenvalueDecomposition(new Matrix(toRows(a, n, n)), { assumeSymmetric: true }).realEigenvalues;
  return values.reduce((least, v) => Math.min(least, v), Infinity);
}
