import type { GateDeclaration } from '#shared/formats/types.ts';
import { SOUND_RATIO } from '#shared/linalg/tolerances.ts';
import { designMatrix } from '#shared/method/design.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { fastInverse, invertDesign } from '#shared/method/inverse.ts';
import { layoutOf } from '#shared/method/parameters.ts';

export interface DesignInput {
  gates: readonly GateDeclaration[];
  /** Qubits of the patch, one or two, as indices that the gates' targets use. */
  qubits: readonly number[];
  circuits: readonly { gates: readonly string[] }[];
  /** A pair of a chained register: only the gates on both qubits have columns, the rest is held at its ideal. */
  pairOfChain?: boolean;
}

export interface DesignJudgement {
  columns: number;
  gaugeDimension: number;
  rank: number;
  /** σ_r/σ₁. */
  conditionRatio: number;
  rankAmbiguous: boolean;
  /** rank = columns − gaugeDimension. */
  complete: boolean;
  /** Rank as expected, not ambiguous, ratio at least 0.01. Without an expected rank: as a custom set, complete. */
  sound: (expectedRank?: number) => boolean;
}

function prepare({ gates, qubits, circuits, pairOfChain }: DesignInput) {
  const set = idealGateSet(gates, qubits);
  const both = new Set(set.labels.flatMap((label, k) => ((gates.find((g) => g.label === label)?.targets.length ?? 0) > 1 ? [k] : [])));
  const layout = layoutOf(set, pairOfChain ? both : undefined);
  return { layout, design: designMatrix(set, layout, indexCircuits(set, circuits)), gauge: gaugeDirections(set, layout) };
}

/** What a set of circuits can determine, before a shot is taken (method M1, rank and soundness). One qubit: milliseconds; a sound pair: about a second; a deficient pair: a minute. */
export function judgeDesign(input: DesignInput): DesignJudgement {
  const { layout, design, gauge } = prepare(input);
  const { rank, conditionRatio, rankAmbiguous } = invertDesign(design, gauge);
  const full = layout.columns - gauge.dimension;
  return {
    columns: layout.columns, gaugeDimension: gauge.dimension, rank, conditionRatio, rankAmbiguous, complete: rank === full,
    sound: (expectedRank = full) => rank === expectedRank && !rankAmbiguous && conditionRatio >= SOUND_RATIO,
  };
}

/**
 * Whether circuits are complete and sound, without working out the rank of those that are not: for drawing run sheets of
 * pairs, where most draws may fail. Agrees with `judgeDesign(…).sound(columns − gaugeDimension)`.
 */
export function isCompleteAndSound(input: DesignInput): boolean {
  const { design, gauge } = prepare(input);
  const inverse = fastInverse(design, gauge);
  return inverse !== null && inverse.conditionRatio >= SOUND_RATIO;
}
