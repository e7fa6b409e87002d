import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, concatBytes, utf8ToBytes } from '@noble/hashes/utils.js';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { Layout } from '#shared/method/parameters.ts';

/**
 * Where factors of designs are kept between estimates. What is kept saves time and nothing else: a result has the same bits
 * with and without, and a value that does not stand the tests of `unpackFactor` is worked out afresh.
 */
export interface FactorStore {
  get: (key: string) => Uint8Array | null;
  put: (key: string, bytes: Uint8Array) => void;
}

/** Part of every key: changes whenever the same design would give another factor, or the packing changes. */
const KIND = 'evenbeam.factor/1';

const bytesOf = (a: Float64Array | Int32Array): Uint8Array => new Uint8Array(a.buffer, a.byteOffset, a.byteLength);

/** Digest of everything the factor of a design depends on: maps, which parameters have columns, circuits in their order. */
export function factorKey(set: GateSet, layout: Layout, circuits: readonly Int32Array[]): string {
  const hash = sha256.create().update(utf8ToBytes(KIND));
  hash.update(bytesOf(Int32Array.of(set.D, set.gates.length, layout.columns, layout.stateAt, layout.effectAt, circuits.length)));
  hash.update(bytesOf(layout.gateAt));
  for (const map of [...set.gates, set.state, ...set.effects]) hash.update(bytesOf(map));
  for (const circuit of circuits) hash.update(bytesOf(Int32Array.of(circuit.length))).update(bytesOf(circuit));
  return bytesToHex(hash.digest());
}

/** What the fast path works out of a design. */
export interface DesignFactor {
  columns: number;
  gaugeDimension: number;
  sigma1: number;
  sigmaR: number;
  /** Rows of the lower triangle end to end; empty where only the judgement is kept. */
  lower: Float64Array;
}

const HEAD = 32;
const DIGEST = 32;

/** Little-endian, as every engine that runs WebAssembly: columns, gauge dimension, order of the triangle, 0 | σ₁, σ_r | triangle | SHA-256 of key and all that. */
export function packFactor(key: string, { columns, gaugeDimension, sigma1, sigmaR, lower }: DesignFactor): Uint8Array {
  const out = new Uint8Array(HEAD + lower.byteLength + DIGEST);
  new Int32Array(out.buffer, 0, 4).set([columns, gaugeDimension, lower.length > 0 ? columns : 0, 0]);
  new Float64Array(out.buffer, 16, 2).set([sigma1, sigmaR]);
  new Float64Array(out.buffer, HEAD, lower.length).set(lower);
  out.set(digestOf(key, out), out.length - DIGEST);
  return out;
}

/** The factor, or null where the bytes are not those that were packed under this key for this many columns. */
export function unpackFactor(key: string, bytes: Uint8Array, columns: number): DesignFactor | null {
  if (bytes.length < HEAD + DIGEST) return null;
  // A copy stands at an address that doubles can be read from. (`slice` of a Buffer of Node's would be no copy.)
  const own = new Uint8Array(bytes);
  const [storedColumns, gaugeDimension, order] = new Int32Array(own.buffer, 0, 4);
  if (storedColumns !== columns || (order !== 0 && order !== columns)) return null;
  const size = (order! * (order! + 1)) / 2;
  if (own.length !== HEAD + 8 * size + DIGEST) return null;
  const digest = digestOf(key, own);
  if (!digest.every((byte, i) => byte === own[own.length - DIGEST + i])) return null;
  const [sigma1, sigmaR] = new Float64Array(own.buffer, 16, 2);
  return { columns, gaugeDimension: gaugeDimension!, sigma1: sigma1!, sigmaR: sigmaR!, lower: new Float64Array(own.buffer, HEAD, size) };
}

function digestOf(key: string, packed: Uint8Array): Uint8Array {
  return sha256(concatBytes(utf8ToBytes(key), packed.subarray(0, packed.length - DIGEST)));
}
