import { expect, test } from 'vitest';
import { openStream } from '#shared/random/streams.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';

function fromWords(words: bigint[], plain = false): Xoshiro256 {
  const bytes = new Uint8Array(32);
  const view = new DataView(bytes.buffer);
  words.forEach((w, i) => view.setBigUint64(8 * i, w, true));
  return new Xoshiro256(bytes, plain);
}

const MASK = (1n << 64n) - 1n;
const rotate = (x: bigint, k: bigint) => ((x << k) | (x >> (64n - k))) & MASK;

/** The recurrence in 64-bit integers, as published. */
function* reference(s: bigint[]): Generator<bigint> {
  for (;;) {
    yield (rotate((s[1]! * 5n) & MASK, 7n) * 9n) & MASK;
    const t = (s[1]! << 17n) & MASK;
    s[2]! ^= s[0]!;
    s[3]! ^= s[1]!;
    s[1]! ^= s[2]!;
    s[0]! ^= s[3]!;
    s[2]! ^= t;
    s[3] = rotate(s[3]!, 45n);
  }
}

const asDouble = (word: bigint) => Number(word >> 11n) / 2 ** 53;

test('the first words of state 1, 2, 3, 4 are the published ones (memory)', () => {
  const g = fromWords([1n, 2n, 3n, 4n]);
  for (const word of [11520n, 0n, 1509978240n, 1215971899390074240n, 1216172134540287360n, 607988272756665600n]) expect(g.next()).toBe(asDouble(word));
});

test.each([false, true])('ten thousand numbers equal the recurrence in 64-bit integers (plain TypeScript: %s)', (plain) => {
  const words = [0x0123456789abcdefn, 0xfedcba9876543210n, 0xdeadbeefcafef00dn, 0x8000000000000001n];
  const g = fromWords(words, plain);
  const want = reference([...words]);
  for (let i = 0; i < 10_000; i++) expect(g.next()).toBe(asDouble(want.next().value as bigint));
});

/** The recurrence is linear over bits: row i of the step's 256×256 matrix = the bits of the new state that bit i sets. */
function stepMatrix(): bigint[] {
  return Array.from({ length: 256 }, (_, bit) => {
    const s = [0n, 0n, 0n, 0n];
    s[bit >> 6] = 1n << BigInt(bit & 63);
    const words = reference(s);
    words.next();
    words.next();
    return s[0]! | (s[1]! << 64n) | (s[2]! << 128n) | (s[3]! << 192n);
  });
}

function applyRows(rows: bigint[], state: bigint): bigint {
  let out = 0n;
  for (let bit = 0; state > 0n; bit++, state >>= 1n) if (state & 1n) out ^= rows[bit]!;
  return out;
}

test('a jump is 2¹²⁸ steps: the step matrix squared 128 times', () => {
  let rows = stepMatrix();
  for (let i = 0; i < 128; i++) {
    const previous = rows;
    rows = previous.map((row) => applyRows(previous, row));
  }
  const words = [5n, 6n, 7n, 8n];
  const joined = words[0]! | (words[1]! << 64n) | (words[2]! << 128n) | (words[3]! << 192n);
  const far = applyRows(rows, joined);
  const want = fromWords([0n, 64n, 128n, 192n].map((k) => (far >> k) & MASK));
  const g = fromWords(words);
  g.jump();
  for (let i = 0; i < 20; i++) expect(g.next()).toBe(want.next());
});

test('a jump counts from the number given out last, not from those made in advance', () => {
  const [early, late] = [fromWords([5n, 6n, 7n, 8n]), fromWords([5n, 6n, 7n, 8n])];
  for (let i = 0; i < 3; i++) late.next();
  late.jump();
  early.jump();
  for (let i = 0; i < 3; i++) early.next();
  for (let i = 0; i < 10; i++) expect(late.next()).toBe(early.next());
});

test('streams of one seed differ, and repeat', () => {
  const first = (purpose: 'replicates' | 'misfit' | 'sealed') => openStream('ab', 'M1', purpose).next();
  expect(new Set([first('replicates'), first('misfit'), first('sealed')]).size).toBe(3);
  expect(first('misfit')).toBe(first('misfit'));
  expect(openStream('ab', 'M2', 'replicates').next()).not.toBe(first('replicates'));
});

test('a seed of the wrong length or of zeros is refused', () => {
  expect(() => new Xoshiro256(new Uint8Array(31))).toThrow('a seed has 32 bytes, not 31');
  expect(() => new Xoshiro256(new Uint8Array(32))).toThrow('all-zero');
});
