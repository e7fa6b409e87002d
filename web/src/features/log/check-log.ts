import { logConsistency, logHead, logLeafList, type LogHead, type LogLeafList } from '#shared/contracts/log.ts';
import { canonicalJson } from '#shared/formats/canonical-json.ts';
import { isConsistent } from '#shared/merkle/check.ts';
import { leafHash, type Hash } from '#shared/merkle/hash.ts';
import { hashOfSpan, nodesAdded, type FullNode } from '#shared/merkle/tree.ts';
import { apiGet } from '#web/lib/api-client.ts';
import type { SeenHead } from './last-seen.ts';

export type Finding = 'agrees' | 'disagrees' | 'not-checked';

export interface LogCheck {
  name: string;
  finding: Finding;
  detail: string;
}

const fromHex = (text: string): Hash => Uint8Array.from(text.match(/../g) ?? [], (pair) => Number.parseInt(pair, 16));
const toHex = (hash: Hash): string => Array.from(hash, (byte) => byte.toString(16).padStart(2, '0')).join('');
const fromBase64 = (text: string): Uint8Array<ArrayBuffer> => Uint8Array.from(atob(text), (letter) => letter.charCodeAt(0));
const bytesOf = (value: unknown): Uint8Array<ArrayBuffer> => Uint8Array.from(new TextEncoder().encode(canonicalJson(value)));

/** Ed25519 over the RFC 8785 bytes of the head. Older browsers have no Ed25519; they say so. */
async function checkSignature(head: LogHead): Promise<LogCheck> {
  const name = 'The head is signed with its key';
  let key: CryptoKey;
  try {
    key = await crypto.subtle.importKey('spki', fromBase64(head.publicKey), { name: 'Ed25519' }, false, ['verify']);
  } catch {
    return { name, finding: 'not-checked', detail: 'This browser does not know Ed25519.' };
  }
  const { treeSize, rootHash, at } = head;
  const sound = await crypto.subtle.verify('Ed25519', key, fromBase64(head.signature), bytesOf({ treeSize, rootHash, at }));
  return { name, finding: sound ? 'agrees' : 'disagrees', detail: `Ed25519, key ${head.keyId.slice(0, 16)}…` };
}

/** Builds the whole tree again from the leaves that the registry hands out. */
async function checkRoot(head: LogHead, onLeaf: (done: number) => void, signal: AbortSignal): Promise<LogCheck> {
  const nodes = new Map<string, Hash>();
  const read = ({ level, index }: FullNode): Hash => nodes.get(`${level}/${index}`)!;
  let size = 0;
  let cursor: string | null = '';
  while (cursor !== null && size < head.treeSize) {
    const page: LogLeafList = await apiGet('/api/v1/log/leaves', logLeafList, { signal, query: { limit: 200, cursor } });
    for (const { leaf } of page.items.slice(0, head.treeSize - size)) {
      for (const { level, index, hash } of nodesAdded(size, leafHash(bytesOf(leaf)), read)) nodes.set(`${level}/${index}`, hash);
      size += 1;
    }
    onLeaf(size);
    cursor = page.nextCursor;
  }
  const name = 'All leaves together give the root of the head';
  if (size < head.treeSize) return { name, finding: 'disagrees', detail: `The head counts ${head.treeSize} leaves; ${size} were handed out.` };
  const root = toHex(hashOfSpan({ from: 0, to: size }, read));
  return root === head.rootHash ? { name, finding: 'agrees', detail: `${size} leaves hashed in this browser.` } : { name, finding: 'disagrees', detail: `The leaves give ${root}.` };
}

/** Nothing that this browser has seen before was taken out or changed. */
async function checkLastSeen(head: LogHead, seen: SeenHead | null, signal: AbortSignal): Promise<LogCheck> {
  const name = 'The log still begins with what this browser saw last';
  if (!seen) return { name, finding: 'not-checked', detail: 'This browser has checked no head before. From now on it has one to compare with.' };
  const told = `Seen on ${seen.seenAt.slice(0, 10)}: ${seen.treeSize} leaves.`;
  if (seen.treeSize > head.treeSize) return { name, finding: 'disagrees', detail: `${told} Now there are ${head.treeSize}: the log has become shorter.` };
  const { path } = await apiGet('/api/v1/log/consistency', logConsistency, { signal, query: { first: seen.treeSize, second: head.treeSize } });
  const sound = isConsistent(seen.treeSize, head.treeSize, fromHex(seen.rootHash), fromHex(head.rootHash), path.map(fromHex));
  const other = seen.keyId === head.keyId ? '' : ' The head is signed with another key than then.';
  return { name, finding: sound ? 'agrees' : 'disagrees', detail: told + other };
}

export interface LogReport {
  head: LogHead;
  checks: LogCheck[];
  sound: boolean;
}

/** Everything a reader's browser can find out about the log by itself. */
export async function checkLog(seen: SeenHead | null, onLeaf: (done: number, of: number) => void, signal: AbortSignal): Promise<LogReport> {
  const head = await apiGet('/api/v1/log/head', logHead, { signal });
  const checks = [await checkSignature(head), await checkLastSeen(head, seen, signal), await checkRoot(head, (done) => onLeaf(done, head.treeSize), signal)];
  return { head, checks, sound: checks.every((c) => c.finding !== 'disagrees') };
}
