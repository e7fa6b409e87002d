import type { GateDeclaration } from '#shared/formats/types.ts';
import { designMatrix } from '#shared/method/design.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits, type GateSet } from '#shared/method/gate-set.ts';
import { fastInverse, svdInverse } from '#shared/method/inverse.ts';
import { gradientRows, type ForecastFigure } from '#shared/method/gradients.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { idealProbabilities } from '#shared/method/readings.ts';

export interface ForecastInput {
  gates: readonly GateDeclaration[];
  /** Qubits of the joint patch, one or two. */
  qubits: readonly number[];
  /** Circuits to estimate from. */
  circuits: readonly { gates: readonly string[] }[];
  shots: number;
  /** Bench circuits with the labels of `gates`; none = no retained signal. */
  bench?: readonly { depth: number; circuits: readonly { gates: readonly string[] }[] }[];
  /** Chance that a qubit is read wrongly, each way, assumed alike for all; 0.02 unless told. */
  readoutError?: number;
}

export interface Forecast {
  figures: (ForecastFigure & { /** Null where the figure is not determined by the circuits. */ standardError: number | null })[];
  rank: number;
  conditionRatio: number;
  complete: boolean;
}

/**
 * Standard errors known before a shot is taken: the method is linear, so var = WΣWᵀ with W = gradient·C⁺ and
 * Σ = (diag(p) − ppᵀ)/N per circuit, p the ideal probabilities after the assumed readout error. The variance falls as
 * 1/shots exactly. Cost: one inverse and one pass per figure; one qubit well under 100 ms.
 */
export function forecast(input: ForecastInput): Forecast {
  const set = idealGateSet(input.gates, input.qubits);
  const layout = layoutOf(set);
  const circuits = indexCircuits(set, input.circuits);
  const design = designMatrix(set, layout, circuits);
  const gauge = gaugeDirections(set, layout);
  // The closed form where it holds: the planner redraws while a slider moves, and needs no spectrum.
  const inverse = fastInverse(design, gauge) ?? svdInverse(design);
  const complete = inverse.rank === layout.columns - gauge.dimension;
  const gradients = gradientRows({ set, layout, inverse, complete }, input.bench ?? []);
  const probabilities = readWithError(set, circuits, input.readoutError ?? 0.02);
  const figures = gradients.map(({ figure, gradient, determined }) => ({
    ...figure,
    standardError: determined ? Math.sqrt(variance(inverse.applyTranspose(gradient), probabilities, set.d, input.shots)) : null,
  }));
  return { figures, rank: inverse.rank, conditionRatio: inverse.conditionRatio, complete };
}

/** Ideal probabilities with each bit flipped with the given chance, circuits × d. */
function readWithError(set: GateSet, circuits: readonly Int32Array[], error: number): Float64Array {
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

/** Σ over circuits of (Σ_o w²p − (Σ_o w·p)²)/N; the last outcome has no row and so weight 0. */
function variance(weights: Float64Array, probabilities: Float64Array, d: number, shots: number): number {
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
  return total / shots;
}
