/** Effects of one qubit, |0⟩⟨0| and |1⟩⟨1|, each over the four Paulis. */
export type QubitEffects = readonly Float64Array[];

/** One axis of a tensor from `from` entries to `rows.length`: out[l, k, r] = Σ_a rows[k][a]·t[l, a, r]. */
function contractAxis(t: Float64Array, left: number, right: number, from: number, rows: readonly ArrayLike<number>[]): Float64Array {
  const out = new Float64Array(left * rows.length * right);
  for (let l = 0; l < left; l++) {
    rows.forEach((row, k) => {
      for (let a = 0; a < from; a++) {
        const v = row[a]!;
        if (v === 0) continue;
        for (let r = 0; r < right; r++) out[(l * rows.length + k) * right + r]! += v * t[(l * from + a) * right + r]!;
      }
    });
  }
  return out;
}

const paulis = [0, 1, 2, 3].map((a) => Float64Array.from({ length: 4 }, (_, b) => (a === b ? 1 : 0)));

/** A vector over the Paulis of n qubits read out: outcome axes of two everywhere, save that the axis `keep` stays four Paulis. */
export function readEffects(f: Float64Array, effects: readonly QubitEffects[], keep = -1): Float64Array {
  let t = f;
  let left = 1;
  effects.forEach((own, axis) => {
    const rows = axis === keep ? paulis : own;
    t = contractAxis(t, left, 4 ** (effects.length - 1 - axis), 4, rows);
    left *= rows.length;
  });
  return t;
}

/** Σ_o weights[o]·M_o as a vector over the Paulis, M_o the product of the qubits' effects. */
export function pullWeights(weights: Float64Array, effects: readonly QubitEffects[]): Float64Array {
  let t = weights;
  let left = 1;
  effects.forEach((own, axis) => {
    t = contractAxis(t, left, 2 ** (effects.length - 1 - axis), 2, paulis.map((_, a) => own.map((effect) => effect[a]!)));
    left *= 4;
  });
  return t;
}

/**
 * Derivatives of Σ_o weights[o]·M_o·f by the first effect of the qubit on `axis`, whose complement moves the other way.
 */
export function effectGradient(f: Float64Array, weights: Float64Array, effects: readonly QubitEffects[], axis: number): number[] {
  const read = readEffects(f, effects, axis);
  const right = 2 ** (effects.length - 1 - axis);
  const out = [0, 0, 0, 0];
  for (let l = 0; l < 2 ** axis; l++) {
    for (let r = 0; r < right; r++) {
      const change = weights[2 * l * right + r]! - weights[(2 * l + 1) * right + r]!;
      for (let a = 0; a < 4; a++) out[a]! += change * read[(4 * l + a) * right + r]!;
    }
  }
  return out;
}
