import type { EntityManager } from '@mikro-orm/postgresql';
import type { Opinions } from '#shared/contracts/opinions.ts';
import { JobRun } from '#api/entities/job-run.ts';
import { SecondOpinion } from '#api/entities/second-opinion.ts';

export const opinionSubject = (estimate: string): string => `opinions:${estimate}`;

/** The second opinions on an estimate, or how far they are. `estimate` null: there is none. */
export const presentOpinions = async (em: EntityManager, estimate: string | null, method: string): Promise<Opinions> => {
  const row = estimate === null ? null : await em.findOne(SecondOpinion, { estimateId: estimate });
  const base = { method, fraction: 0, reason: null, officialSeconds: null, madeAt: null, opinions: [] };
  if (!row || estimate === null) return { ...base, state: 'none' };
  if (row.state === 'failed') return { ...base, state: 'failed', reason: row.reason ?? null };
  if (row.state === 'done') return { ...base, state: 'done', fraction: 1, officialSeconds: row.officialSeconds ?? null, madeAt: row.madeAt?.toISOString() ?? null, opinions: row.opinions ?? [] };
  const run = await em.findOne(JobRun, { subject: opinionSubject(estimate), finishedAt: null }, { orderBy: { startedAt: 'desc' } });
  return run ? { ...base, state: 'computing', fraction: run.fraction } : { ...base, state: 'waiting' };
};
