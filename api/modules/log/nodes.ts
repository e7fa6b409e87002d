import type { EntityManager } from '@mikro-orm/postgresql';
import { fullNodesOf, hashOfSpan, type FullNode, type ReadNode, type Span } from '#shared/merkle/tree.ts';
import type { Hash } from '#shared/merkle/hash.ts';
import { runSql } from '#api/lib/run-sql.ts';

export const toHex = (hash: Hash): string => Buffer.from(hash).toString('hex');
const fromHex = (text: string): Hash => new Uint8Array(Buffer.from(text, 'hex'));
const keyOf = ({ level, index }: FullNode): string => `${level}/${index}`;

/** Fetches stored subtrees at once and gives them by their place. */
export const loadNodes = async (em: EntityManager, nodes: readonly FullNode[]): Promise<ReadNode> => {
  const rows = await runSql<{ level: number; index: number; hash: string }>(
    em,
    'select n.level, n.index, n.hash from log_node n join unnest($1::int[], $2::int[]) as asked (level, index) using (level, index)',
    [nodes.map((n) => String(n.level)), nodes.map((n) => String(n.index))],
  );
  const found = new Map(rows.map((row) => [keyOf(row), fromHex(row.hash)]));
  return (node) => {
    const hash = found.get(keyOf(node));
    if (!hash) throw new Error(`The log has no node ${keyOf(node)}.`);
    return hash;
  };
};

/** The hashes over some spans of the tree, as hex. */
export const hashesOf = async (em: EntityManager, spans: readonly Span[]): Promise<string[]> => {
  const read = await loadNodes(em, spans.flatMap(fullNodesOf));
  return spans.map((span) => toHex(hashOfSpan(span, read)));
};
