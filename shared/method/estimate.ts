import { estimateChained } from '#shared/method/chained.ts';
import { estimateJoint } from '#shared/method/joint.ts';
import type { EstimateInput, EstimateOutput } from '#shared/method/types.ts';

/**
 * Method M1: the official estimate of a dataset. A pure function of dataset, seal, class and method: the same input gives the
 * same bytes on every machine. No option changes the estimate; fewer replicates are a prefix of more.
 */
export function estimate(input: EstimateInput): EstimateOutput {
  const replicates = input.replicates ?? 1;
  if (!Number.isSafeInteger(replicates) || replicates < 1) throw new RangeError(`replicates must be a whole number from 1 on, not ${String(input.replicates)}`);
  return input.dataset.patches.length === 1 ? estimateJoint(input) : estimateChained(input);
}
