import { orthonormalBasis } from '#shared/linalg/orthonormal.ts';
import { designMatrix } from '#shared/method/design.ts';
import type { Gauge } from '#shared/method/gauge.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import { invertDesign } from '#shared/method/inverse.ts';
import { layoutOf, type Layout, type NoisyMaps } from '#shared/method/parameters.ts';
import { runPasses, type Passes } from '#shared/method/passes.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { mapsOf, type PatchCase } from '#shared/opinions/patch-case.ts';

/** Orthonormal basis of the complement of the span of `vectors` in D dimensions. */
function complement(vectors: readonly Float64Array[], D: number): Float64Array[] {
  const inside = orthonormalBasis(Float64Array.from(vectors.flatMap((v) => [...v])), vectors.length, D);
  const rest = new Float64Array(D * D);
  for (let i = 0; i < D; i++) {
    rest[i * D + i] = 1;
    for (let q = 0; q < inside.dimension; q++) {
      const w = inside.basis[q * D + i]!;
      for (let j = 0; j < D; j++) rest[i * D + j]! -= w * inside.basis[q * D + j]!;
    }
  }
  // The leftovers of D unit vectors span the complement; the longest has length at least √((D − inside)/D).
  const outside = orthonormalBasis(rest, D, D);
  return Array.from({ length: D - inside.dimension }, (_, q) => outside.basis.slice(q * D, (q + 1) * D));
}

/**
 * Changes of the gates that no circuit sees although preparation and effects are held: E_k = K − G_k K G_kᵀ for every K that
 * leaves both alone, Kρ = 0 and KᵀM = 0. K = u·vᵀ with u orthogonal to the effects and v to the preparation: (D − d)(D − 1) of them.
 */
export function idealSpamGauge(set: GateSet, layout: Layout): Gauge {
  const { D } = set;
  const { columns } = layout;
  const us = complement(set.effects, D);
  const vs = complement([set.state], D);
  const vectors = new Float64Array(us.length * vs.length * columns);
  us.forEach((u, i) => vs.forEach((v, j) => {
    const at = (i * vs.length + j) * columns;
    set.gates.forEach((g, k) => {
      const base = at + layout.gateAt[k]!;
      const gu = new Float64Array(D);
      const gv = new Float64Array(D);
      for (let a = 0; a < D; a++) {
        for (let b = 0; b < D; b++) {
          gu[a]! += g[a * D + b]! * u[b]!;
          gv[a]! += g[a * D + b]! * v[b]!;
        }
      }
      for (let a = 1; a < D; a++) for (let b = 0; b < D; b++) vectors[base + (a - 1) * D + b] = u[a]! * v[b]! - gu[a]! * gv[b]!;
    });
  }));
  const { basis, dimension } = orthonormalBasis(vectors, us.length * vs.length, columns);
  return { dimension, basis };
}

/** The patch with columns for the gates only: preparation and effects are held at their ideals. */
export function idealSpamProblem(problem: PatchProblem): PatchProblem {
  const { set, circuits } = problem;
  const layout = layoutOf(set, new Set(set.gates.keys()));
  const design = designMatrix(set, layout, circuits);
  const gauge = idealSpamGauge(set, layout);
  const inverse = invertDesign(design, gauge);
  return { ...problem, layout, design, gauge, inverse, complete: inverse.rank === layout.columns - gauge.dimension };
}

export interface IdealSpamEstimate {
  problem: PatchProblem;
  passes: Passes;
  maps: NoisyMaps;
}

/**
 * Process tomography by linear inversion with preparation and measurement taken as ideal, in the form that random circuits allow:
 * the pseudo-inverse of the gate columns alone, applied in the same eight passes as the official estimate, so that the held SPAM
 * is the only difference between the two. Whatever preparation and readout do wrong is then laid to the gates: with ideal SPAM
 * it finds the truth, with a readout error ε it finds losses too large by about 2ε over the length of the circuits.
 * Cost as the official estimate without replicates.
 */
export function idealSpam({ problem }: PatchCase): IdealSpamEstimate {
  const own = idealSpamProblem(problem);
  const passes = runPasses(own);
  return { problem: own, passes, maps: mapsOf(own, passes.e) };
}
