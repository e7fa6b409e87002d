import { eigenvalues } from '#shared/linalg/eigenvalues.ts';
import { largestEigenvalue } from '#shared/linalg/lanczos.ts';

/** Ideal blocks without first row and column, with their non-zero entries listed for quick products. */
export interface Blocks {
  m: number;
  gates: { dense: Float64Array; row: Int32Array; column: Int32Array; value: Float64Array }[];
}

export function blocksOf(gates: readonly Float64Array[], D: number): Blocks {
  const m = D - 1;
  return {
    m,
    gates: gates.map((g) => {
      const dense = new Float64Array(m * m);
      const row: number[] = [];
      const column: number[] = [];
      for (let i = 0; i < m; i++) {
        for (let j = 0; j < m; j++) {
          const v = g[(i + 1) * D + j + 1]!;
          dense[i * m + j] = v;
          if (v === 0) continue;
          row.push(i);
          column.push(j);
        }
      }
      return { dense, row: Int32Array.from(row), column: Int32Array.from(column), value: Float64Array.from(row, (i, e) => dense[i * m + column[e]!]!) };
    }),
  };
}

/** z += y·Gᵀ for an m×m matrix y and an ideal block G. */
export function addTimesTranspose(block: Blocks['gates'][number], y: Float64Array, z: Float64Array, m: number): void {
  const { row, column, value } = block;
  for (let e = 0; e < value.length; e++) {
    const v = value[e]!;
    const from = column[e]!;
    const to = row[e]!;
    for (let i = 0; i < m; i++) z[i * m + to]! += v * y[i * m + from]!;
  }
}

/** The power whose norm is bounded, and the modulus above which a second eigenvalue spoils the first. */
const POWER = 64;
const SECOND = 1 - 1e-6;

/**
 * Whether the ideal map X ↦ mean_k G_k X G_kᵀ has the eigenvalue 1 exactly once and no other of modulus above 1 − 1e-6.
 * The identity is its left and right eigenvector, so on the matrices orthogonal to it the norm of a power bounds every
 * other eigenvalue; only where that bound is too weak are all (D − 1)² eigenvalues worked out.
 */
export function hasSingleFixedPoint(blocks: Blocks): boolean {
  const { m, gates } = blocks;
  const size = m * m;
  const y = new Float64Array(size);
  const step = (x: Float64Array, transpose: boolean): Float64Array => {
    const z = new Float64Array(size);
    for (const g of gates) {
      y.fill(0);
      for (let e = 0; e < g.value.length; e++) {
        const to = (transpose ? g.column[e]! : g.row[e]!) * m;
        const from = (transpose ? g.row[e]! : g.column[e]!) * m;
        for (let j = 0; j < m; j++) y[to + j]! += g.value[e]! * x[from + j]!;
      }
      for (let e = 0; e < g.value.length; e++) {
        const to = transpose ? g.column[e]! : g.row[e]!;
        const from = transpose ? g.row[e]! : g.column[e]!;
        for (let i = 0; i < m; i++) z[i * m + to]! += (g.value[e]! * y[i * m + from]!) / gates.length;
      }
    }
    return z;
  };
  const withoutIdentity = (x: Float64Array): void => {
    let trace = 0;
    for (let i = 0; i < m; i++) trace += x[i * m + i]!;
    for (let i = 0; i < m; i++) x[i * m + i]! -= trace / m;
  };
  const squaredNorm = largestEigenvalue(size, (x, out) => {
    let v: Float64Array = x.slice();
    withoutIdentity(v);
    for (let p = 0; p < POWER; p++) v = step(v, false);
    for (let p = 0; p < POWER; p++) v = step(v, true);
    withoutIdentity(v);
    out.set(v);
  });
  if (squaredNorm < 1 - 2 * POWER * (1 - SECOND)) return true;
  const map = new Float64Array(size * size);
  for (const g of gates) {
    for (let e = 0; e < g.value.length; e++) {
      for (let f = 0; f < g.value.length; f++) {
        map[(g.row[e]! * m + g.row[f]!) * size + g.column[e]! * m + g.column[f]!]! += (g.value[e]! * g.value[f]!) / gates.length;
      }
    }
  }
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  if (!eigenvalues(map, size, re, im)) return false;
  let large = 0;
  for (let i = 0; i < size; i++) if (Math.sqrt(re[i]! * re[i]! + im[i]! * im[i]!) > SECOND) large++;
  return large === 1;
}

/** y = A·x for m×m matrices, m a multiple of three, A at `at` of `a`; tiles of 3×3. */
export function multiplyBlock(a: Float64Array, at: number, x: Float64Array, y: Float64Array, m: number): void {
  for (let i = 0; i < m; i += 3) {
    const r0 = at + i * m, r1 = r0 + m, r2 = r1 + m;
    for (let j = 0; j < m; j += 3) {
      let a0 = 0, a1 = 0, a2 = 0, b0 = 0, b1 = 0, b2 = 0, c0 = 0, c1 = 0, c2 = 0;
      for (let k = 0; k < m; k++) {
        const u = a[r0 + k]!, v = a[r1 + k]!, w = a[r2 + k]!;
        const p = k * m + j;
        const x0 = x[p]!, x1 = x[p + 1]!, x2 = x[p + 2]!;
        a0 += u * x0; a1 += u * x1; a2 += u * x2;
        b0 += v * x0; b1 += v * x1; b2 += v * x2;
        c0 += w * x0; c1 += w * x1; c2 += w * x2;
      }
      const o = i * m + j;
      y[o] = a0; y[o + 1] = a1; y[o + 2] = a2;
      y[o + m] = b0; y[o + m + 1] = b1; y[o + m + 2] = b2;
      y[o + 2 * m] = c0; y[o + 2 * m + 1] = c1; y[o + 2 * m + 2] = c2;
    }
  }
}

export function transposed(a: Float64Array, n: number): Float64Array {
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) out[j * n + i] = a[i * n + j]!;
  return out;
}
