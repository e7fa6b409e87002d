import type { EntityManager } from '@mikro-orm/postgresql';
import type { BoardDifference, BoardFigure } from '#shared/contracts/boards.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateClass } from '#shared/formats/types.ts';
import { difference } from '#shared/stats/difference.ts';
import { contenderOf } from './ranking.ts';
import { loadReplicates } from './replicates.ts';
import { judgeEntries } from './service.ts';

/** Figures whose intervals are reflected, and so are those of their differences. */
const distances: ReadonlySet<string> = new Set(['output-error', 'prediction-error']);

/** Two entries that stand on a board, compared replicate by replicate. */
export const readDifference = async (em: EntityManager, gateClass: GateClass, query: { figure: BoardFigure; a: string; b: string }, now: Date): Promise<BoardDifference> => {
  const { method, reading, all } = await judgeEntries(em, gateClass, query, now);
  if (query.a === query.b) throw new AppError('invalid-request', `In the query, b: ${query.b} is the same entry as a.`);
  const wanted = (['a', 'b'] as const).map((side) => {
    const found = all.find(({ candidate, reasons }) => candidate.accession === query[side] && reasons.length === 0);
    const contender = found ? contenderOf(found.candidate, reading) : null;
    if (!found || !contender) throw new AppError('not-found', `${query[side]} does not stand on the board ${gateClass.id} read by ${query.figure}.`);
    return { contender, as: { accession: found.candidate.accession, version: found.candidate.version, name: found.row.device.name } };
  });
  const [a, b] = wanted as [(typeof wanted)[0], (typeof wanted)[0]];
  const [left, right] = (await loadReplicates(em, [a.contender, b.contender])) as [Float64Array, Float64Array];
  const found = difference({ estimate: a.contender.estimate, replicates: left }, { estimate: b.contender.estimate, replicates: right }, reading.better, distances.has(reading.key));
  if (!found) throw new AppError('not-found', `${query.a} and ${query.b} have no replicates in common by ${query.figure}.`);
  return { a: a.as, b: b.as, figure: query.figure, method, ...found, replicates: Math.min(left.length, right.length) };
};
