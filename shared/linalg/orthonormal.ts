import { GAUGE_CUT } from '#shared/linalg/tolerances.ts';

/**
 * Orthonormal basis of the span of `count` vectors of `length`, stored one after another. Gram–Schmidt that takes the
 * longest remaining vector first and projects twice; vectors left shorter than GAUGE_CUT of the first are dependent.
 * The input is overwritten. Cost count²·length.
 * @returns the basis, one vector after another, and its dimension
 */
export function orthonormalBasis(vectors: Float64Array, count: number, length: number): { basis: Float64Array; dimension: number } {
  const basis = new Float64Array(count * length);
  const left = Array.from({ length: count }, (_, i) => i);
  const size = new Float64Array(count);
  for (let i = 0; i < count; i++) size[i] = squared(vectors, i * length, length);
  let dimension = 0;
  let first = 0;
  while (left.length > 0) {
    let best = 0;
    for (let t = 1; t < left.length; t++) if (size[left[t]!]! > size[left[best]!]!) best = t;
    const chosen = left[best]!;
    if (dimension === 0) first = Math.sqrt(size[chosen]!);
    if (!(Math.sqrt(size[chosen]!) > GAUGE_CUT * first)) break;
    left.splice(best, 1);
    const at = dimension * length;
    basis.set(vectors.subarray(chosen * length, (chosen + 1) * length), at);
    for (let q = 0; q < dimension; q++) project(basis, q * length, basis, at, length);
    const scale = 1 / Math.sqrt(squared(basis, at, length));
    for (let k = 0; k < length; k++) basis[at + k]! *= scale;
    for (const i of left) {
      if (project(basis, at, vectors, i * length, length)) size[i] = squared(vectors, i * length, length);
    }
    dimension++;
  }
  return { basis: basis.slice(0, dimension * length), dimension };
}

/** v −= (q·v)·q; false where they are orthogonal to begin with, as most gauge directions of Clifford gates are. */
function project(q: Float64Array, qAt: number, v: Float64Array, vAt: number, length: number): boolean {
  let dot = 0;
  for (let k = 0; k < length; k++) dot += q[qAt + k]! * v[vAt + k]!;
  if (dot === 0) return false;
  for (let k = 0; k < length; k++) v[vAt + k]! -= dot * q[qAt + k]!;
  return true;
}

function squared(v: Float64Array, at: number, length: number): number {
  let s = 0;
  for (let k = 0; k < length; k++) s += v[at + k]! * v[at + k]!;
  return s;
}
