/**
 * vectors[t] = G·vectors[parent[t]] for t from … to, all with the same map: a product of one D×D matrix, stored by columns at
 * `gAt` of `g`, with many vectors of length D stored one after another. The first row of G is (1, 0, …), so component 0 is
 * copied. D − 1 is a multiple of three for D = 4ⁿ: tiles of 3 rows × 4 vectors stay in registers.
 */
export function advanceVectors(g: Float64Array, gAt: number, D: number, vectors: Float64Array, parent: Int32Array, from: number, to: number): void {
  let t = from;
  for (; t + 3 < to; t += 4) {
    const p0 = parent[t]! * D, p1 = parent[t + 1]! * D, p2 = parent[t + 2]! * D, p3 = parent[t + 3]! * D;
    const q0 = t * D, q1 = q0 + D, q2 = q1 + D, q3 = q2 + D;
    vectors[q0] = vectors[p0]!;
    vectors[q1] = vectors[p1]!;
    vectors[q2] = vectors[p2]!;
    vectors[q3] = vectors[p3]!;
    for (let i = 1; i < D; i += 3) {
      let a0 = 0, a1 = 0, a2 = 0, a3 = 0, b0 = 0, b1 = 0, b2 = 0, b3 = 0, c0 = 0, c1 = 0, c2 = 0, c3 = 0;
      let r = gAt + i;
      for (let j = 0; j < D; j++) {
        const u = g[r]!, v = g[r + 1]!, w = g[r + 2]!;
        r += D;
        const x0 = vectors[p0 + j]!, x1 = vectors[p1 + j]!, x2 = vectors[p2 + j]!, x3 = vectors[p3 + j]!;
        a0 += u * x0; a1 += u * x1; a2 += u * x2; a3 += u * x3;
        b0 += v * x0; b1 += v * x1; b2 += v * x2; b3 += v * x3;
        c0 += w * x0; c1 += w * x1; c2 += w * x2; c3 += w * x3;
      }
      vectors[q0 + i] = a0; vectors[q1 + i] = a1; vectors[q2 + i] = a2; vectors[q3 + i] = a3;
      vectors[q0 + i + 1] = b0; vectors[q1 + i + 1] = b1; vectors[q2 + i + 1] = b2; vectors[q3 + i + 1] = b3;
      vectors[q0 + i + 2] = c0; vectors[q1 + i + 2] = c1; vectors[q2 + i + 2] = c2; vectors[q3 + i + 2] = c3;
    }
  }
  for (; t < to; t++) {
    const p = parent[t]! * D;
    const q = t * D;
    vectors[q] = vectors[p]!;
    for (let i = 1; i < D; i++) {
      let s = 0;
      for (let j = 0; j < D; j++) s += g[gAt + j * D + i]! * vectors[p + j]!;
      vectors[q + i] = s;
    }
  }
}
