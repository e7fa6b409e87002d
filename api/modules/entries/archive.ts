import { Readable } from 'node:stream';
import type { EntityManager } from '@mikro-orm/postgresql';
import { Zip, ZipPassThrough } from 'fflate';
import { crateFileName, roCrateText } from '#shared/crate/ro-crate.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import type { EntryVersion } from '#api/entities/entry-version.ts';
import { isSame } from '#api/lib/etag.ts';
import { bytes, type BytesReply } from '#api/lib/reply.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { readCited } from '#api/modules/citations/record.ts';
import { streamBytes } from '#api/modules/submissions/file-store.ts';
import { requireVersion, withRows } from './load.ts';

interface Member {
  name: string;
  sha256: string;
  size: number;
  pieces: () => AsyncIterable<Uint8Array> | Iterable<Uint8Array>;
}

/** The zip format keeps times to two seconds and without a zone; one fixed time lets the same entry give the same bytes for ever. */
const noTime = new Date(1980, 0, 1);

/** What never changes of a version; its state does, and stands on its page. */
const factsOf = (row: EntryVersion, frozenAt: Date): string => {
  const { accession, version, title, gateClass, register, method, replicates, runSheetId, contentId, bytesSha256, resultSha256, replicatesSha256, fileName, dataset, demo } = row;
  return canonicalJson({
    format: 'evenbeam.entry', formatVersion: '1.0.0', accession, version, title, gateClass, register, method, replicates, runSheet: runSheetId ?? null, contentId, bytesSha256, resultSha256, replicatesSha256,
    device: dataset.device, contributors: dataset.contributors,
    startedAt: dataset.startedAt, endedAt: dataset.endedAt, licence: dataset.licence, fileName, frozenAt: frozenAt.toISOString(), demo,
  });
};

const text = (name: string, content: string): Member => {
  const encoded = new TextEncoder().encode(content);
  return { name, sha256: sha256Hex(encoded), size: encoded.length, pieces: () => [encoded] };
};

/** Files in their fixed order; the list of digests comes last and names all before it. */
const membersOf = async (em: EntityManager, row: EntryVersion, frozenAt: Date, registry: string): Promise<Member[]> => {
  const { accession, version } = row;
  const rows = await runSql<{ kind: string; sha256: string; size: number }>(em, 'select kind, sha256, length(bytes) as size from entry_bytes where accession = $1 and version = $2', [accession, version]);
  const digests = new Map(rows.map(({ kind, sha256, size }) => [kind, { sha256, size }]));
  const [sheet] = row.runSheetId ? await runSql<{ sha256: string; size: number }>(em, 'select sha256, length(bytes) as size from run_sheet_file where run_sheet_id = $1', [row.runSheetId]) : [];
  const stored = (kind: string, name: string): Member[] => {
    const found = digests.get(kind);
    return found === undefined ? [] : [{ name, ...found, pieces: () => streamBytes(em, 'entry', accession, version, kind) }];
  };
  const data = [
    text('entry.json', factsOf(row, frozenAt)), ...stored('dataset', 'dataset.json'),
    ...(sheet ? [{ name: 'run-sheet.json', ...sheet, pieces: () => streamBytes(em, 'sheet', row.runSheetId ?? '') }] : []),
    ...stored('seal', 'seal.json'), ...stored('result', 'result.json'), ...stored('replicates', 'replicates.f64'),
  ];
  const { record } = await readCited(em, accession, version, registry);
  const members = [...data, text(crateFileName, roCrateText(record, data))];
  return [...members, text('sha256sums.txt', members.map(({ name, sha256 }) => `${sha256}  ${name}\n`).join(''))];
};

/** The zip, piece by piece and uncompressed: the bytes depend on no compressor, and a large entry never stands whole in memory. */
async function* zipped(members: readonly Member[]): AsyncGenerator<Uint8Array> {
  const ready: Uint8Array[] = [];
  const zip = new Zip((fault, chunk) => {
    if (fault) throw fault;
    ready.push(chunk);
  });
  for (const { name, pieces } of members) {
    const file = new ZipPassThrough(name);
    file.mtime = noTime;
    zip.add(file);
    for await (const piece of pieces()) {
      file.push(piece);
      yield* ready.splice(0);
    }
    file.push(new Uint8Array(0), true);
  }
  zip.end();
  yield* ready.splice(0);
}

/** One version with everything that is needed to check it, as one file; the same version always gives the same bytes. */
export const readArchive = async (em: EntityManager, accession: string, number: number, ifNoneMatch: string | undefined, registry: string): Promise<BytesReply> => {
  const version = await requireVersion(em, accession, number);
  const name = versionedAccessionOf(accession, number);
  if (version.state === 'withdrawn') throw new AppError('withdrawn', `${name} was withdrawn; its archive is no longer handed out. The page tells the reason.`);
  const [found] = await withRows(em, [version]);
  if (!found) throw new Error(`${name} has a state but no row.`);
  const members = await membersOf(em, found.row, version.frozenAt, registry);
  const etag = `"${sha256Hex(new TextEncoder().encode(members.map(({ sha256 }) => sha256).join()))}"`;
  const headers = { etag, 'cache-control': 'public, max-age=0, must-revalidate' };
  if (isSame(etag, ifNoneMatch)) return bytes('', 'application/zip', { status: 304, headers });
  return bytes(Readable.from(zipped(members), { objectMode: false }), 'application/zip', { headers: { ...headers, 'content-disposition': `attachment; filename="${name}.zip"`, 'x-content-type-options': 'nosniff' } });
};
