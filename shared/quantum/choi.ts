import { smallestSymmetricEigenvalue } from '#shared/linalg/symmetric-eigen.ts';
import { pauliBasis } from '#shared/quantum/pauli.ts';

/**
 * Smallest eigenvalue of the Choi matrix J = (1/D) Σ_ab R_ab P_a ⊗ P_bᵀ (trace 1) of a map with D×D Pauli transfer
 * matrix R. Negative = not completely positive. J is Hermitian of order D; its real form [[A, −B], [B, A]] of order 2D
 * has the same eigenvalues, each twice.
 */
export function smallestChoiEigenvalue(map: Float64Array, n: number): number {
  const d = 1 << n;
  const D = d * d;
  const basis = pauliBasis(n);
  const order = 2 * D;
  const real = new Float64Array(order * order);
  for (let a = 0; a < D; a++) {
    for (let b = 0; b < D; b++) {
      const weight = map[a * D + b]! / D;
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
  return smallestSymmetricEigenvalue(real, order);
}
