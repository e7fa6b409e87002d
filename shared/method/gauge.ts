import { orthonormalBasis } from '#shared/linalg/orthonormal.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { Layout } from '#shared/method/parameters.ts';

/** Orthonormal directions in parameter space that change no probability to first order. */
export interface Gauge {
  dimension: number;
  /** `dimension` vectors of length `columns`, one after another. */
  basis: Float64Array;
}

/** A gauge whose dimension is known already: its directions are worked out when somebody asks for them. */
export function gaugeOfDimension(set: GateSet, layout: Layout, dimension: number): Gauge {
  let found: Gauge | null = null;
  return {
    dimension,
    get basis() {
      found ??= gaugeDirections(set, layout);
      return found.basis;
    },
  };
}

/**
 * Gauge columns: for each elementary K with zero first row, E_k = K − G_k K G_kᵀ, δρ = Kρ, δM = −KᵀM. Their span may be
 * smaller than D(D − 1): a K that commutes with all gates and leaves the SPAM alone changes nothing.
 * A layout with gates or SPAM held fixed has no gauge.
 */
export function gaugeDirections(set: GateSet, layout: Layout): Gauge {
  if (layout.stateAt < 0) return { dimension: 0, basis: new Float64Array(0) };
  const { D, d, columns } = layout;
  const count = D * (D - 1);
  const vectors = new Float64Array(count * columns);
  for (let i = 1; i < D; i++) {
    for (let j = 0; j < D; j++) {
      const at = ((i - 1) * D + j) * columns;
      set.gates.forEach((g, k) => {
        const base = at + layout.gateAt[k]!;
        vectors[base + (i - 1) * D + j]! += 1;
        for (let a = 1; a < D; a++) {
          const w = g[a * D + i]!;
          if (w === 0) continue;
          for (let b = 0; b < D; b++) vectors[base + (a - 1) * D + b]! -= w * g[b * D + j]!;
        }
      });
      vectors[at + layout.stateAt + i - 1] = set.state[j]!;
      for (let o = 0; o < d - 1; o++) vectors[at + layout.effectAt + o * D + j] = -set.effects[o]![i]!;
    }
  }
  const { basis, dimension } = orthonormalBasis(vectors, count, columns);
  return { dimension, basis };
}
