import { DETERMINED_CUT } from '#shared/linalg/tolerances.ts';
import { designMatrix } from '#shared/method/design.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';

/** What is needed to say whether something is determined. */
export type Determining = Pick<PatchProblem, 'set' | 'layout' | 'inverse' | 'complete'>;

/** Whether ‖Nᵀw‖ ≤ 1e-6‖w‖ for a vector w over the columns, N an orthonormal basis of the null space. */
export function isDetermined(problem: Determining, w: Float64Array): boolean {
  const { nullBasis, nullDimension, columns } = problem.inverse;
  let size = 0;
  for (const v of w) size += v * v;
  let hidden = 0;
  for (let q = 0; q < nullDimension; q++) {
    let dot = 0;
    for (let j = 0; j < columns; j++) dot += nullBasis[q * columns + j]! * w[j]!;
    hidden += dot * dot;
  }
  return Math.sqrt(hidden) <= DETERMINED_CUT * Math.sqrt(size);
}

/**
 * For each circuit whether its outcomes are determined: each of its rows at the ideal gates is. A complete set determines
 * every circuit, because its null space is the gauge, which no probability sees.
 */
export function determinedCircuits(problem: Determining, circuits: readonly Int32Array[]): boolean[] {
  if (problem.complete) return circuits.map(() => true);
  const outcomes = problem.set.d - 1;
  return circuits.map((c) => {
    const rows = designMatrix(problem.set, problem.layout, [c]);
    const w = new Float64Array(problem.layout.columns);
    for (let o = 0; o < outcomes; o++) {
      w.fill(0);
      for (let e = rows.start[o]!; e < rows.start[o + 1]!; e++) w[rows.index[e]!] = rows.value[e]!;
      if (!isDetermined(problem, w)) return false;
    }
    return true;
  });
}

/** Σ weight·row over circuits and all outcomes, a vector over the columns; the last outcome's row is minus the sum of the others. */
export function weightedRows(problem: Pick<Determining, 'set' | 'layout'>, circuits: readonly Int32Array[], weights: Float64Array): Float64Array {
  const { d } = problem.set;
  const w = new Float64Array(problem.layout.columns);
  const rows = designMatrix(problem.set, problem.layout, circuits);
  circuits.forEach((_, c) => {
    for (let o = 0; o < d - 1; o++) {
      const weight = weights[c * d + o]! - weights[c * d + d - 1]!;
      const r = c * (d - 1) + o;
      for (let e = rows.start[r]!; e < rows.start[r + 1]!; e++) w[rows.index[e]!]! += weight * rows.value[e]!;
    }
  });
  return w;
}

export function weightedRowsDetermined(problem: Determining, circuits: readonly Int32Array[], weights: Float64Array): boolean {
  return problem.complete || isDetermined(problem, weightedRows(problem, circuits, weights));
}

/** −tr E_k/D averaged over the gates named: gate loss of one, error per gate of all, to first order. */
export function lossGradient(problem: Pick<Determining, 'set' | 'layout'>, gates: readonly number[]): Float64Array {
  const { D } = problem.set;
  const w = new Float64Array(problem.layout.columns);
  for (const k of gates) for (let a = 1; a < D; a++) w[problem.layout.gateAt[k]! + (a - 1) * D + a] = -1 / (D * gates.length);
  return w;
}

export function lossDetermined(problem: Determining, gates: readonly number[]): boolean {
  return problem.complete || isDetermined(problem, lossGradient(problem, gates));
}
