import { adjoint, complexMultiply, complexSquare, type ComplexSquare } from '#shared/quantum/complex-matrix.ts';
import { pauliBasis, traceWithPauli, type Pauli } from '#shared/quantum/pauli.ts';

/**
 * Sines and cosines of quarter turns carry rounding of 1e-16 where the exact entry is 0 or ±1. Left in, it would
 * fill the design matrix with noise and cost its sparsity; 1e-14 is far above that rounding and far below anything a gate means.
 */
const SNAP = 1e-14;

function snap(x: number): number {
  if (Math.abs(x) < SNAP) return 0;
  if (Math.abs(x - 1) < SNAP) return 1;
  if (Math.abs(x + 1) < SNAP) return -1;
  return x;
}

function conjugate(u: ComplexSquare, p: Pauli): ComplexSquare {
  const pu = complexSquare(u.n);
  const ua = adjoint(u);
  for (let i = 0; i < u.n; i++) {
    for (let j = 0; j < u.n; j++) {
      const k = (i ^ p.flip) * u.n + j;
      pu.re[i * u.n + j] = p.re[i]! * ua.re[k]! - p.im[i]! * ua.im[k]!;
      pu.im[i * u.n + j] = p.re[i]! * ua.im[k]! + p.im[i]! * ua.re[k]!;
    }
  }
  return complexMultiply(u, pu);
}

/**
 * Pauli transfer matrix of a unitary on n qubits: G_ab = tr(P_a U P_b U†)/d, real, D×D row-major with D = 4ⁿ.
 * Basis order I, X, Y, Z per qubit, first qubit slowest. Orthogonal, first row and column (1, 0, …).
 */
export function transferMatrix(u: ComplexSquare): Float64Array {
  const n = 31 - Math.clz32(u.n);
  const D = u.n * u.n;
  const basis = pauliBasis(n);
  const out = new Float64Array(D * D);
  basis.forEach((pb, b) => {
    const w = conjugate(u, pb);
    basis.forEach((pa, a) => {
      out[a * D + b] = snap(traceWithPauli(pa, w) / u.n);
    });
  });
  return out;
}

/**
 * A k-qubit transfer matrix as a map on n qubits, identity on the others. `positions[i]` is the place among the n
 * of the matrix's i-th (most significant first) qubit. Works for any real map, ideal or estimated.
 */
export function embedTransferMatrix(g: Float64Array, positions: readonly number[], n: number): Float64Array {
  const D = 1 << (2 * n);
  const small = 1 << (2 * positions.length);
  const out = new Float64Array(D * D);
  const shifts = positions.map((q) => 2 * (n - 1 - q));
  const mask = shifts.reduce((m, s) => m | (3 << s), 0);
  const pick = (a: number) => shifts.reduce((index, s) => index * 4 + ((a >> s) & 3), 0);
  for (let a = 0; a < D; a++) {
    for (let b = 0; b < D; b++) {
      if ((a & ~mask) === (b & ~mask)) out[a * D + b] = g[pick(a) * small + pick(b)]!;
    }
  }
  return out;
}
