import { canonicalJson } from '#shared/formats/canonical-json.ts';
import type { LogLeaf } from '#shared/contracts/log.ts';
import { leafHash, type Hash } from '#shared/merkle/hash.ts';
import { fullNodesOf, hashOfSpan, nodesAdded, type FullNode, type HashedNode } from '#shared/merkle/tree.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Work } from '#api/lib/work.ts';
import { loadNodes, toHex } from './nodes.ts';

const bytesOf = (value: unknown): Uint8Array => new TextEncoder().encode(canonicalJson(value));

/** The subtrees to the left that a leaf at `index` completes, and those that make up the tree with it. */
const neighbours = (index: number): FullNode[] => fullNodesOf({ from: 0, to: index });

const storeLeaf = async (work: Work, index: number, leaf: LogLeaf, data: Uint8Array, hash: Hash): Promise<void> => {
  await runSql(work.em, 'insert into log_leaf (index, event, accession, version, data, hash, at) values ($1, $2, $3, $4, $5, $6, $7)', [index, leaf.event, leaf.accession, leaf.version, data, toHex(hash), new Date(leaf.at)]);
};

const storeNodes = async (work: Work, nodes: readonly HashedNode[]): Promise<void> => {
  for (const { level, index, hash } of nodes) await runSql(work.em, 'insert into log_node (level, index, hash) values ($1, $2, $3)', [level, index, toHex(hash)]);
};

const signHead = async (work: Work, treeSize: number, root: Hash, at: string): Promise<void> => {
  const head = { treeSize, rootHash: toHex(root), at };
  await runSql(work.em, 'insert into log_head (tree_size, root_hash, at, signature, key_id, public_key) values ($1, $2, $3, $4, $5, $6)', [treeSize, head.rootHash, new Date(at), work.logKey.sign(bytesOf(head)), work.logKey.keyId, work.logKey.publicKey]);
};

/**
 * Adds the leaf of an event to the log, with the subtrees it completes and a signed head, in the caller's transaction. The
 * size's row is held to its end: leaves follow one another, and a rolled-back one leaves no gap. Cost: log₂ of the size.
 */
export const logEvent = async (work: Work, event: LogLeaf['event'], { accession, version }: { accession: string; version: number }): Promise<void> => {
  const [counter] = await runSql<{ size: number }>(work.em, 'select size from log_size for update');
  if (!counter) throw new Error('The size of the log has no row.');
  const { size } = counter;
  const row = await work.em.findOneOrFail(EntryVersion, { accession, version }, { fields: ['contentId', 'bytesSha256', 'resultSha256', 'replicatesSha256', 'method'] });
  const at = work.clock.now().toISOString();
  const leaf: LogLeaf = { event, accession, version, contentId: row.contentId, bytesSha256: row.bytesSha256, resultSha256: row.resultSha256, replicatesSha256: row.replicatesSha256, method: row.method, at };
  const data = bytesOf(leaf);
  const hash = leafHash(data);
  const known = await loadNodes(work.em, neighbours(size));
  const added = nodesAdded(size, hash, known);
  await storeLeaf(work, size, leaf, data, hash);
  await storeNodes(work, added);
  await runSql(work.em, 'update log_size set size = size + 1');
  const fresh = new Map(added.map((node) => [`${node.level}/${node.index}`, node.hash]));
  const root = hashOfSpan({ from: 0, to: size + 1 }, (node) => fresh.get(`${node.level}/${node.index}`) ?? known(node));
  await signHead(work, size + 1, root, at);
};
