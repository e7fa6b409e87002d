import type { Dataset, DatasetPatch } from '#shared/formats/types.ts';
import { estimateLocal, type ChainContext, type LocalEstimate } from '#shared/method/chain/estimate-local.ts';
import { estimatePair, type PairEstimate } from '#shared/method/chain/estimate-pair.ts';

/** The estimated patches of a chained register, each list in file order. */
export interface ChainEstimate {
  locals: LocalEstimate[];
  pairs: PairEstimate[];
  /** Patches of pairs without a gate of their own: nothing is estimated from them. */
  idle: DatasetPatch[];
  /** Gates in the longest circuit that was estimated from. */
  longest: number;
}

/** Every one-qubit patch by itself, then every pair on its two. Cost: linear in the number of patches. */
export function estimateChain(context: ChainContext, { patches }: Dataset): ChainEstimate {
  const steps = patches.filter((p) => p.qubits.length <= 2).length;
  let done = 0;
  const own: ChainContext = { ...context, onProgress: (fraction) => context.onProgress?.((done + fraction) / steps) };
  const locals: LocalEstimate[] = [];
  const pairs: PairEstimate[] = [];
  const idle: DatasetPatch[] = [];
  patches.forEach((patch, index) => {
    if (patch.qubits.length !== 1) return;
    locals.push(estimateLocal(own, patch, index));
    done++;
  });
  const of = new Map(locals.map((l) => [l.qubit, l]));
  patches.forEach((patch, index) => {
    if (patch.qubits.length !== 2) return;
    const pair = estimatePair(own, patch, index, [of.get(patch.qubits[0]!)!, of.get(patch.qubits[1]!)!]);
    if (pair) pairs.push(pair);
    else idle.push(patch);
    done++;
  });
  const longest = Math.max(...locals.map((l) => l.problem.longest), ...pairs.map((p) => p.longest));
  return { locals, pairs, idle, longest };
}
