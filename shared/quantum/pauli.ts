import type { ComplexSquare } from '#shared/quantum/complex-matrix.ts';

/**
 * A Pauli operator as a monomial matrix: row i has its one non-zero entry (re[i] + i·im[i]) in column i ^ flip.
 * Index a has base-4 digits I, X, Y, Z = 0, 1, 2, 3, the first qubit slowest.
 */
export interface Pauli {
  flip: number;
  re: Int8Array;
  im: Int8Array;
}

/** All 4ⁿ Pauli operators of n qubits, first qubit slowest in both the index and the bit strings. */
export function pauliBasis(n: number): Pauli[] {
  const d = 1 << n;
  return Array.from({ length: d * d }, (_, a) => {
    const re = new Int8Array(d);
    const im = new Int8Array(d);
    let flip = 0;
    for (let q = 0; q < n; q++) {
      const digit = (a >> (2 * (n - 1 - q))) & 3;
      if (digit === 1 || digit === 2) flip |= 1 << (n - 1 - q);
    }
    for (let i = 0; i < d; i++) {
      let r = 1;
      let m = 0;
      for (let q = 0; q < n; q++) {
        const digit = (a >> (2 * (n - 1 - q))) & 3;
        const bit = (i >> (n - 1 - q)) & 1;
        if (digit === 3 && bit === 1) [r, m] = [-r, -m];
        if (digit === 2) [r, m] = bit === 0 ? [m, -r] : [-m, r];
      }
      re[i] = r;
      im[i] = m;
    }
    return { flip, re, im };
  });
}

/** Real part of tr(P·W). */
export function traceWithPauli(p: Pauli, w: ComplexSquare): number {
  let sum = 0;
  for (let i = 0; i < w.n; i++) {
    const k = (i ^ p.flip) * w.n + i;
    sum += p.re[i]! * w.re[k]! - p.im[i]! * w.im[k]!;
  }
  return sum;
}
