import { createHash, generateKeyPairSync, sign } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { checkLogProof, isIncluded, leafHash } from '#api/cli/verify/log-proof.ts';
import { canonicalJson } from '#shared/formats/canonical-json.ts';
import { sourceFiles } from '#tests/support/source-files.ts';

/** The eight reference leaves that test suites of RFC 6962 share, and the roots of the trees of the first 1 … 8 of them (memory; recomputed below by the slow definition). */
const leaves = ['', '00', '10', '2021', '3031', '40414243', '5051525354555657', '606162636465666768696a6b6c6d6e6f'].map((hex) => Buffer.from(hex, 'hex'));
const roots = ['6e340b9c', 'fac54203', 'aeb6bcfe', 'd37ee418', '4e3bbb1f', '76e67dad', 'ddb89be4', '5dc9da79'];

const nodeHash = (a: Buffer, b: Buffer): Buffer => createHash('sha256').update(Buffer.concat([Buffer.of(1), a, b])).digest();
/** RFC 9162, 2.1.1 and 2.1.3.1, word for word: k is the largest power of two smaller than n. */
const split = (n: number): number => 2 ** Math.floor(Math.log2(n - 1));
const rootOf = (data: readonly Buffer[]): Buffer => (data.length === 1 ? leafHash(data[0]!) : nodeHash(rootOf(data.slice(0, split(data.length))), rootOf(data.slice(split(data.length)))));
const pathOf = (m: number, data: readonly Buffer[]): Buffer[] => {
  if (data.length === 1) return [];
  const k = split(data.length);
  return m < k ? [...pathOf(m, data.slice(0, k)), rootOf(data.slice(k))] : [...pathOf(m - k, data.slice(k)), rootOf(data.slice(0, k))];
};

describe('inclusion in a log by RFC 9162', () => {
  it('has the published roots of the reference leaves', () => {
    expect(roots.map((_, n) => rootOf(leaves.slice(0, n + 1)).toString('hex').slice(0, 8))).toEqual(roots);
  });

  it('takes every leaf of every tree up to 40 leaves, and no other place, size, path or root', () => {
    const data = Array.from({ length: 40 }, (_, i) => Buffer.from(`leaf ${i}`));
    for (let n = 1; n <= data.length; n += 1) {
      const tree = data.slice(0, n);
      const root = rootOf(tree);
      tree.forEach((leaf, m) => {
        const path = pathOf(m, tree);
        const hash = leafHash(leaf);
        expect(isIncluded(hash, m, n, path, root), `${m} of ${n}`).toBe(true);
        expect(isIncluded(hash, n, n, path, root)).toBe(false);
        expect(isIncluded(leafHash(Buffer.from('another')), m, n, path, root)).toBe(false);
        expect(isIncluded(hash, m, n, [...path, root], root)).toBe(false);
        if (path.length > 0) expect(isIncluded(hash, m, n, path.slice(0, -1), root)).toBe(false);
        if (n > 1) expect(isIncluded(hash, (m + 1) % n, n, path, root)).toBe(false);
      });
    }
  });
});

describe('the check of a published log proof', () => {
  const digest = (c: string): string => c.repeat(64);
  const facts = { accession: 'EVB-000042', version: 1, method: 'M1', contentId: digest('a'), bytesSha256: digest('b'), resultSha256: digest('c'), replicatesSha256: digest('d') };
  const leaf = { event: 'frozen', ...facts, at: '2026-05-19T10:00:00Z' };
  const { publicKey, privateKey } = generateKeyPairSync('ed25519');
  const data = [Buffer.from('first'), Buffer.from(canonicalJson(leaf)), Buffer.from('third')];
  const root = rootOf(data).toString('hex');
  const headOf = (rootHash: string, treeSize = 3) => ({ treeSize, rootHash, at: '2026-05-20T00:00:00Z' });
  const head = { ...headOf(root), signature: sign(null, Buffer.from(canonicalJson(headOf(root))), privateKey).toString('base64'), keyId: digest('e'), publicKey: publicKey.export({ format: 'der', type: 'spki' }).toString('base64') };
  const proof = { leaf, leafIndex: 1, treeSize: 3, rootHash: root, path: pathOf(1, data).map((p) => p.toString('hex')), head };
  const outcomes = (changed: unknown, event: 'frozen' | 'withdrawn' = 'frozen'): string[] => checkLogProof(changed, facts, event).map(({ outcome }) => outcome);

  it('takes a sound one, and says where none is published', () => {
    expect(outcomes(proof)).toEqual(['agrees', 'agrees', 'agrees']);
    expect(checkLogProof(null, facts, 'frozen')).toMatchObject([{ outcome: 'left-out', detail: 'no log proof is published for this entry' }]);
  });

  it.each([
    ['a leaf of another entry', { ...proof, leaf: { ...leaf, accession: 'EVB-000043' } }, ['differs', 'differs', 'agrees']],
    ['a leaf with another digest', { ...proof, leaf: { ...leaf, resultSha256: digest('f') } }, ['differs', 'differs', 'agrees']],
    ['a member added to the leaf', { ...proof, leaf: { ...leaf, note: 'x' } }, ['agrees', 'differs', 'agrees']],
    ['another place', { ...proof, leafIndex: 2 }, ['agrees', 'differs', 'agrees']],
    ['a path cut short', { ...proof, path: proof.path.slice(1) }, ['agrees', 'differs', 'agrees']],
    ['a head of another root', { ...proof, head: { ...head, rootHash: digest('0') } }, ['agrees', 'agrees', 'differs']],
    ['a head signed by another key', { ...proof, head: { ...head, publicKey: generateKeyPairSync('ed25519').publicKey.export({ format: 'der', type: 'spki' }).toString('base64') } }, ['agrees', 'agrees', 'differs']],
    ['a head dated otherwise', { ...proof, head: { ...head, at: '2026-05-21T00:00:00Z' } }, ['agrees', 'agrees', 'differs']],
    ['something else', { hello: 1 }, ['differs']],
  ])('refuses %s', (_, changed, expected) => {
    expect(outcomes(changed)).toEqual(expected);
  });

  it('refuses the leaf of a freezing as proof of a withdrawal', () => {
    expect(outcomes(proof, 'withdrawn')).toEqual(['differs', 'agrees', 'agrees']);
  });

  it('leans on nothing of the code that keeps the log', () => {
    const own = sourceFiles().filter(({ path }) => path.startsWith('api/cli/verify'));
    expect(own.length).toBeGreaterThan(4);
    expect(own.filter(({ text }) => /shared\/merkle|modules\/log/.test(text)).map(({ path }) => path)).toEqual([]);
  });
});
