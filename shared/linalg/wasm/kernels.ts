import { add2, addDoubles, advance, below, constant, encodeModule, get, integer, load, long, multiply2, plus, set, splat, store, storeDouble, subtract2, sum2, times, whileTrue, type Code, type Kernel } from '#shared/linalg/wasm/encode.ts';

/** acc += a·b for vector locals. Multiplication and addition are rounded one after the other, as in plain TypeScript: the bits agree. */
const accumulate = (acc: number, a: Code, b: Code): Code => set(acc, add2(get(acc), multiply2(a, b)));
/** Sets vector locals to zero from one that is never written: a quarter of the bytes of a constant. */
const clear = (from: number, count: number, zero: number): Code => Array.from({ length: count }, (_, i) => set(from + i, get(zero))).flat();
const each = (count: number, code: (i: number) => Code): Code => Array.from({ length: count }, (_, i) => code(i)).flat();

/**
 * panel(a, stride, rows, k, x, out): out[i] −= Σ_k a[i][k]·x[k] for four interleaved vectors; addresses and stride in bytes.
 * Tiles of four rows × four vectors are eight registers of two doubles.
 */
function panel(): Kernel {
  const [a, stride, rows, k, x, out] = [0, 1, 2, 3, 4, 5];
  const [r0, p, end] = [6, 10, 11];
  const [x0, x1, t, acc, zero] = [12, 13, 14, 15, 23];
  const tile = (height: number): Code => [
    ...each(height, (i) => set(r0 + i, i === 0 ? get(a) : plus(get(r0 + i - 1), get(stride)))),
    ...clear(acc, 2 * height, zero),
    ...set(p, get(x)),
    ...set(end, plus(get(x), times(get(k), constant(32)))),
    ...whileTrue(below(get(p), get(end)), [
      ...set(x0, load(get(p))), ...set(x1, load(get(p), 16)),
      ...each(height, (i) => [...set(t, splat(get(r0 + i))), ...accumulate(acc + 2 * i, get(t), get(x0)), ...accumulate(acc + 2 * i + 1, get(t), get(x1)), ...advance(r0 + i, constant(8))]),
      ...advance(p, constant(32)),
    ]),
    ...each(2 * height, (i) => store(get(out), subtract2(load(get(out), 16 * i), get(acc + i)), 16 * i)),
    ...set(a, plus(get(a), times(get(stride), constant(height)))),
    ...advance(out, constant(32 * height)),
    ...advance(rows, constant(-height)),
  ];
  return { name: 'panel', parameters: 6, integers: 6, vectors: 12, body: [...whileTrue(below(constant(3), get(rows)), tile(4)), ...whileTrue(below(constant(0), get(rows)), tile(1))] };
}

/**
 * advance16(g, vectors, parent, from, to): vector t = G·vector parent[t], 16 components each, G stored by columns at byte g;
 * `parent` is the byte address of 32-bit indices. Two vectors at a time, eight rows of each in registers.
 */
function advance16(): Kernel {
  const [g, vectors, parent, from, to] = [0, 1, 2, 3, 4];
  const [p0, out, column, end] = [5, 7, 8, 9];
  const [s0, g0, acc, zero] = [10, 12, 16, 24];
  const together = (count: number): Code => [
    ...set(out, plus(get(vectors), times(get(from), constant(128)))),
    ...each(2, (half) => [
      ...each(count, (v) => set(p0 + v, plus(get(vectors), times(integer(plus(get(parent), times(get(from), constant(4))), 4 * v), constant(128))))),
      ...clear(acc, 4 * count, zero),
      ...set(column, get(g)),
      ...set(end, plus(get(g), constant(2048))),
      ...whileTrue(below(get(column), get(end)), [
        ...each(count, (v) => [...set(s0 + v, splat(get(p0 + v))), ...advance(p0 + v, constant(8))]),
        ...each(4, (i) => [...set(g0 + i, load(get(column), 64 * half + 16 * i)), ...each(count, (v) => accumulate(acc + 4 * v + i, get(g0 + i), get(s0 + v)))]),
        ...advance(column, constant(128)),
      ]),
      ...each(count, (v) => each(4, (i) => store(get(out), get(acc + 4 * v + i), 128 * v + 64 * half + 16 * i))),
    ]),
    ...advance(from, constant(count)),
  ];
  return { name: 'advance16', parameters: 5, integers: 5, vectors: 15, body: [...whileTrue(below(plus(get(from), constant(1)), get(to)), together(2)), ...whileTrue(below(get(from), get(to)), together(1))] };
}

