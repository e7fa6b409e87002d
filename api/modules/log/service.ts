import type { EntityManager } from '@mikro-orm/postgresql';
import { logLeaf, type LogConsistency, type LogGrowth, type LogHead, type LogLeaf, type LogLeafItem, type LogProof } from '#shared/contracts/log.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { consistencySpans, inclusionSpans } from '#shared/merkle/tree.ts';
import { pageFrom, readCursor } from '#api/lib/cursor.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { requireVersion } from '#api/modules/entries/load.ts';
import { hashesOf } from './nodes.ts';

/** A head as it is stored. */
export interface HeadRow {
  tree_size: number;
  root_hash: string;
  at: string;
  signature: string;
  key_id: string;
  public_key: string;
}

interface LeafRow {
  index: number;
  hash: string;
  data: Buffer;
}

const presentHead = (row: HeadRow): LogHead => ({ treeSize: row.tree_size, rootHash: row.root_hash, at: new Date(row.at).toISOString(), signature: row.signature, keyId: row.key_id, publicKey: row.public_key });
const readLeaf = (row: LeafRow): LogLeaf => logLeaf.parse(JSON.parse(row.data.toString('utf8')));

const findHead = async (em: EntityManager, size: number | null): Promise<LogHead | null> => {
  const [row] = await runSql<HeadRow>(em, `select * from log_head ${size === null ? 'order by tree_size desc limit 1' : 'where tree_size = $1'}`, size === null ? [] : [size]);
  return row ? presentHead(row) : null;
};

/** The newest signed head, or the one over so many leaves. */
export const readHead = async (em: EntityManager, size: number | null): Promise<LogHead> => {
  const head = await findHead(em, size);
  if (!head) throw new AppError('not-found', size === null ? 'The log has no leaf yet, so it has no head.' : `The log has no head over ${size} leaves.`);
  return head;
};

/** The proof that an event of a version is in the log, against the newest head. It stays when the entry is withdrawn. */
export const readProof = async (em: EntityManager, accession: string, version: number, event: LogLeaf['event']): Promise<LogProof> => {
  await requireVersion(em, accession, version);
  const [row] = await runSql<LeafRow>(em, 'select index, hash, data from log_leaf where accession = $1 and version = $2 and event = $3', [accession, version, event]);
  if (!row) throw new AppError('not-found', `${versionedAccessionOf(accession, version)} was not ${event}; the log has no such leaf.`);
  const head = await readHead(em, null);
  const path = await hashesOf(em, inclusionSpans(row.index, head.treeSize));
  return { leaf: readLeaf(row), leafIndex: row.index, treeSize: head.treeSize, rootHash: head.rootHash, path, head };
};

/** What shows that the tree of `second` leaves begins with that of `first`. */
export const readConsistency = async (em: EntityManager, first: number, second: number): Promise<LogConsistency> => {
  const size = (await findHead(em, null))?.treeSize ?? 0;
  if (first > second) throw new AppError('invalid-request', `In the query, first: ${first} is more than second, ${second}.`);
  if (second > size) throw new AppError('invalid-request', `In the query, second: the log has ${size} leaves, not ${second}.`);
  return { first, second, path: await hashesOf(em, consistencySpans(first, second)) };
};

/** Leaves with their hashes, from one end of the log. */
export const listLeaves = async (em: EntityManager, order: 'oldest' | 'newest', limit: number, cursor: string | undefined): Promise<{ items: LogLeafItem[]; nextCursor: string | null }> => {
  const place = Number(readCursor(cursor, 1)?.[0] ?? (order === 'oldest' ? -1 : 2_147_483_647));
  if (!Number.isInteger(place)) throw new AppError('invalid-request', 'In the query, cursor: it is not a cursor of this list.');
  const rows = await runSql<LeafRow>(em, order === 'oldest' ? 'select index, hash, data from log_leaf where index > $1 order by index limit $2' : 'select index, hash, data from log_leaf where index < $1 order by index desc limit $2', [place, limit + 1]);
  return pageFrom(rows, limit, (row) => [String(row.index)], (row) => ({ index: row.index, hash: row.hash, leaf: readLeaf(row) }));
};

/** Leaves of each month with any, and the size of the log at its end. */
export const readGrowth = async (em: EntityManager): Promise<LogGrowth> => ({
  months: await runSql<LogGrowth['months'][number]>(em, `
    select month, leaves, (sum(leaves) over (order by month))::int as size
      from (select to_char(at at time zone 'UTC', 'YYYY-MM') as month, count(*)::int as leaves from log_leaf group by 1) m order by month`),
});
