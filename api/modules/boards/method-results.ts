import type { EntityManager } from '@mikro-orm/postgresql';
import type { Board } from '#shared/contracts/boards.ts';
import { findMethod, methodVersions, officialMethod } from '#shared/method/versions.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { EntryVersion } from '#api/entities/entry-version.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { ResultSummary } from '#api/modules/submissions/result-summary.ts';

/** The version that a board is read by: the official one unless another of this build is asked for. */
export const boardMethod = (asked: string | undefined): string => {
  if (asked === undefined) return officialMethod.id;
  if (!findMethod(asked)) throw new AppError('invalid-request', `In the query, method: this registry has no method version ${JSON.stringify(asked)}; it has ${methodVersions.map((v) => v.id).join(', ')}.`);
  return asked;
};

/** Nothing is ranked by a draft: its figures are shown to see what it would change. */
export const isDraft = (method: string): boolean => findMethod(method)?.status === 'draft';

interface Read {
  id: string;
  row: Pick<EntryVersion, 'method' | 'summary' | 'replicates'>;
}

/** Reads candidates by one method version: frozen with it, or from the result added by a campaign. `missing`: ids of those that have neither. */
export const readBy = async <C extends Read>(em: EntityManager, candidates: readonly C[], method: string): Promise<{ read: C[]; missing: ReadonlySet<string> }> => {
  const others = candidates.filter(({ row }) => row.method !== method).map(({ id }) => id);
  const added = others.length === 0 ? [] : await runSql<{ id: string; summary: ResultSummary; replicates: number }>(em, 'select entry_version_id as id, summary, replicate_count as replicates from entry_result where method = $2 and entry_version_id = any($1::uuid[])', [others, method]);
  const byId = new Map(added.map((result) => [result.id, result]));
  const read = candidates.map((candidate) => {
    const result = byId.get(candidate.id);
    return result ? { ...candidate, row: { ...candidate.row, method, summary: result.summary, replicates: result.replicates } } : candidate;
  });
  return { read, missing: new Set(others.filter((id) => !byId.has(id))) };
};

/** The versions that a board may be read by: the official one, and any other that entries of it have a result by. */
export const boardMethods = async (em: EntityManager, candidates: readonly { id: string; row: { method: string } }[]): Promise<Board['methods']> => {
  const added = await runSql<{ method: string; n: string }>(em, 'select method, count(*) as n from entry_result where entry_version_id = any($1::uuid[]) group by method', [candidates.map((c) => c.id)]);
  const results = new Map(added.map(({ method, n }) => [method, Number(n)]));
  for (const { row } of candidates) results.set(row.method, (results.get(row.method) ?? 0) + 1);
  return methodVersions.filter(({ id }) => id === officialMethod.id || results.has(id)).map(({ id, status }) => ({ id, status, results: results.get(id) ?? 0 }));
};

export const notEstimated = (method: string): { code: 'no-result'; sentence: string; remedy: string } => ({
  code: 'no-result', sentence: `It was not estimated with method version ${method}.`, remedy: 'A campaign under this version, or another version of the method.',
});
