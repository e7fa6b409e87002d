import { Readable } from 'node:stream';
import type { EntityManager } from '@mikro-orm/postgresql';
import { runSql } from '#api/lib/run-sql.ts';

/** Tables that hold bytes, the column, and how a row is named. Nothing outside this list can be read here. */
const places = {
  dataset: { from: 'submission_file', column: 'bytes', where: 'id = $1' },
  sheet: { from: 'run_sheet_file', column: 'bytes', where: 'run_sheet_id = $1' },
  result: { from: 'submission_estimate', column: 'result', where: 'id = $1' },
  entry: { from: 'entry_bytes', column: 'bytes', where: 'accession = $1 and version = $2 and kind = $3' },
  'added-result': { from: 'entry_result', column: 'result', where: 'entry_version_id = $1 and method = $2' },
  'added-replicates': { from: 'entry_result', column: 'replicates', where: 'entry_version_id = $1 and method = $2' },
} as const;
type Place = keyof typeof places;

const pieceBytes = 1 << 20;

async function* pieces(em: EntityManager, place: Place, key: readonly (string | number)[]): AsyncGenerator<Buffer> {
  const { from, column, where } = places[place];
  for (let start = 1; ; start += pieceBytes) {
    const [row] = await runSql<{ piece: Buffer }>(em, `select substring(${column} from ${start} for ${pieceBytes}) as piece from ${from} where ${where}`, key);
    if (!row || row.piece.length === 0) return;
    yield row.piece;
    if (row.piece.length < pieceBytes) return;
  }
}

/** Stored bytes as a stream in pieces of 1 MiB, so that a large file never stands whole in the web process. Rows are immutable: pieces agree. */
export const streamBytes = (em: EntityManager, place: Place, ...key: (string | number)[]): Readable => Readable.from(pieces(em, place, key), { objectMode: false });

/** Stored bytes whole, for the worker; null where there is no such row. */
export const readBytes = async (em: EntityManager, place: Place, ...key: (string | number)[]): Promise<Buffer | null> => {
  const { from, column, where } = places[place];
  const [row] = await runSql<{ bytes: Buffer }>(em, `select ${column} as bytes from ${from} where ${where}`, key);
  return row?.bytes ?? null;
};
