import { emptyRoot, nodeHash, type Hash } from '#shared/merkle/hash.ts';

/** Leaves from … to − 1. */
export interface Span {
  from: number;
  to: number;
}

/** A full subtree: leaves index·2^level … (index + 1)·2^level − 1. Its hash never changes once its leaves are there. */
export interface FullNode {
  level: number;
  index: number;
}

export interface HashedNode extends FullNode {
  hash: Hash;
}

export type ReadNode = (node: FullNode) => Hash;

/** Greatest power of two below n; n from 2 on. */
const splitOf = (n: number): number => {
  let k = 1;
  while (2 * k < n) k *= 2;
  return k;
};

/**
 * The full subtrees that a span of a tree's own division is made of, from the left: at most log₂ of its length.
 * @throws RangeError where the span does not begin where its greatest subtree may
 */
export function fullNodesOf({ from, to }: Span): FullNode[] {
  const nodes: FullNode[] = [];
  let at = from;
  while (at < to) {
    let level = 0;
    let size = 1;
    while (2 * size <= to - at) {
      size *= 2;
      level += 1;
    }
    if (at % size !== 0) throw new RangeError(`leaves ${from} to ${to} are no part of a tree's own division`);
    nodes.push({ level, index: at / size });
    at += size;
  }
  return nodes;
}

/** Hash of the tree over a span, from the hashes of its full subtrees. Source: RFC 9162, section 2.1.1. */
export function hashOfSpan(span: Span, read: ReadNode): Hash {
  const hashes = fullNodesOf(span).map(read);
  const last = hashes.pop();
  return last === undefined ? emptyRoot() : hashes.reduceRight((right, left) => nodeHash(left, right), last);
}

/** What is stored when a leaf is added to a tree of `size` leaves: the leaf, and each subtree that it completes. Reads one node a level at most. */
export function nodesAdded(size: number, leaf: Hash, read: ReadNode): HashedNode[] {
  const added: HashedNode[] = [{ level: 0, index: size, hash: leaf }];
  let { hash } = added[0]!;
  for (let level = 0, index = size; index % 2 === 1; level += 1, index = (index - 1) / 2) {
    hash = nodeHash(read({ level, index: index - 1 }), hash);
    added.push({ level: level + 1, index: (index - 1) / 2, hash });
  }
  return added;
}

/** The siblings on the way from leaf `index` up to the root of `size` leaves, the lowest first. Source: RFC 9162, section 2.1.3.1. */
export function inclusionSpans(index: number, size: number): Span[] {
  if (!Number.isSafeInteger(index) || !Number.isSafeInteger(size) || index < 0 || index >= size) throw new RangeError(`there is no leaf ${index} in a tree of ${size}`);
  const spans: Span[] = [];
  let from = 0;
  let to = size;
  while (to - from > 1) {
    const middle = from + splitOf(to - from);
    if (index < middle) {
      spans.push({ from: middle, to });
      to = middle;
    } else {
      spans.push({ from, to: middle });
      from = middle;
    }
  }
  return spans.reverse();
}

/** What shows that the tree of `second` leaves begins with that of `first`. Empty where they are the same. Source: RFC 9162, section 2.1.4.1. */
export function consistencySpans(first: number, second: number): Span[] {
  if (!Number.isSafeInteger(first) || !Number.isSafeInteger(second) || first < 1 || first > second) throw new RangeError(`there is no consistency between trees of ${first} and ${second} leaves`);
  const spans: Span[] = [];
  let from = 0;
  let to = second;
  // While the old tree is a whole subtree from the left on, whoever asks has its hash already.
  let known = true;
  while (to > first) {
    const middle = from + splitOf(to - from);
    if (first <= middle) {
      spans.push({ from: middle, to });
      to = middle;
    } else {
      spans.push({ from, to: middle });
      from = middle;
      known = false;
    }
  }
  if (!known) spans.push({ from, to });
  return spans.reverse();
}