/** advance4: the same for four components; all of G stays in registers. */
function advance4(): Kernel {
  const [g, vectors, parent, from, to] = [0, 1, 2, 3, 4];
  const [p, out] = [5, 6];
  const [column, s, acc, zero] = [7, 15, 16, 18];
  return {
    name: 'advance4', parameters: 5, integers: 2, vectors: 12,
    body: [
      ...each(8, (i) => set(column + i, load(get(g), 16 * i))),
      ...whileTrue(below(get(from), get(to)), [
        ...set(p, plus(get(vectors), times(integer(plus(get(parent), times(get(from), constant(4)))), constant(32)))),
        ...set(out, plus(get(vectors), times(get(from), constant(32)))),
        ...clear(acc, 2, zero),
        ...each(4, (j) => [...set(s, splat(get(p), 8 * j)), ...accumulate(acc, get(column + 2 * j), get(s)), ...accumulate(acc + 1, get(column + 2 * j + 1), get(s))]),
        ...store(get(out), get(acc)), ...store(get(out), get(acc + 1), 16),
        ...advance(from, constant(1)),
      ]),
    ],
  };
}

/**
 * sparse(start, index, value, rows, x, y, xGroup, yGroup): y = A·x for `GROUPS` groups of four interleaved vectors at once.
 * `index` holds byte offsets 32·column; x groups lie xGroup bytes apart, y groups yGroup bytes.
 */
function sparse(groups: number): Kernel {
  const [start, index, value, rows, x, y, xGroup, yGroup] = [0, 1, 2, 3, 4, 5, 6, 7];
  const [entry, end, p, q] = [8, 9, 10, 11];
  const [v, zero, acc] = [12, 13, 14];
  return {
    name: `sparse${groups}`, parameters: 8, integers: 4, vectors: 2 + 2 * groups,
    body: whileTrue(below(constant(0), get(rows)), [
      ...set(entry, integer(get(start))), ...set(end, integer(get(start), 4)),
      ...clear(acc, 2 * groups, zero),
      ...whileTrue(below(get(entry), get(end)), [
        ...set(v, splat(plus(get(value), times(get(entry), constant(8))))),
        ...set(p, plus(get(x), integer(plus(get(index), times(get(entry), constant(4)))))),
        ...each(groups, (i) => [
          ...accumulate(acc + 2 * i, get(v), load(get(p))), ...accumulate(acc + 2 * i + 1, get(v), load(get(p), 16)),
          ...(i < groups - 1 ? advance(p, get(xGroup)) : []),
        ]),
        ...advance(entry, constant(1)),
      ]),
      ...set(q, get(y)),
      ...each(groups, (i) => [...store(get(q), get(acc + 2 * i)), ...store(get(q), get(acc + 2 * i + 1), 16), ...(i < groups - 1 ? advance(q, get(yGroup)) : [])]),
      ...advance(start, constant(4)), ...advance(y, constant(32)), ...advance(rows, constant(-1)),
    ]),
  };
}

/**
 * dots(pairs, count, out, bytes): out[i] = a·b for vectors of `bytes` bytes whose addresses are pairs[2i], pairs[2i + 1];
 * four sums side by side, added as (s0 + s1) + (s2 + s3).
 */
