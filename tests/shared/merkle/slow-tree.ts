import { createHash } from 'node:crypto';

/** The definitions of RFC 9162, sections 2.1.1 to 2.1.4, letter by letter and as slow as they are: the oracle of the tests. */
const sha = (...parts: Uint8Array[]): Uint8Array => {
  const hash = createHash('sha256');
  for (const part of parts) hash.update(part);
  return new Uint8Array(hash.digest());
};

const largestPowerBelow = (n: number): number => {
  let k = 1;
  while (k * 2 < n) k *= 2;
  return k;
};

export const MTH = (d: readonly Uint8Array[]): Uint8Array => {
  if (d.length === 0) return sha();
  if (d.length === 1) return sha(Uint8Array.of(0), d[0]!);
  const k = largestPowerBelow(d.length);
  return sha(Uint8Array.of(1), MTH(d.slice(0, k)), MTH(d.slice(k)));
};

export const PATH = (m: number, d: readonly Uint8Array[]): Uint8Array[] => {
  if (d.length === 1) return [];
  const k = largestPowerBelow(d.length);
  return m < k ? [...PATH(m, d.slice(0, k)), MTH(d.slice(k))] : [...PATH(m - k, d.slice(k)), MTH(d.slice(0, k))];
};

const SUBPROOF = (m: number, d: readonly Uint8Array[], b: boolean): Uint8Array[] => {
  if (m === d.length) return b ? [] : [MTH(d)];
  const k = largestPowerBelow(d.length);
  return m <= k ? [...SUBPROOF(m, d.slice(0, k), b), MTH(d.slice(k))] : [...SUBPROOF(m - k, d.slice(k), false), MTH(d.slice(0, k))];
};

export const PROOF = (m: number, d: readonly Uint8Array[]): Uint8Array[] => SUBPROOF(m, d, true);
