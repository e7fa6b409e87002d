import { decomposeSymmetric } from '#shared/linalg/symmetric-decomposition.ts';
import { choiRealForm, mapFromChoi } from '#shared/quantum/choi.ts';

/** The two projections agree to this (Frobenius norm of the transfer matrix), or the rounds end; what is left is mended exactly. */
const AGREED = 1e-10;
const ROUNDS = 200;

/** The nearest completely positive map: negative eigenvalues of the Choi matrix are cut to zero. */
function clip(map: Float64Array, n: number): { map: Float64Array; smallest: number } {
  const order = 2 << (2 * n);
  const { values, vectors } = decomposeSymmetric(choiRealForm(map, n), order);
  const smallest = values.reduce((least, v) => Math.min(least, v), Infinity);
  if (smallest >= 0) return { map: map.slice(), smallest };
  const kept = new Float64Array(order * order);
  vectors.forEach((v, k) => {
    const value = values[k]!;
    if (value <= 0) return;
    for (let i = 0; i < order; i++) {
      const w = value * v[i]!;
      for (let j = 0; j < order; j++) kept[i * order + j]! += w * v[j]!;
    }
  });
  return { map: mapFromChoi(kept, n), smallest };
}

/** The nearest trace-preserving map: the first row becomes (1, 0, …, 0). */
function preserveTrace(map: Float64Array, D: number): void {
  map.fill(0, 0, D);
  map[0] = 1;
}

/**
 * The completely positive, trace-preserving map nearest to a D×D transfer matrix in the Frobenius norm, by Dykstra's alternating
 * projections ("An algorithm for restricted least squares regression", J. Am. Stat. Assoc. 78, 837, 1983; memory) between the
 * positive Choi matrices (eigenvalues clipped) and the maps with first row (1, 0, …, 0). Rounding and what 200 rounds leave over
 * is mended by mixing in as much of the fully depolarising map, whose Choi eigenvalues are all 1/D, as lifts the smallest
 * eigenvalue to zero; the trace is preserved exactly.
 * Cost a round: one symmetric eigenproblem of order 2D.
 */
export function nearestChannel(map: Float64Array, n: number): Float64Array {
  const D = 1 << (2 * n);
  let x = map.slice();
  preserveTrace(x, D);
  let owed = new Float64Array(x.length);
  for (let round = 0; round < ROUNDS; round++) {
    const y = x.map((v, i) => v + owed[i]!);
    const { map: z, smallest } = clip(y, n);
    if (round === 0 && smallest >= 0) return x;
    owed = y.map((v, i) => v - z[i]!);
    x = z.slice();
    preserveTrace(x, D);
    let apart = 0;
    for (let i = 0; i < D; i++) apart += (x[i]! - z[i]!) * (x[i]! - z[i]!);
    if (apart <= AGREED * AGREED) break;
  }
  return lift(x, n);
}

function lift(x: Float64Array, n: number): Float64Array {
  const D = 1 << (2 * n);
  const { smallest } = clip(x, n);
  if (smallest >= 0) return x;
  // A few units of rounding above zero, so that no other eigenvalue routine sees less than −1e-12.
  const share = (-smallest + 1e-15) / (1 / D - smallest);
  const out = x.map((v) => (1 - share) * v);
  preserveTrace(out, D);
  return out;
}
