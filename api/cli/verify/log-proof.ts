import { createHash, createPublicKey, verify } from 'node:crypto';
import canonicalize from 'canonicalize';
import { z } from 'zod';
import type { FileCheck } from '#shared/recompute/types.ts';
import type { EntryFacts } from './source.ts';

/**
 * Checks of a log proof, written from RFC 9162 for this command alone: whoever checks the registry's log must not lean on
 * the code that keeps it.
 */
const digest = z.string().regex(/^[0-9a-f]{64}$/);
const index = z.number().int().min(0).max(Number.MAX_SAFE_INTEGER);
const published = z.object({
  leaf: z.record(z.string(), z.unknown()), leafIndex: index, treeSize: index, rootHash: digest, path: z.array(digest).max(64),
  head: z.object({ treeSize: index, rootHash: digest, at: z.string(), signature: z.string(), keyId: z.string(), publicKey: z.string() }),
});

const hashOf = (...parts: Buffer[]): Buffer => createHash('sha256').update(Buffer.concat(parts)).digest();
const bytesOf = (value: unknown): Buffer => Buffer.from(canonicalize(value) ?? '', 'utf8');

/** RFC 9162, 2.1.1: the hash of a leaf's data. */
export const leafHash = (data: Buffer): Buffer => hashOf(Buffer.of(0), data);

/** RFC 9162, 2.1.3.2: does the path lead from the leaf to the root? Numbers stay exact up to 2⁵³. */
export function isIncluded(leaf: Buffer, leafIndex: number, treeSize: number, path: readonly Buffer[], root: Buffer): boolean {
  if (leafIndex >= treeSize) return false;
  let fn = leafIndex;
  let sn = treeSize - 1;
  let r = leaf;
  for (const p of path) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      r = hashOf(Buffer.of(1), p, r);
      while (fn % 2 === 0 && fn !== 0) {
        fn /= 2;
        sn = Math.floor(sn / 2);
      }
    } else {
      r = hashOf(Buffer.of(1), r, p);
    }
    fn = Math.floor(fn / 2);
    sn = Math.floor(sn / 2);
  }
  return sn === 0 && r.equals(root);
}

function isSigned({ treeSize, rootHash, at, signature, publicKey }: z.infer<typeof published>['head']): boolean {
  try {
    const key = createPublicKey({ key: Buffer.from(publicKey, 'base64'), format: 'der', type: 'spki' });
    return key.asymmetricKeyType === 'ed25519' && verify(null, bytesOf({ treeSize, rootHash, at }), key, Buffer.from(signature, 'base64'));
  } catch {
    return false;
  }
}

/** The members in which a leaf and the record must agree. */
const shared = ['accession', 'version', 'method', 'contentId', 'bytesSha256', 'resultSha256', 'replicatesSha256'] as const;

const check = (id: string, title: string, good: boolean, yes: string, no: string): FileCheck => ({ id, title, outcome: good ? 'agrees' : 'differs', detail: good ? yes : no });

/** A published proof: the leaf tells of this entry, the path leads to the root, the head is signed. */
export function checkLogProof(proof: unknown, facts: EntryFacts, event: 'frozen' | 'withdrawn'): FileCheck[] {
  const what = event === 'frozen' ? 'log' : 'log, withdrawal';
  if (proof === null) return [{ id: 'log', title: what, outcome: 'left-out', detail: `no log proof is published for this ${event === 'frozen' ? 'entry' : 'withdrawal'}` }];
  const parsed = published.safeParse(proof);
  if (!parsed.success) return [{ id: 'log', title: what, outcome: 'differs', detail: `not in the published form: ${parsed.error.issues[0]?.path.join('.') ?? ''} ${parsed.error.issues[0]?.message ?? ''}` }];
  const { leaf, leafIndex, treeSize, rootHash, path, head } = parsed.data;
  const wrong = [...(leaf.event === event ? [] : ['event']), ...shared.filter((name) => leaf[name] !== facts[name])];
  const hex = (text: string): Buffer => Buffer.from(text, 'hex');
  const included = isIncluded(leafHash(bytesOf(leaf)), leafIndex, treeSize, path.map(hex), hex(rootHash));
  const sameHead = head.treeSize === treeSize && head.rootHash === rootHash;
  return [
    check('log-leaf', `${what}, leaf against the record`, wrong.length === 0, `leaf ${leafIndex} of ${treeSize}`, `the leaf has another ${wrong.join(', ')}`),
    check('log-path', `${what}, proof`, included, `leads to the root ${rootHash}`, `the path does not lead from leaf ${leafIndex} to the root ${rootHash}`),
    check('log-head', `${what}, signature of the head`, sameHead && isSigned(head), `good, by the key ${head.keyId}`, sameHead ? `the signature is not of the key ${head.keyId}` : 'the head is of another tree than the proof'),
  ];
}
