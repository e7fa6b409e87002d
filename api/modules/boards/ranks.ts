import type { EntityManager } from '@mikro-orm/postgresql';
import { rankRanges, type RankRange } from '#shared/stats/rank-ranges.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import { BoundedCache } from '#api/lib/bounded-cache.ts';
import { loadReplicates, type ReplicatesPlace } from './replicates.ts';

/** The joint level of all rank ranges of a board. */
export const rankLevel = 0.95;

/** An eligible entry: its estimate of the figure the board is read by, and where the replicates of that figure lie. */
export interface Contender extends ReplicatesPlace {
  estimate: number;
}

/** Ranges of the boards asked for last. A key names stored numbers, which never change, so an answer never grows old. */
const cache = new BoundedCache<RankRange[]>(300);

/** Entries² × replicates up to which the web process does it itself, some ten milliseconds; longer ones go to a thread. */
const doneInPlace = 500_000;

const nameOf = (c: Contender): string => `${c.id}/${c.method}/${c.row}`;

/** Rank ranges of the contenders in their order; all of them hold at once with probability `rankLevel`. */
export const ranksOf = async (em: EntityManager, run: RunInThread, contenders: readonly Contender[], better: 'higher' | 'lower'): Promise<RankRange[]> => {
  // The same entries in another order are the same board.
  const order = contenders.map((_, i) => i).sort((a, b) => (nameOf(contenders[a]!) < nameOf(contenders[b]!) ? -1 : 1));
  const sorted = order.map((i) => contenders[i]!);
  const found = await cache.get(`${better} ${sorted.map(nameOf).join(' ')}`, async () => {
    const replicates = await loadReplicates(em, sorted);
    const entries = sorted.map(({ estimate }, i) => ({ estimate, replicates: replicates[i]! }));
    const work = entries.length ** 2 * Math.max(0, ...replicates.map((r) => r.length));
    return work > doneInPlace ? run('rank-ranges', { entries, better, level: rankLevel }) : rankRanges(entries, better, rankLevel);
  });
  const back = new Array<RankRange>(contenders.length);
  order.forEach((place, i) => {
    const { low, high, tiedWith } = found[i]!;
    back[place] = { low, high, tiedWith: tiedWith.map((other) => order[other]!).sort((a, b) => a - b) };
  });
  return back;
};