function dots(): Kernel {
  const [pairs, count, out, bytes] = [0, 1, 2, 3];
  const [a, b, end] = [4, 5, 6];
  const [low, high, zero] = [7, 8, 9];
  return {
    name: 'dots', parameters: 4, integers: 3, vectors: 3,
    body: whileTrue(below(constant(0), get(count)), [
      ...set(a, integer(get(pairs))), ...set(b, integer(get(pairs), 4)), ...set(end, plus(get(a), get(bytes))),
      ...clear(low, 2, zero),
      ...whileTrue(below(get(a), get(end)), [
        ...accumulate(low, load(get(a)), load(get(b))), ...accumulate(high, load(get(a), 16), load(get(b), 16)),
        ...advance(a, constant(32)), ...advance(b, constant(32)),
      ]),
      ...storeDouble(get(out), addDoubles(sum2(low), sum2(high))),
      ...advance(pairs, constant(8)), ...advance(out, constant(8)), ...advance(count, constant(-1)),
    ]),
  };
}

/**
 * columns(a, n, height, x, out): out += A·x, A stored by n columns of `height` bytes, a multiple of 128; sixteen rows at a time.
 */
function columns(): Kernel {
  const [a, n, height, x, out] = [0, 1, 2, 3, 4];
  const [p, q, end, stop] = [5, 6, 7, 8];
  const [s, acc, zero] = [9, 10, 18];
  return {
    name: 'columns', parameters: 5, integers: 4, vectors: 10,
    body: [
      ...set(stop, plus(get(a), get(height))), ...set(end, plus(get(x), times(get(n), constant(8)))),
      ...whileTrue(below(get(a), get(stop)), [
        ...clear(acc, 8, zero), ...set(p, get(a)), ...set(q, get(x)),
        ...whileTrue(below(get(q), get(end)), [
          ...set(s, splat(get(q))), ...each(8, (i) => accumulate(acc + i, load(get(p), 16 * i), get(s))),
          ...advance(p, get(height)), ...advance(q, constant(8)),
        ]),
        ...each(8, (i) => store(get(out), add2(load(get(out), 16 * i), get(acc + i)), 16 * i)),
        ...advance(a, constant(128)), ...advance(out, constant(128)),
      ]),
    ],
  };
}

/** uniform(state, out, count): the next numbers of xoshiro256** in [0, 1), 53 bits each; the state of four 64-bit words is moved on. */
function uniform(): Kernel {
  const [state, out, count] = [0, 1, 2];
  const [s0, s1, s2, s3, t] = [3, 4, 5, 6, 7];
  const mix = (into: number, from: number): Code => set(into, long.xor(get(into), get(from)));
  return {
    name: 'uniform', parameters: 3, integers: 0, longs: 5, vectors: 0,
    body: [
      ...each(4, (i) => set(s0 + i, long.load(get(state), 8 * i))),
      ...whileTrue(below(constant(0), get(count)), [
        ...storeDouble(get(out), long.share(long.right(long.times(long.rotate(long.times(get(s1), long.constant(5)), 7), long.constant(9)), 11))),
        ...set(t, long.left(get(s1), 17)),
        ...mix(s2, s0), ...mix(s3, s1), ...mix(s1, s2), ...mix(s0, s3), ...mix(s2, t),
        ...set(s3, long.rotate(get(s3), 45)),
        ...advance(out, constant(8)), ...advance(count, constant(-1)),
      ]),
      ...each(4, (i) => long.store(get(state), get(s0 + i), 8 * i)),
    ],
  };
}

/** Groups of four that the wide sparse kernel takes at once: eight sums hide the latency of an addition. */
export const WIDE = 4;

export interface Kernels {
  panel: (a: number, stride: number, rows: number, k: number, x: number, out: number) => void;
  advance4: (g: number, vectors: number, parent: number, from: number, to: number) => void;
  advance16: (g: number, vectors: number, parent: number, from: number, to: number) => void;
  sparse1: (start: number, index: number, value: number, rows: number, x: number, y: number, xGroup: number, yGroup: number) => void;
  sparse4: (start: number, index: number, value: number, rows: number, x: number, y: number, xGroup: number, yGroup: number) => void;
  dots: (pairs: number, count: number, out: number, bytes: number) => void;
  uniform: (state: number, out: number, count: number) => void;
  columns: (a: number, n: number, height: number, x: number, out: number) => void;
}

export function kernelBytes(): Uint8Array {
  return encodeModule([panel(), advance4(), advance16(), sparse(1), sparse(WIDE), dots(), columns(), uniform()]);
}
