import type { NoisyMaps } from '#shared/method/parameters.ts';
import { mapsOf, type PatchCase } from '#shared/opinions/patch-case.ts';

/**
 * The single pass: the published first-order estimate e = C⁺(f − p(0)), which the official method goes on from in seven further
 * passes. Its bias grows as the square of the noise. The official estimate keeps the same values as `firstOrder`.
 */
export function singlePass({ problem, passes }: PatchCase): NoisyMaps {
  return mapsOf(problem, passes.first);
}
