import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import { runSql, type SqlValue } from '#api/lib/run-sql.ts';
import type { Work } from '#api/lib/work.ts';
import type { Inspected } from './inspection.ts';

/** What one statement carries. Handing 64 MiB to the driver at once would hold up every other request for a second. */
const pieceBytes = 1 << 20;

const columns = 'id, submission_id, round, name, size, content_id, bytes_sha256, summary, received_at, bytes';

/** Lays the file out in pieces in a table of this transaction, and has the database join them. */
const insertJoined = async (em: EntityManager, values: readonly SqlValue[], bytes: Uint8Array): Promise<void> => {
  await runSql(em, 'create temporary table if not exists file_piece (n int not null, bytes bytea not null) on commit drop');
  await runSql(em, 'delete from file_piece');
  for (let n = 0; n * pieceBytes < bytes.length; n += 1) await runSql(em, 'insert into file_piece (n, bytes) values ($1, $2)', [n, bytes.subarray(n * pieceBytes, (n + 1) * pieceBytes)]);
  await runSql(em, `insert into submission_file (${columns}) select $1, $2, $3, $4, $5, $6, $7, $8, $9, string_agg(bytes, ''::bytea order by n) from file_piece`, values);
};

/** Keeps a file that has been inspected, in the caller's transaction. Returns its id. */
export const storeFile = async ({ em, clock }: Work, submission: string, round: number, file: { bytes: Uint8Array; name: string }, seen: Inspected): Promise<string> => {
  const id = randomUUID();
  const values = [id, submission, round, file.name, file.bytes.byteLength, seen.contentId, seen.bytesSha256, JSON.stringify(seen.summary), clock.now()];
  if (file.bytes.length <= pieceBytes) await runSql(em, `insert into submission_file (${columns}) values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)`, [...values, file.bytes]);
  else await insertJoined(em, values, file.bytes);
  return id;
};
