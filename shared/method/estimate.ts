import { estimateChained } from '#shared/method/chained.ts';
import { estimateJoint } from '#shared/method/joint.ts';
import type { EstimateInput, EstimateOutput } from '#shared/method/types.ts';
import { officialMethod, requireMethod } from '#shared/method/versions.ts';

/**
 * The estimate of a dataset by one method version, M1 unless told. A pure function of dataset, seal, class and method: the
 * same input gives the same bytes on every machine. A version has no options; fewer replicates are a prefix of more.
 */
export function estimate(input: EstimateInput): EstimateOutput {
  const replicates = input.replicates ?? 1;
  if (!Number.isSafeInteger(replicates) || replicates < 1) throw new RangeError(`replicates must be a whole number from 1 on, not ${String(input.replicates)}`);
  const method = input.method === undefined ? officialMethod : requireMethod(input.method);
  return input.dataset.patches.length === 1 ? estimateJoint(input, method) : estimateChained(input, method);
}
