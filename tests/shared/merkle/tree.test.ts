import { describe, expect, it } from 'vitest';
import { emptyRoot, leafHash } from '#shared/merkle/hash.ts';
import { consistencySpans, fullNodesOf, inclusionSpans } from '#shared/merkle/tree.ts';
import { GrownTree } from './grown-tree.ts';
import { MTH, PATH, PROOF } from './slow-tree.ts';

const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString('hex');
const leaves = Array.from({ length: 70 }, (_, i) => new TextEncoder().encode(`leaf ${i}`));
const grown = (): GrownTree => {
  const tree = new GrownTree();
  for (const leaf of leaves) tree.add(leaf);
  return tree;
};

describe('hashes of RFC 9162', () => {
  it('gives the root of no leaves and of one empty leaf as certificate logs do (common practice; recomputed with Python 3.11 hashlib)', () => {
    expect(hex(emptyRoot())).toBe('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855');
    expect(hex(leafHash(new Uint8Array(0)))).toBe('6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d');
  });
});

describe('a tree grown leaf by leaf', () => {
  const tree = grown();

  it('has the root of the definition at every size', () => {
    for (let n = 0; n <= leaves.length; n++) expect(hex(tree.rootAt(n)), `${n} leaves`).toBe(hex(MTH(leaves.slice(0, n))));
  });

  it('gives the inclusion path of the definition for every leaf at every size', () => {
    for (let n = 1; n <= leaves.length; n++) {
      for (let m = 0; m < n; m++) expect(tree.inclusion(m, n).map(hex), `leaf ${m} of ${n}`).toEqual(PATH(m, leaves.slice(0, n)).map(hex));
    }
  });

  it('gives the consistency path of the definition for every pair of sizes', () => {
    for (let n = 1; n <= leaves.length; n++) {
      for (let m = 1; m <= n; m++) expect(tree.consistency(m, n).map(hex), `${m} in ${n}`).toEqual(PROOF(m, leaves.slice(0, n)).map(hex));
    }
  });

  it('refuses a leaf that is not there and sizes that cannot be', () => {
    for (const [index, size] of [[-1, 4], [4, 4], [0, 0], [0.5, 4]] as const) expect(() => inclusionSpans(index, size)).toThrow(RangeError);
    for (const [first, second] of [[0, 4], [5, 4], [1.5, 4]] as const) expect(() => consistencySpans(first, second)).toThrow(RangeError);
    expect(() => fullNodesOf({ from: 1, to: 3 })).toThrow(RangeError);
  });
});
