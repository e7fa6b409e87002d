import { Cholesky } from '#shared/linalg/cholesky.ts';
import type { SparseRows } from '#shared/linalg/sparse.ts';
import { FAST_PATH_FLOOR } from '#shared/linalg/tolerances.ts';
import { factorKey, packFactor, unpackFactor, type DesignFactor, type FactorStore } from '#shared/method/factors.ts';
import { factorDesign, inverseByFactor } from '#shared/method/fast-inverse.ts';
import { gaugeDirections, gaugeOfDimension, type Gauge } from '#shared/method/gauge.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import { invertDesign, SVD_COLUMNS, svdInverse, type Inverse } from '#shared/method/inverse.ts';
import type { Layout } from '#shared/method/parameters.ts';

/** A design and what it depends on. */
export interface Posed {
  set: GateSet;
  layout: Layout;
  circuits: readonly Int32Array[];
  design: () => SparseRows;
}

/**
 * Gauge and inverse of a design as `gaugeDirections` and `invertDesign` give them, to the bit; where a store holds the factor,
 * without Gram matrix, factorisation and Lanczos iterations. Designs that go through an SVD are not kept.
 */
export function keptInverse(posed: Posed, store: FactorStore | null): { gauge: Gauge; inverse: Inverse } {
  const { set, layout, circuits } = posed;
  const design = posed.design();
  if (!store || layout.columns <= SVD_COLUMNS) {
    const gauge = gaugeDirections(set, layout);
    return { gauge, inverse: invertDesign(design, gauge) };
  }
  const key = factorKey(set, layout, circuits);
  const held = lookUp(store, key, layout.columns);
  if (held && held.lower.length > 0) {
    const gauge = gaugeOfDimension(set, layout, held.gaugeDimension);
    return { gauge, inverse: inverseByFactor(design, gauge, { ...held, lower: Cholesky.unpack(held.lower, layout.columns) }) };
  }
  const gauge = gaugeDirections(set, layout);
  const factor = factorDesign(design, gauge);
  if (!factor) return { gauge, inverse: svdInverse(design) };
  store.put(key, packFactor(key, { ...factor, columns: layout.columns, gaugeDimension: gauge.dimension, lower: factor.lower.packed() }));
  return { gauge, inverse: inverseByFactor(design, gauge, factor) };
}

/** What can be said of a design without applying its inverse. */
export type Judgement = Pick<Inverse, 'rank' | 'rankAmbiguous' | 'conditionRatio' | 'spectrum'>;

/** Judgement of a pair's design at the ideal local gates: two numbers are kept, no factor, since nothing is multiplied by its inverse. */
export function keptJudgement(posed: Posed, store: FactorStore | null): Judgement {
  const { set, layout, circuits } = posed;
  const gauge = { dimension: 0, basis: new Float64Array(0) };
  const keep = store && layout.columns > SVD_COLUMNS ? { store, key: factorKey(set, layout, circuits) } : null;
  const held = keep && lookUp(keep.store, keep.key, layout.columns);
  if (held) return { rank: layout.columns, rankAmbiguous: false, conditionRatio: held.sigmaR / held.sigma1, spectrum: [held.sigma1, held.sigmaR] };
  const { rank, rankAmbiguous, conditionRatio, spectrum } = invertDesign(posed.design(), gauge);
  if (keep && rank === layout.columns && spectrum.length === 2) {
    keep.store.put(keep.key, packFactor(keep.key, { columns: layout.columns, gaugeDimension: 0, sigma1: spectrum[0]!, sigmaR: spectrum[1]!, lower: new Float64Array(0) }));
  }
  return { rank, rankAmbiguous, conditionRatio, spectrum };
}

/** What a store holds, if it is what the fast path would have accepted. */
function lookUp(store: FactorStore, key: string, columns: number): DesignFactor | null {
  const bytes = store.get(key);
  const factor = bytes && unpackFactor(key, bytes, columns);
  if (!factor) return null;
  const { gaugeDimension, sigma1, sigmaR } = factor;
  const plausible = gaugeDimension >= 0 && gaugeDimension < columns && Number.isFinite(sigma1) && sigmaR >= FAST_PATH_FLOOR * sigma1 && sigma1 > 0;
  return plausible ? factor : null;
}
