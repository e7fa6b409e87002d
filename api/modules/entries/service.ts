import type { EntityManager } from '@mikro-orm/postgresql';
import type { Entry } from '#shared/contracts/entries.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { isSame } from '#api/lib/etag.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { bytes, type BytesReply } from '#api/lib/reply.ts';
import { reasonsAgainst, type Candidate } from '#api/modules/boards/standing.ts';
import { streamBytes } from '#api/modules/submissions/file-store.ts';
import { requireVersion, requireVersions, withRows, type FrozenVersion } from './load.ts';
import { pageReading, presentEntry } from './presenter.ts';
import { versionsWith, type PublicVersion } from './public-entries.ts';

const candidate = (v: FrozenVersion): Candidate => ({ ...v, row: { ...v.row, device: { id: v.row.device.id } } });

/** Reason, day and the two curators of a withdrawal. */
const withdrawalOf = async (em: EntityManager, { accession, version }: PublicVersion): Promise<Entry['withdrawal']> => {
  const [row] = await runSql<{ reason: string; at: string; asked: string; confirmed: string }>(
    em,
    `select w.reason, a.answered_at as at, asker.name as asked, answerer.name as confirmed
       from withdrawal w join withdrawal_answer a on a.withdrawal_id = w.id join app_user asker on asker.id = w.asked_by_id join app_user answerer on answerer.id = a.answered_by_id
      where w.accession = $1 and w.version = $2 and a.answer = 'confirmed'`,
    [accession, version],
  );
  return row ? { reason: row.reason, at: new Date(row.at).toISOString(), decidedBy: [row.asked, row.confirmed] } : null;
};

/** The page of one version, or of the latest where none is named. */
export const readEntry = async (em: EntityManager, accession: string, version: number | null): Promise<Entry> => {
  const versions = await requireVersions(em, accession);
  const wanted = version === null ? versions[0] : await requireVersion(em, accession, version);
  const rows = await withRows(em, versions);
  const shown = rows.find((v) => v.version === wanted.version);
  if (!shown) throw new Error(`${accession}.${wanted.version} has a state but no row.`);
  const ofDevice = (await versionsWith(em, 'device_id', shown.row.device.id)).filter((v) => v.accession !== accession);
  const rivals = (await withRows(em, ofDevice)).filter((v) => v.row.gateClass === shown.row.gateClass);
  const reasons = reasonsAgainst(candidate(shown), [...rows, ...rivals].map(candidate), pageReading);
  return presentEntry(shown, rows, reasons, shown.state === 'withdrawn' ? await withdrawalOf(em, shown) : null);
};

export type StoredKind = 'dataset' | 'result' | 'replicates' | 'seal' | 'run-sheet';

const forms: Readonly<Record<StoredKind, { type: string; extension: string }>> = {
  dataset: { type: 'application/json', extension: 'dataset.json' },
  result: { type: 'application/json', extension: 'result.json' },
  replicates: { type: 'application/octet-stream', extension: 'replicates.f64' },
  seal: { type: 'application/json', extension: 'seal.json' },
  'run-sheet': { type: 'application/json', extension: 'run-sheet.json' },
};

/** What is no longer handed out once an entry is withdrawn. */
const closedByWithdrawal: ReadonlySet<StoredKind> = new Set(['dataset', 'replicates']);

/** A file name as a header takes it: RFC 6266 with an ASCII stand-in. */
const disposition = (name: string): string => `attachment; filename="${name.replace(/[^\x20-\x7e]|["\\%]/g, '_')}"; filename*=UTF-8''${encodeURIComponent(name).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`)}`;

const nameFor = async (em: EntityManager, version: PublicVersion, kind: StoredKind): Promise<string> => {
  const usual = `${versionedAccessionOf(version.accession, version.version)}.${forms[kind].extension}`;
  if (kind !== 'dataset') return usual;
  const [row] = await runSql<{ file_name: string }>(em, 'select file_name from entry_version where id = $1', [version.id]);
  return row?.file_name ?? usual;
};

const sizes = {
  entry: 'select sha256, length(bytes) as size from entry_bytes where accession = $1 and version = $2 and kind = $3',
  sheet: 'select sha256, length(bytes) as size from run_sheet_file where run_sheet_id = $1',
} as const;

/** Where the bytes lie: with the entry, or, for the sheet, where they were drawn; null for an entry without a sheet. */
const placeOf = async (em: EntityManager, { id, accession, version }: PublicVersion, kind: StoredKind): Promise<{ table: keyof typeof sizes; key: (string | number)[] } | null> => {
  if (kind !== 'run-sheet') return { table: 'entry', key: [accession, version, kind] };
  const [row] = await runSql<{ run_sheet_id: string | null }>(em, 'select run_sheet_id from entry_version where id = $1', [id]);
  return row?.run_sheet_id ? { table: 'sheet', key: [row.run_sheet_id] } : null;
};

/** Stored bytes of a version, exactly as they were frozen; the strong ETag is their SHA-256. */
export const readStored = async (em: EntityManager, accession: string, number: number, kind: StoredKind, ifNoneMatch: string | undefined): Promise<BytesReply> => {
  const version = await requireVersion(em, accession, number);
  if (version.state === 'withdrawn' && closedByWithdrawal.has(kind)) throw new AppError('withdrawn', `${versionedAccessionOf(accession, number)} was withdrawn; its ${kind} is no longer handed out. The page tells the reason.`);
  const place = await placeOf(em, version, kind);
  const [row] = place ? await runSql<{ sha256: string; size: number }>(em, sizes[place.table], place.key) : [];
  if (!place || !row) throw new AppError('not-found', `${versionedAccessionOf(accession, number)} has no ${kind}: its circuits came from no run sheet.`);
  const etag = `"${row.sha256}"`;
  const headers = { etag, 'cache-control': 'public, max-age=0, must-revalidate' };
  if (isSame(etag, ifNoneMatch)) return bytes('', forms[kind].type, { status: 304, headers });
  return bytes(streamBytes(em, place.table, ...place.key), forms[kind].type, {
    headers: { ...headers, 'content-length': String(row.size), 'content-disposition': disposition(await nameFor(em, version, kind)), 'x-content-type-options': 'nosniff' },
  });
};
