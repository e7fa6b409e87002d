import type { GateDeclaration } from '#shared/formats/types.ts';
import { idealTransferMatrix } from '#shared/quantum/ideal-gate.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';

/**
 * State, effects and gates of one patch as real vectors and matrices over the normalised Pauli basis P_a/√d
 * (method M1, representation). D = d² = 4ⁿ; p(o | g₁…g_L) = effects[o]·gates[g_L]…gates[g₁]·state.
 */
export interface GateSet {
  n: number;
  d: number;
  D: number;
  labels: readonly string[];
  /** D×D row-major each. */
  gates: readonly Float64Array[];
  /** Length D. */
  state: Float64Array;
  /** d of them, outcomes ascending as bit strings, each of length D. */
  effects: readonly Float64Array[];
}

/** Ideal gate set of the patch `qubits`: the declared gates whose targets lie in it, in declared order, embedded by their targets. */
export function idealGateSet(declared: readonly GateDeclaration[], qubits: readonly number[]): GateSet {
  const n = qubits.length;
  const inside = declared.filter((g) => g.targets.every((t) => qubits.includes(t)));
  return {
    ...idealPreparation(n),
    labels: inside.map((g) => g.label),
    gates: inside.map((g) => embedTransferMatrix(idealTransferMatrix(g.ideal), g.targets.map((t) => qubits.indexOf(t)), n)),
  };
}

/** |0…0⟩ and the projectors on bit strings: tr(P_a|o⟩⟨o|)/√d is ±1/√d where P_a holds only I and Z, else 0. */
function idealPreparation(n: number): Pick<GateSet, 'n' | 'd' | 'D' | 'state' | 'effects'> {
  const d = 1 << n;
  const D = d * d;
  const scale = 1 / Math.sqrt(d);
  const effects = Array.from({ length: d }, (_, outcome) => {
    const m = new Float64Array(D);
    for (let a = 0; a < D; a++) {
      let sign = 1;
      for (let q = 0; q < n && sign !== 0; q++) {
        const digit = (a >> (2 * (n - 1 - q))) & 3;
        const bit = (outcome >> (n - 1 - q)) & 1;
        if (digit === 1 || digit === 2) sign = 0;
        else if (digit === 3 && bit === 1) sign = -sign;
      }
      m[a] = sign * scale;
    }
    return m;
  });
  return { n, d, D, state: effects[0]!.slice(), effects };
}

/** Circuits as indices into the gate set; the dataset's checks have refused unknown labels. */
export function indexCircuits(set: GateSet, circuits: readonly { gates: readonly string[] }[]): Int32Array[] {
  const index = new Map(set.labels.map((label, k) => [label, k]));
  return circuits.map((c) => Int32Array.from(c.gates, (label) => {
    const k = index.get(label);
    if (k === undefined) throw new RangeError(`gate "${label}" does not lie in this patch`);
    return k;
  }));
}
