import type { NoisyMaps } from '#shared/method/parameters.ts';
import { ascend, type Ascent } from '#shared/opinions/ascend.ts';
import { mapsOf, type PatchCase } from '#shared/opinions/patch-case.ts';
import { nearestChannel } from '#shared/opinions/positive.ts';
import type { Convergence } from '#shared/opinions/types.ts';

/** Most iterations: five are usual; a pair's cost seconds each. */
const LIMITS = { one: 60, pair: 20 } as const;

export interface LikelihoodEstimate {
  maps: NoisyMaps;
  convergence: Convergence;
  /** Log-likelihood at the start and after each step. */
  path: number[];
}

const limitOf = ({ problem }: PatchCase): number => (problem.set.n === 1 ? LIMITS.one : LIMITS.pair);

/** Trace-preserving maximum likelihood, started from the official estimate. */
export function likelihood(patch: PatchCase): LikelihoodEstimate {
  const limit = limitOf(patch);
  const found = ascend(patch.problem, mapsOf(patch.problem, patch.passes.e), { limit });
  return summary(found, limit, found.path[0]!);
}

/** Every gate brought to the nearest completely positive, trace-preserving map; preparation and effects as they are. */
export function projectGates({ problem }: PatchCase, maps: NoisyMaps): NoisyMaps {
  const { n, D } = problem.set;
  const size = D * D;
  const gates = maps.gates.slice();
  for (let at = 0; at < gates.length; at += size) gates.set(nearestChannel(gates.subarray(at, at + size), n), at);
  return { ...maps, gates };
}

/**
 * The same with every gate completely positive: started from the maximum without that constraint, its gates are brought to the
 * nearest completely positive maps, and from there each step is followed by the same projection. Which maps are nearest depends
 * on the gauge, so this route alone has figures that the gauge of the start can move.
 */
export function positiveLikelihood(patch: PatchCase, free: LikelihoodEstimate = likelihood(patch)): LikelihoodEstimate {
  const limit = limitOf(patch);
  const found = ascend(patch.problem, projectGates(patch, free.maps), { limit, project: (maps) => projectGates(patch, maps) });
  return summary(found, limit, free.path[0]!);
}

function summary(found: Ascent, limit: number, official: number): LikelihoodEstimate {
  const { maps, converged, iterations, path, remaining } = found;
  return { maps, path, convergence: { converged, iterations, limit, gain: path[path.length - 1]! - official, remaining } };
}
