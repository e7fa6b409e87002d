import type { GateSet } from '#shared/method/gate-set.ts';
import { idealProbabilities } from '#shared/method/readings.ts';

/** Ideal probabilities with each bit flipped with the given chance, circuits × d. */
export function readWithError(set: GateSet, circuits: readonly Int32Array[], error: number): Float64Array {
  const ideal = idealProbabilities(set, circuits);
  const out = new Float64Array(ideal.length);
  for (let c = 0; c < circuits.length; c++) {
    for (let seen = 0; seen < set.d; seen++) {
      for (let was = 0; was < set.d; was++) {
        let chance = 1;
        for (let q = 0; q < set.n; q++) chance *= ((seen ^ was) >> q) & 1 ? error : 1 - error;
        out[c * set.d + seen]! += chance * ideal[c * set.d + was]!;
      }
    }
  }
  return out;
}

/**
 * Variance of Σ w·f over the rows at one shot a circuit: Σ over circuits of Σ_o w²p − (Σ_o w·p)²; the last outcome has
 * no row and so weight 0. Weights circuits × (d − 1), probabilities circuits × d.
 */
export function varianceAtOneShot(weights: Float64Array, probabilities: Float64Array, d: number): number {
  let total = 0;
  for (let c = 0; c < probabilities.length / d; c++) {
    let squares = 0;
    let mean = 0;
    for (let o = 0; o < d - 1; o++) {
      const w = weights[c * (d - 1) + o]!;
      const p = probabilities[c * d + o]!;
      squares += w * w * p;
      mean += w * p;
    }
    total += squares - mean * mean;
  }
  return total;
}
