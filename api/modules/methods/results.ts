import type { EntityManager } from '@mikro-orm/postgresql';
import type { VersionResult } from '#shared/contracts/methods.ts';
import { headlineOf } from '#shared/domain/board-figures.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { findMethod } from '#shared/method/versions.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { bytes, type BytesReply } from '#api/lib/reply.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { requireVersion } from '#api/modules/entries/load.ts';
import { readStored } from '#api/modules/entries/service.ts';
import { streamBytes } from '#api/modules/submissions/file-store.ts';
import type { ResultSummary } from '#api/modules/submissions/result-summary.ts';

interface Row {
  method: string;
  made_at: string;
  replicates: number;
  summary: ResultSummary;
  result_sha256: string;
  replicates_sha256: string;
}

const present = (row: Row, api: string, frozen: boolean, open: boolean, qubits: number): VersionResult => ({
  method: row.method, status: findMethod(row.method)?.status ?? 'official', frozen, madeAt: new Date(row.made_at).toISOString(), replicates: row.replicates,
  headline: headlineOf(row.summary.figures, qubits), settled: row.summary.patches.every((p) => p.settled), resultSha256: row.result_sha256, replicatesSha256: row.replicates_sha256,
  links: { result: `${api}/${row.method}`, replicates: open ? `${api}/${row.method}/replicates` : null },
});

/** Every result of a public version: the frozen one first, then those added beside it. */
export const listResults = async (em: EntityManager, accession: string, version: number): Promise<VersionResult[]> => {
  const found = await requireVersion(em, accession, version);
  const entry = await em.findOneOrFail(EntryVersion, { id: found.id }, { exclude: ['review', 'sealedPoints'] });
  const added = await runSql<Row>(em, 'select method, made_at, replicate_count as replicates, summary, result_sha256, replicates_sha256 from entry_result where entry_version_id = $1 order by length(method), method', [found.id]);
  const own: Row = { method: entry.method, made_at: found.frozenAt.toISOString(), replicates: entry.replicates, summary: entry.summary, result_sha256: entry.resultSha256, replicates_sha256: entry.replicatesSha256 };
  const api = `/api/v1/entries/${accession}/v/${version}/results`;
  const open = found.state !== 'withdrawn';
  return [present(own, api, true, open, entry.register.length), ...added.map((row) => present(row, api, false, open, entry.register.length))];
};

const columns = { result: { type: 'application/json', extension: 'result.json' }, replicates: { type: 'application/octet-stream', extension: 'replicates.f64' } } as const;

/** Stored bytes of one result. By the version's own method these are the frozen bytes. */
export const readResult = async (em: EntityManager, accession: string, version: number, method: string, kind: keyof typeof columns, ifNoneMatch: string | undefined): Promise<BytesReply> => {
  const found = await requireVersion(em, accession, version);
  const name = versionedAccessionOf(accession, version);
  const entry = await em.findOneOrFail(EntryVersion, { id: found.id }, { fields: ['method'] });
  if (entry.method === method) return readStored(em, accession, version, kind, ifNoneMatch);
  if (found.state === 'withdrawn' && kind === 'replicates') throw new AppError('withdrawn', `${name} was withdrawn; its replicates are no longer handed out. The page tells the reason.`);
  const [row] = await runSql<{ sha256: string; size: number }>(em, `select ${kind}_sha256 as sha256, length(${kind}) as size from entry_result where entry_version_id = $1 and method = $2`, [found.id, method]);
  if (!row) throw new AppError('not-found', `${name} has no result by method version ${JSON.stringify(method)}.`);
  const { type, extension } = columns[kind];
  const etag = `"${row.sha256}"`;
  const headers = { etag, 'cache-control': 'public, max-age=0, must-revalidate' };
  if (ifNoneMatch?.split(',').some((tag) => tag.trim().replace(/^W\//, '') === etag || tag.trim() === '*')) return bytes('', type, { status: 304, headers });
  return bytes(streamBytes(em, kind === 'result' ? 'added-result' : 'added-replicates', found.id, method), type, {
    headers: { ...headers, 'content-length': String(row.size), 'content-disposition': `attachment; filename="${name}.${method}.${extension}"`, 'x-content-type-options': 'nosniff' },
  });
};
