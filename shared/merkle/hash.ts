import { sha256 } from '@noble/hashes/sha2.js';

/** 32 bytes of SHA-256. */
export type Hash = Uint8Array;

const LEAF = 0x00;
const NODE = 0x01;

/** Hash of a leaf: SHA-256(0x00 ‖ data). Source: RFC 9162, section 2.1.1. */
export function leafHash(data: Uint8Array): Hash {
  return sha256.create().update(Uint8Array.of(LEAF)).update(data).digest();
}

/** Hash of an inner node: SHA-256(0x01 ‖ left ‖ right), both 32 bytes. Source: RFC 9162, section 2.1.1. */
export function nodeHash(left: Hash, right: Hash): Hash {
  return sha256.create().update(Uint8Array.of(NODE)).update(left).update(right).digest();
}

/** Root of the tree without leaves: SHA-256 of nothing. */
export function emptyRoot(): Hash {
  return sha256(new Uint8Array(0));
}
