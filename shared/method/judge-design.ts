import type { GateDeclaration } from '#shared/formats/types.ts';
import { SOUND_RATIO } from '#shared/linalg/tolerances.ts';
import { designMatrix } from '#shared/method/design.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import type { FactorStore } from '#shared/method/factors.ts';
import { fastInverse } from '#shared/method/fast-inverse.ts';
import { keptInverse, keptJudgement } from '#shared/method/kept-inverse.ts';
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
  const indexed = indexCircuits(set, circuits);
  return { set, layout, circuits: indexed, design: () => designMatrix(set, layout, indexed) };
}

/** What a set of circuits can determine, before a shot is taken (method M1, rank and soundness). One qubit: milliseconds; a sound pair: about a second; a deficient pair: a minute. */
export function judgeDesign(input: DesignInput, factors: FactorStore | null = null): DesignJudgement {
  const posed = prepare(input);
  const { layout } = posed;
  const judged = input.pairOfChain ? { gauge: { dimension: 0 }, inverse: keptJudgement(posed, factors) } : keptInverse(posed, factors);
  const { rank, conditionRatio, rankAmbiguous } = judged.inverse;
  const full = layout.columns - judged.gauge.dimension;
  return {
    columns: layout.columns, gaugeDimension: judged.gauge.dimension, rank, conditionRatio, rankAmbiguous, complete: rank === full,
    sound: (expectedRank = full) => rank === expectedRank && !rankAmbiguous && conditionRatio >= SOUND_RATIO,
  };
}

/**
 * Whether circuits are complete and sound, without working out the rank of those that are not: for drawing run sheets of
 * pairs, where most draws may fail. Agrees with `judgeDesign(…).sound(columns − gaugeDimension)`.
 */
export function isCompleteAndSound(input: DesignInput): boolean {
  const { set, layout, design } = prepare(input);
  const inverse = fastInverse(design(), gaugeDirections(set, layout));
  return inverse !== null && inverse.conditionRatio >= SOUND_RATIO;
}
