import { canonicalJson } from '#shared/formats/canonical-json.ts';
import { leafHash, type Hash } from '#shared/merkle/hash.ts';
import { hashOfSpan, nodesAdded, type FullNode } from '#shared/merkle/tree.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import type { LogLeaf } from '#shared/contracts/log.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { toHex } from '#api/modules/log/nodes.ts';
import { isSignedBy } from '#api/modules/log/record-signature.ts';
import type { HeadRow } from '#api/modules/log/service.ts';
import type { Finding, ScrubCheck } from './finding.ts';

interface LeafRow {
  index: number;
  event: string;
  accession: string;
  version: number;
  data: Buffer;
  hash: string;
  frozen: Pick<LogLeaf, 'contentId' | 'bytesSha256' | 'resultSha256' | 'replicatesSha256' | 'method'> | null;
}

const keyOf = ({ level, index }: FullNode): string => `${level}/${index}`;
const textOf = (row: LeafRow): string => row.data.toString('utf8');

const saysOtherwise = (row: LeafRow): boolean => {
  let leaf: Partial<LogLeaf>;
  try {
    leaf = JSON.parse(textOf(row)) as Partial<LogLeaf>;
  } catch {
    return true;
  }
  const stored = { event: row.event, accession: row.accession, version: row.version, ...row.frozen, at: leaf.at };
  return canonicalJson(stored) !== textOf(row);
};

/** Every leaf against the version it tells of, every stored subtree and every head against the leaves. */
export const checkLogTree: ScrubCheck = async ({ em, trustedKeys }) => {
  const findings: Finding[] = [];
  const leaves = await runSql<LeafRow>(em, `
    select l.*, case when v.id is null then null else jsonb_build_object('contentId', v.content_id, 'bytesSha256', v.bytes_sha256, 'resultSha256', v.result_sha256, 'replicatesSha256', v.replicates_sha256, 'method', v.method) end as frozen
      from log_leaf l left join entry_version v using (accession, version) order by l.index`);
  const nodes = new Map<string, Hash>();
  const read = (node: FullNode): Hash => nodes.get(keyOf(node))!;
  leaves.forEach((row, place) => {
    const where = `leaf ${row.index}`;
    const hash = leafHash(new Uint8Array(row.data));
    if (row.index !== place) findings.push({ where, sentence: `It stands at place ${place}: a leaf before it is missing.` });
    if (toHex(hash) !== row.hash) findings.push({ where, sentence: 'Its data do not have its hash.' });
    if (saysOtherwise(row)) findings.push({ where, sentence: `It says otherwise than ${versionedAccessionOf(row.accession, row.version)} does.` });
    for (const node of nodesAdded(place, hash, read)) nodes.set(keyOf(node), node.hash);
  });
  const stored = await runSql<FullNode & { hash: string }>(em, 'select level, index, hash from log_node');
  const wrong = stored.filter((node) => !nodes.has(keyOf(node)) || toHex(read(node)) !== node.hash).length;
  if (wrong > 0 || stored.length !== nodes.size) findings.push({ where: 'the log', sentence: `${wrong} of its ${stored.length} stored subtrees are not those of its leaves, which make ${nodes.size}.` });
  const [counter] = await runSql<{ size: number }>(em, 'select size from log_size');
  if (counter?.size !== leaves.length) findings.push({ where: 'the log', sentence: `It counts ${String(counter?.size)} leaves and has ${leaves.length}.` });
  const heads = await runSql<HeadRow>(em, 'select * from log_head order by tree_size');
  if (heads.length !== leaves.length) findings.push({ where: 'the log', sentence: `It has ${heads.length} heads for ${leaves.length} leaves.` });
  for (const row of heads) {
    const where = `the head over ${row.tree_size} leaves`;
    const root = row.tree_size > leaves.length ? null : toHex(hashOfSpan({ from: 0, to: row.tree_size }, read));
    const signed = new TextEncoder().encode(canonicalJson({ treeSize: row.tree_size, rootHash: row.root_hash, at: new Date(row.at).toISOString() }));
    if (root !== row.root_hash) findings.push({ where, sentence: `Its root is ${row.root_hash}; the leaves give ${root ?? 'none'}.` });
    if (!trustedKeys.includes(row.key_id)) findings.push({ where, sentence: `It is signed with a key that is not the registry's, ${row.key_id}.` });
    else if (!isSignedBy(row.public_key, signed, row.signature)) findings.push({ where, sentence: 'Its signature is not over what it says.' });
  }
  return { looked: leaves.length + stored.length + heads.length, findings };
};
