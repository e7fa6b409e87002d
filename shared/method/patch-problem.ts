import type { DatasetCircuit } from '#shared/formats/types.ts';
import type { SparseRows } from '#shared/linalg/sparse.ts';
import { designMatrix } from '#shared/method/design.ts';
import { Evaluator } from '#shared/method/evaluator.ts';
import { frequenciesOf, withoutLast, type Frequencies } from '#shared/method/frequencies.ts';
import type { FactorStore } from '#shared/method/factors.ts';
import type { Gauge } from '#shared/method/gauge.ts';
import { indexCircuits, type GateSet } from '#shared/method/gate-set.ts';
import type { Inverse } from '#shared/method/inverse.ts';
import { keptInverse } from '#shared/method/kept-inverse.ts';
import { layoutOf, type Layout } from '#shared/method/parameters.ts';
import type { EstimateProgress } from '#shared/method/types.ts';

/** Everything that is fixed before the first pass: the ideal maps, the circuits, the counts, the design and its inverse. */
export interface PatchProblem {
  set: GateSet;
  layout: Layout;
  circuits: readonly Int32Array[];
  counts: Frequencies;
  /** Observed and smoothed frequencies of the design's rows. */
  observed: Float64Array;
  smoothed: Float64Array;
  design: SparseRows;
  gauge: Gauge;
  inverse: Inverse;
  evaluator: Evaluator;
  /** Rank = columns − gauge dimension. */
  complete: boolean;
  longest: number;
}

/**
 * @param layout which parameters are estimated: all of the set unless told
 * @param factors where the factor of the design may be kept
 */
export function poseProblem(set: GateSet, circuits: readonly DatasetCircuit[], onProgress?: (p: EstimateProgress) => void, layout: Layout = layoutOf(set), factors: FactorStore | null = null): PatchProblem {
  const indexed = indexCircuits(set, circuits);
  const counts = frequenciesOf(circuits, set.n);
  onProgress?.({ stage: 'design', fraction: 0 });
  const design = designMatrix(set, layout, indexed);
  onProgress?.({ stage: 'inverse', fraction: 0 });
  const { gauge, inverse } = keptInverse({ set, layout, circuits: indexed, design: () => design }, factors);
  return {
    set, layout, circuits: indexed, counts, design, gauge, inverse,
    observed: withoutLast(counts.observed, counts.circuits, counts.d),
    smoothed: withoutLast(counts.smoothed, counts.circuits, counts.d),
    evaluator: new Evaluator(indexed, set.gates.length, set.D, set.d - 1),
    complete: inverse.rank === layout.columns - gauge.dimension,
    longest: indexed.reduce((most, c) => Math.max(most, c.length), 0),
  };
}
