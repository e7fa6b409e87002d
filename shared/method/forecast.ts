import type { GateDeclaration } from '#shared/formats/types.ts';
import { designMatrix } from '#shared/method/design.ts';
import { readWithError, varianceAtOneShot } from '#shared/method/forecast-variance.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { fastInverse } from '#shared/method/fast-inverse.ts';
import { svdInverse } from '#shared/method/inverse.ts';
import { gradientRows, type ForecastFigure } from '#shared/method/gradients.ts';
import { layoutOf } from '#shared/method/parameters.ts';

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
 * 1/shots exactly. Cost: one inverse and one pass per figure; one qubit well under 100 ms, a pair one to two seconds.
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
    standardError: determined ? Math.sqrt(varianceAtOneShot(inverse.applyTranspose(gradient), probabilities, set.d) / input.shots) : null,
  }));
  return { figures, rank: inverse.rank, conditionRatio: inverse.conditionRatio, complete };
}
