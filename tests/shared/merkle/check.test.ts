import { describe, expect, it } from 'vitest';
import { includes, isConsistent } from '#shared/merkle/check.ts';
import { leafHash } from '#shared/merkle/hash.ts';
import { GrownTree } from './grown-tree.ts';

const leaves = Array.from({ length: 100 }, (_, i) => new TextEncoder().encode(`leaf ${i}`));
const tree = new GrownTree();
for (const leaf of leaves) tree.add(leaf);
const roots = Array.from({ length: leaves.length + 1 }, (_, n) => tree.rootAt(n));

const flipped = (bytes: Uint8Array, bit: number): Uint8Array => bytes.map((byte, i) => (i === bit >> 3 ? byte ^ (1 << (bit & 7)) : byte));
const withItem = <T>(items: readonly T[], at: number, item: T): T[] => items.map((old, i) => (i === at ? item : old));

describe('checking inclusion', () => {
  it('accepts every leaf of a log of 100 at every size', () => {
    for (let n = 1; n <= 100; n++) for (let m = 0; m < n; m++) expect(includes(leafHash(leaves[m]!), m, n, tree.inclusion(m, n), roots[n]!)).toBe(true);
  });

  it('refuses every proof of a log of 100 with a single bit changed, in leaf, path or root', () => {
    for (let m = 0; m < 100; m++) {
      const leaf = leafHash(leaves[m]!);
      const path = tree.inclusion(m, 100);
      for (let bit = 0; bit < 256; bit++) {
        expect(includes(flipped(leaf, bit), m, 100, path, roots[100]!)).toBe(false);
        expect(includes(leaf, m, 100, path, flipped(roots[100]!, bit))).toBe(false);
        for (let p = 0; p < path.length; p++) if (includes(leaf, m, 100, withItem(path, p, flipped(path[p]!, bit)), roots[100]!)) throw new Error(`leaf ${m}, part ${p}, bit ${bit} was accepted`);
      }
    }
  });

  it('refuses another place, another size, and a path cut short or drawn out', () => {
    for (let m = 0; m < 100; m++) {
      const leaf = leafHash(leaves[m]!);
      const path = tree.inclusion(m, 100);
      for (let other = 0; other < 100; other++) if (other !== m) expect(includes(leaf, other, 100, path, roots[100]!)).toBe(false);
      expect(includes(leaf, m, 100, path.slice(1), roots[100]!)).toBe(false);
      expect(includes(leaf, m, 100, path.slice(0, -1), roots[100]!)).toBe(false);
      expect(includes(leaf, m, 100, [...path, path[0]!], roots[100]!)).toBe(false);
      for (const size of [-1, 0, m, 100.5, Number.NaN, 1e300]) expect(includes(leaf, m, size, path, roots[100]!)).toBe(false);
    }
  });
});

describe('checking consistency', () => {
  it('accepts every pair of sizes up to 100', () => {
    for (let n = 1; n <= 100; n++) for (let m = 1; m <= n; m++) expect(isConsistent(m, n, roots[m]!, roots[n]!, tree.consistency(m, n)), `${m} in ${n}`).toBe(true);
  });

  it('refuses every single changed bit of the path between any size and 100, and of both roots', () => {
    for (let m = 1; m < 100; m++) {
      const path = tree.consistency(m, 100);
      for (let bit = 0; bit < 256; bit++) {
        if (isConsistent(m, 100, flipped(roots[m]!, bit), roots[100]!, path) || isConsistent(m, 100, roots[m]!, flipped(roots[100]!, bit), path)) throw new Error(`size ${m}, a root with bit ${bit} changed was accepted`);
        for (let p = 0; p < path.length; p++) if (isConsistent(m, 100, roots[m]!, roots[100]!, withItem(path, p, flipped(path[p]!, bit)))) throw new Error(`size ${m}, part ${p}, bit ${bit} was accepted`);
      }
    }
  });

  it('refuses swapped sizes, a missing or an added part, and an older root that is not its own', () => {
    for (let m = 2; m < 100; m++) {
      const path = tree.consistency(m, 100);
      expect(isConsistent(100, m, roots[100]!, roots[m]!, path)).toBe(false);
      expect(isConsistent(m, 100, roots[m]!, roots[100]!, path.slice(1))).toBe(false);
      expect(isConsistent(m, 100, roots[m]!, roots[100]!, [...path, path[0]!])).toBe(false);
      expect(isConsistent(m, 100, roots[m - 1]!, roots[100]!, path)).toBe(false);
    }
    expect(isConsistent(0, 100, roots[0]!, roots[100]!, [])).toBe(false);
    expect(isConsistent(100, 100, roots[100]!, roots[99]!, [])).toBe(false);
  });
});
