import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { estimateChain } from '#shared/method/chain/estimate-chain.ts';
import { readGateFigures } from '#shared/method/chain/gate-figures.ts';
import { officialMethod } from '#shared/method/versions.ts';

/** Seconds of the estimate of a chained register with the figures of its gates; nothing over the whole register. */
export function timeChained(dataset: Dataset, count: number): number {
  const contentId = contentIdOf(dataset);
  const start = performance.now();
  const chain = estimateChain({ gates: dataset.gates, contentId, method: officialMethod, sealed: new Set(), factors: null, count }, dataset);
  readGateFigures(chain, count);
  return (performance.now() - start) / 1000;
}
