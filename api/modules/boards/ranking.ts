import type { EntityManager } from '@mikro-orm/postgresql';
import type { Board, BoardSummary, RankRange } from '#shared/contracts/boards.ts';
import { registerFigure, type Reading } from '#shared/domain/board-figures.ts';
import type { EntryVersion } from '#api/entities/entry-version.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import { isDraft } from './method-results.ts';
import { rankLevel, ranksOf, type Contender } from './ranks.ts';

/** An eligible entry of a board, read by the board's method version. */
export interface Eligible {
  id: string;
  accession: string;
  row: Pick<EntryVersion, 'method' | 'replicates' | 'register' | 'summary'>;
}

export interface Ranking {
  /** How the ranks were found; null where nothing is ranked. */
  how: Board['ranking'];
  ranks: ReadonlyMap<string, RankRange>;
}

type Placed = Contender & { accession: string };

/** Estimate and place of the replicates; null where the entry has no value of that figure. */
export const contenderOf = ({ id, accession, row }: Eligible, reading: Reading): Placed | null => {
  const figure = registerFigure(row.summary.figures, reading, row.register.length);
  return figure === null || figure.value === null ? null : { accession, id, method: row.method, row: row.summary.figures.indexOf(figure), count: row.replicates, estimate: figure.value };
};

/**
 * Rank ranges of all eligible entries of a board, filtered from view or not: a rank is a place on the whole board. None
 * with fewer than two entries, and none by a draft of the method.
 */
export const rankEligible = async (em: EntityManager, run: RunInThread, eligible: readonly Eligible[], reading: Reading, method: string): Promise<Ranking> => {
  const contenders = eligible.map((entry) => contenderOf(entry, reading)).filter((c) => c !== null);
  if (contenders.length < 2 || isDraft(method)) return { how: null, ranks: new Map() };
  const ranges = await ranksOf(em, run, contenders, reading.better);
  const accessionOf = (place: number): string => contenders[place]?.accession ?? '';
  return {
    how: { level: rankLevel, entries: contenders.length, replicates: Math.min(...contenders.map((c) => c.count)) },
    ranks: new Map(ranges.map(({ low, high, tiedWith }, i) => [accessionOf(i), { low, high, tiedWith: tiedWith.map(accessionOf).sort() }])),
  };
};

/** Who may be first: the entries whose range begins at 1, and how far down those ranges reach. */
export const firstOf = ({ how, ranks }: Ranking): BoardSummary['first'] => {
  if (!how) return null;
  const leading = [...ranks.values()].filter(({ low }) => low === 1);
  return { entries: leading.length, to: Math.max(...leading.map(({ high }) => high)), of: how.entries };
};
