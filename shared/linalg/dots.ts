import type { Arena } from '#shared/linalg/wasm/arena.ts';

/**
 * out[i] = a·b for pairs of vectors of length D (a multiple of four) inside one arena. `pairs` holds the byte address of a and
 * of b in turn and stands at byte `pairsAt`; the results go to byte `outAt`. Four sums side by side, added as (s0 + s1) + (s2 + s3).
 */
export function pairDots(arena: Arena, pairsAt: number, count: number, outAt: number, D: number): void {
  if (arena.kernels) {
    arena.kernels.dots(pairsAt, count, outAt, 8 * D);
    return;
  }
  const pairs = new Int32Array(arena.buffer, pairsAt, 2 * count);
  const doubles = new Float64Array(arena.buffer, 0, arena.buffer.byteLength >> 3);
  for (let i = 0; i < count; i++) {
    const a = pairs[2 * i]! >> 3;
    const b = pairs[2 * i + 1]! >> 3;
    let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
    for (let j = 0; j < D; j += 4) {
      s0 += doubles[a + j]! * doubles[b + j]!;
      s1 += doubles[a + j + 1]! * doubles[b + j + 1]!;
      s2 += doubles[a + j + 2]! * doubles[b + j + 2]!;
      s3 += doubles[a + j + 3]! * doubles[b + j + 3]!;
    }
    doubles[(outAt >> 3) + i] = s0 + s1 + (s2 + s3);
  }
}
