import { readLogKey } from '#api/lib/log-key.ts';
import { canonicalJson } from '#shared/formats/canonical-json.ts';
import type { LogHead, LogLeaf } from '#shared/contracts/log.ts';
import { testLogKey } from '#tests/support/log-key.ts';
import { MTH, PROOF } from '#tests/shared/merkle/slow-tree.ts';
import { createHash } from 'node:crypto';

const key = readLogKey(testLogKey);
const bytesOf = (value: unknown): Uint8Array => new TextEncoder().encode(canonicalJson(value));
const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString('hex');
const digest = (i: number): string => createHash('sha256').update(String(i)).digest('hex');

const leafOf = (i: number): LogLeaf => ({
  event: 'frozen', accession: `EVB-${String(i + 1).padStart(6, '0')}`, version: 1, contentId: digest(4 * i), bytesSha256: digest(4 * i + 1), resultSha256: digest(4 * i + 2), replicatesSha256: digest(4 * i + 3), method: 'M1',
  at: new Date(Date.UTC(2026, 0, 5 + 9 * i)).toISOString(),
});

/** A small log by the letter of the RFC, and the answers a registry that holds it would give. */
export const madeLog = (size: number) => {
  const leaves = Array.from({ length: size }, (_, i) => leafOf(i));
  const data = leaves.map(bytesOf);
  const signed = { treeSize: size, rootHash: hex(MTH(data)), at: leaves.at(-1)!.at };
  const head: LogHead = { ...signed, signature: key.sign(bytesOf(signed)), keyId: key.keyId, publicKey: key.publicKey };
  const items = leaves.map((leaf, index) => ({ index, hash: hex(MTH([data[index]!])), leaf }));
  return {
    head, items,
    rootAt: (n: number): string => hex(MTH(data.slice(0, n))),
    answers: (path: string, search: URLSearchParams): unknown => {
      if (path === '/api/v1/log/head') return head;
      if (path === '/api/v1/log/leaves') {
        const from = Number(search.get('cursor') ?? '0');
        const to = Math.min(size, from + 5);
        return { items: search.get('order') === 'newest' ? [...items].reverse().slice(0, 12) : items.slice(from, to), nextCursor: to < size ? String(to) : null };
      }
      if (path === '/api/v1/log/consistency') {
        const [first, second] = [Number(search.get('first')), Number(search.get('second'))];
        return { first, second, path: PROOF(first, data.slice(0, second)).map(hex) };
      }
      if (path === '/api/v1/log/growth') return { months: [{ month: '2025-12', leaves: 2, size: 2 }, { month: '2026-01', leaves: size - 2, size }] };
      return null;
    },
  };
};
