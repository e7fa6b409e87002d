import { littleEndianBytes } from '#shared/formats/float64.ts';
import { estimate } from '#shared/method/estimate.ts';
import type { EstimateProgress } from '#shared/method/types.ts';
import type { Recomputed } from './compare.ts';
import type { Recomputable } from './types.ts';

/** The official estimate of a frozen entry, made again: same dataset, same seal, same method version, as many replicates. */
export function recompute({ dataset, contentId, gateClass, seal, result }: Recomputable, onProgress?: (progress: EstimateProgress) => void): Recomputed {
  const again = estimate({ dataset, contentId, gateClass, seal, method: result.method, replicates: result.replicates, ...(onProgress ? { onProgress } : {}) });
  return { result: again.result, replicates: littleEndianBytes(again.replicates.values) };
}
