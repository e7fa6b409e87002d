import { LANCZOS_CHANGE } from '#shared/linalg/tolerances.ts';
import { largestTridiagonalEigenvalue } from '#shared/linalg/tridiagonal.ts';

/** Steps over which the value must stand still, and the most steps made. */
const PATIENCE = 6;
const MOST_STEPS = 400;

/**
 * Largest eigenvalue of a symmetric positive semidefinite operator of order n by Lanczos iteration with full
 * reorthogonalisation: power iteration that remembers its steps. The start is a fixed scattered vector, so the
 * answer is the same on every run. For the smallest singular value give the inverse of the Gram matrix.
 * @param apply y ← A·x
 */
export function largestEigenvalue(n: number, apply: (x: Float64Array, y: Float64Array) => void): number {
  const steps = Math.min(n, MOST_STEPS);
  const basis: Float64Array[] = [];
  const diagonal: number[] = [];
  const offDiagonal: number[] = [];
  let v = scattered(n);
  let value = 0;
  let still = 0;
  for (let step = 0; step < steps; step++) {
    basis.push(v);
    const w = new Float64Array(n);
    apply(v, w);
    diagonal.push(dot(v, w));
    for (let pass = 0; pass < 2; pass++) {
      for (const q of basis) {
        const s = dot(q, w);
        for (let i = 0; i < n; i++) w[i]! -= s * q[i]!;
      }
    }
    const next = largestTridiagonalEigenvalue(diagonal, offDiagonal);
    still = Math.abs(next - value) <= LANCZOS_CHANGE * Math.abs(next) ? still + 1 : 0;
    value = next;
    const beta = Math.sqrt(dot(w, w));
    if (still >= PATIENCE || !(beta > LANCZOS_CHANGE * Math.abs(value))) break;
    offDiagonal.push(beta);
    for (let i = 0; i < n; i++) w[i]! /= beta;
    v = w;
  }
  return value;
}

function dot(a: Float64Array, b: Float64Array): number {
  let s = 0;
  for (let i = 0; i < a.length; i++) s += a[i]! * b[i]!;
  return s;
}

/** A unit vector with no symmetry that a wanted eigenvector could be orthogonal to (linear congruential numbers, fixed start). */
function scattered(n: number): Float64Array {
  const v = new Float64Array(n);
  let state = 1;
  for (let i = 0; i < n; i++) {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    v[i] = state / 4294967296 - 0.5;
  }
  const size = Math.sqrt(dot(v, v));
  for (let i = 0; i < n; i++) v[i]! /= size;
  return v;
}
