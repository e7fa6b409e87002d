import type { Dataset, DatasetPatch } from '#shared/formats/types.ts';
import { MISFIT_DRAWS } from '#shared/method/constants.ts';
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

/** Work of a patch before, during and after its replicates. */
type Work = [before: number, replicates: number, after: number];

/**
 * Work in replicates of one circuit of one qubit, as measured: a circuit of a pair takes seven times as long, both designs of a
 * pair as long as 800 replicates; the misfit draws as often as it does.
 */
function workOf({ qubits, circuits }: DatasetPatch, count: number): Work {
  const n = circuits.length;
  if (qubits.length === 1) return [0, n * Math.max(count, MISFIT_DRAWS.pair), n * MISFIT_DRAWS.one];
  return [7 * n * 800, 7 * n * count, 7 * n * MISFIT_DRAWS.pair];
}

const sum = (work: readonly number[]): number => work.reduce((all, part) => all + part, 0);

/** Every one-qubit patch by itself, then every pair on its two. Cost: linear in the number of patches. */
export function estimateChain(context: ChainContext, { patches }: Dataset): ChainEstimate {
  const works = patches.map((p) => (p.qubits.length <= 2 ? workOf(p, context.count) : ([0, 0, 0] as Work)));
  const all = sum(works.map(sum));
  let done = 0;
  const forPatch = (index: number): ChainContext => {
    const [before, replicates] = works[index]!;
    const from = done;
    done += sum(works[index]!);
    return { ...context, onProgress: (fraction) => context.onProgress?.((from + before + fraction * replicates) / all) };
  };
  const locals: LocalEstimate[] = [];
  const pairs: PairEstimate[] = [];
  const idle: DatasetPatch[] = [];
  patches.forEach((patch, index) => {
    if (patch.qubits.length !== 1) return;
    locals.push(estimateLocal(forPatch(index), patch, index));
  });
  const of = new Map(locals.map((l) => [l.qubit, l]));
  patches.forEach((patch, index) => {
    if (patch.qubits.length !== 2) return;
    const pair = estimatePair(forPatch(index), patch, index, [of.get(patch.qubits[0]!)!, of.get(patch.qubits[1]!)!]);
    if (pair) pairs.push(pair);
    else idle.push(patch);
  });
  const longest = Math.max(...locals.map((l) => l.problem.longest), ...pairs.map((p) => p.longest));
  return { locals, pairs, idle, longest };
}
