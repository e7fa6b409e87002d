import { smallestSymmetricEigenvalue } from '#shared/linalg/symmetric-eigen.ts';
import { pauliBasis } from '#shared/quantum/pauli.ts';

/**
 * Real form [[A, −B], [B, A]] (order 2D, row-major) of the Choi matrix A + iB = J = (1/D) Σ_ab R_ab P_a ⊗ P_bᵀ (trace 1) of a map
 * with D×D Pauli transfer matrix R at `at` of `maps`. It has the eigenvalues of J, each twice.
 */
export function choiRealForm(maps: Float64Array, n: number, at = 0): Float64Array {
  const d = 1 << n;
  const D = d * d;
  const basis = pauliBasis(n);
  const order = 2 * D;
  const real = new Float64Array(order * order);
  for (let a = 0; a < D; a++) {
    for (let b = 0; b < D; b++) {
      const weight = maps[at + a * D + b]! / D;
      if (weight === 0) continue;
      const pa = basis[a]!;
      const pb = basis[b]!;
      for (let i = 0; i < d; i++) {
        for (let k = 0; k < d; k++) {
          // Row (i, l), column (i ^ flip_a, k) of P_a ⊗ P_bᵀ, with P_b's entry in row k, column l = k ^ flip_b.
          const row = i * d + (k ^ pb.flip);
          const column = (i ^ pa.flip) * d + k;
          const re = weight * (pa.re[i]! * pb.re[k]! - pa.im[i]! * pb.im[k]!);
          const im = weight * (pa.re[i]! * pb.im[k]! + pa.im[i]! * pb.re[k]!);
          real[row * order + column]! += re;
          real[(row + D) * order + column + D]! += re;
          real[row * order + column + D]! -= im;
          real[(row + D) * order + column]! += im;
        }
      }
    }
  }
  return real;
}

/** The transfer matrix of a Choi matrix in its real form: R_ab = tr(J·P_a ⊗ P_bᵀ). Undoes `choiRealForm`. */
export function mapFromChoi(real: Float64Array, n: number): Float64Array {
  const d = 1 << n;
  const D = d * d;
  const basis = pauliBasis(n);
  const order = 2 * D;
  const map = new Float64Array(D * D);
  for (let a = 0; a < D; a++) {
    for (let b = 0; b < D; b++) {
      const pa = basis[a]!;
      const pb = basis[b]!;
      let sum = 0;
      for (let i = 0; i < d; i++) {
        for (let k = 0; k < d; k++) {
          const row = i * d + (k ^ pb.flip);
          const column = (i ^ pa.flip) * d + k;
          const re = pa.re[i]! * pb.re[k]! - pa.im[i]! * pb.im[k]!;
          const im = pa.re[i]! * pb.im[k]! + pa.im[i]! * pb.re[k]!;
          // tr(J·X) takes J's entry (column, row) beside X's entry (row, column).
          sum += re * real[column * order + row]! - im * real[(column + D) * order + row]!;
        }
      }
      map[a * D + b] = sum;
    }
  }
  return map;
}

/** Smallest eigenvalue of the Choi matrix of a map. Negative = not completely positive. */
export function smallestChoiEigenvalue(map: Float64Array, n: number): number {
  return smallestSymmetricEigenvalue(choiRealForm(map, n), 2 << (2 * n));
}
