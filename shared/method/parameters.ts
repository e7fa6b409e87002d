import type { GateSet } from '#shared/method/gate-set.ts';

/**
 * Where the parameters of a patch stand among the columns: gates in declared order (each error map row-major, its
 * first row left out), then preparation (first component left out), then the first d − 1 effects.
 * In a pair of a chained register only the entangling gates have columns.
 */
export interface Layout {
  D: number;
  d: number;
  columns: number;
  /** First column of gate k, or −1 where the gate is held fixed. */
  gateAt: Int32Array;
  /** First column of the preparation, or −1 where preparation and effects are held fixed. */
  stateAt: number;
  effectAt: number;
}

/** @param estimated the gates with columns of their own; all of them, with preparation and effects, unless told */
export function layoutOf(set: GateSet, estimated?: ReadonlySet<number>): Layout {
  const { D, d } = set;
  const gateAt = new Int32Array(set.gates.length).fill(-1);
  let columns = 0;
  set.gates.forEach((_, k) => {
    if (estimated && !estimated.has(k)) return;
    gateAt[k] = columns;
    columns += D * (D - 1);
  });
  if (estimated) return { D, d, columns, gateAt, stateAt: -1, effectAt: -1 };
  return { D, d, columns: columns + (D - 1) + (d - 1) * D, gateAt, stateAt: columns, effectAt: columns + D - 1 };
}

/** Noisy maps in one block each, for the evaluator: gates K·D·D, state D, effects (d − 1)·D. */
export interface NoisyMaps {
  gates: Float64Array;
  state: Float64Array;
  effects: Float64Array;
}

export function emptyMaps(set: GateSet): NoisyMaps {
  return { gates: new Float64Array(set.gates.length * set.D * set.D), state: new Float64Array(set.D), effects: new Float64Array((set.d - 1) * set.D) };
}

/** Noisy maps (1 + E_k)·G_k, ρ + δρ, M_o + δM_o from parameters e. `e` is null for the maps of the set itself. */
export function applyParameters(set: GateSet, layout: Layout, e: Float64Array | null, out: NoisyMaps): void {
  const { D } = layout;
  set.gates.forEach((g, k) => {
    const at = k * D * D;
    out.gates.set(g, at);
    const from = layout.gateAt[k]!;
    if (e === null || from < 0) return;
    for (let i = 1; i < D; i++) {
      const row = at + i * D;
      for (let m = 0; m < D; m++) {
        const w = e[from + (i - 1) * D + m]!;
        if (w === 0) continue;
        for (let j = 0; j < D; j++) out.gates[row + j]! += w * g[m * D + j]!;
      }
    }
  });
  out.state.set(set.state);
  for (let o = 0; o < layout.d - 1; o++) out.effects.set(set.effects[o]!, o * D);
  if (e === null || layout.stateAt < 0) return;
  for (let a = 1; a < D; a++) out.state[a]! += e[layout.stateAt + a - 1]!;
  for (let a = 0; a < (layout.d - 1) * D; a++) out.effects[a]! += e[layout.effectAt + a]!;
}
