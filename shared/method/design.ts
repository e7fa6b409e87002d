import { SparseBuilder, type SparseRows } from '#shared/linalg/sparse.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { Layout } from '#shared/method/parameters.ts';

/**
 * Design matrix: row (circuit c, outcome o < d − 1) = ∂p/∂e at the maps of `set`. Forward f_j = G_{g_j}…G_{g_1}ρ, backward
 * b_{o,j} = M_o G_{g_L}…G_{g_{j+1}}; the block of gate k gains Σ_{j: g_j = k} b_{o,j} ⊗ f_j, rows 2…D of the outer product.
 * Clifford gates keep the vectors, and so the rows, sparse.
 */
export function designMatrix(set: GateSet, layout: Layout, circuits: readonly Int32Array[]): SparseRows {
  const { D, d } = layout;
  const builder = new SparseBuilder(layout.columns);
  const row = new Float64Array(layout.columns);
  for (const circuit of circuits) {
    const forward = forwardVectors(set, circuit);
    const last = forward[circuit.length]!;
    for (let o = 0; o < d - 1; o++) {
      let b = set.effects[o]!;
      for (let j = circuit.length; j >= 1; j--) {
        const k = circuit[j - 1]!;
        const at = layout.gateAt[k]!;
        if (at >= 0) addOuter(row, at, b, forward[j]!, D);
        b = pullBack(set.gates[k]!, b, D);
      }
      if (layout.stateAt >= 0) {
        for (let a = 1; a < D; a++) row[layout.stateAt + a - 1] = b[a]!;
        for (let a = 0; a < D; a++) row[layout.effectAt + o * D + a] = last[a]!;
      }
      builder.push(row);
    }
  }
  return builder.build();
}

function forwardVectors(set: GateSet, circuit: Int32Array): Float64Array[] {
  const { D } = set;
  const out = [set.state];
  for (const k of circuit) {
    const g = set.gates[k]!;
    const v = out[out.length - 1]!;
    const next = new Float64Array(D);
    for (let i = 0; i < D; i++) {
      let s = 0;
      for (let j = 0; j < D; j++) s += g[i * D + j]! * v[j]!;
      next[i] = s;
    }
    out.push(next);
  }
  return out;
}

/** bᵀG as a vector. */
function pullBack(g: Float64Array, b: Float64Array, D: number): Float64Array {
  const out = new Float64Array(D);
  for (let i = 0; i < D; i++) {
    const w = b[i]!;
    if (w === 0) continue;
    for (let j = 0; j < D; j++) out[j]! += w * g[i * D + j]!;
  }
  return out;
}

function addOuter(row: Float64Array, at: number, b: Float64Array, f: Float64Array, D: number): void {
  for (let a = 1; a < D; a++) {
    const w = b[a]!;
    if (w === 0) continue;
    const base = at + (a - 1) * D;
    for (let c = 0; c < D; c++) row[base + c]! += w * f[c]!;
  }
}
