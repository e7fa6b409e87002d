/**
 * states[t] = G·states[parent[t]] for nodes from … to, all with the same map: a product of one D×D matrix (row-major at
 * `gAt` of `g`) with many vectors of length D stored one after another. The first row of G is (1, 0, …), so component 0 is
 * copied. D − 1 is a multiple of three for D = 4ⁿ: tiles of 3 rows × 4 vectors stay in registers.
 */
export function advanceNodes(g: Float64Array, gAt: number, D: number, states: Float64Array, parent: Int32Array, from: number, to: number): void {
  let t = from;
  for (; t + 3 < to; t += 4) {
    const p0 = parent[t]! * D, p1 = parent[t + 1]! * D, p2 = parent[t + 2]! * D, p3 = parent[t + 3]! * D;
    const q0 = t * D, q1 = q0 + D, q2 = q1 + D, q3 = q2 + D;
    states[q0] = states[p0]!;
    states[q1] = states[p1]!;
    states[q2] = states[p2]!;
    states[q3] = states[p3]!;
    for (let i = 1; i < D; i += 3) {
      const r0 = gAt + i * D, r1 = r0 + D, r2 = r1 + D;
      let a0 = 0, a1 = 0, a2 = 0, a3 = 0, b0 = 0, b1 = 0, b2 = 0, b3 = 0, c0 = 0, c1 = 0, c2 = 0, c3 = 0;
      for (let j = 0; j < D; j++) {
        const u = g[r0 + j]!, v = g[r1 + j]!, w = g[r2 + j]!;
        const x0 = states[p0 + j]!, x1 = states[p1 + j]!, x2 = states[p2 + j]!, x3 = states[p3 + j]!;
        a0 += u * x0; a1 += u * x1; a2 += u * x2; a3 += u * x3;
        b0 += v * x0; b1 += v * x1; b2 += v * x2; b3 += v * x3;
        c0 += w * x0; c1 += w * x1; c2 += w * x2; c3 += w * x3;
      }
      states[q0 + i] = a0; states[q1 + i] = a1; states[q2 + i] = a2; states[q3 + i] = a3;
      states[q0 + i + 1] = b0; states[q1 + i + 1] = b1; states[q2 + i + 1] = b2; states[q3 + i + 1] = b3;
      states[q0 + i + 2] = c0; states[q1 + i + 2] = c1; states[q2 + i + 2] = c2; states[q3 + i + 2] = c3;
    }
  }
  for (; t < to; t++) {
    const p = parent[t]! * D;
    const q = t * D;
    states[q] = states[p]!;
    for (let i = 1; i < D; i++) {
      const r = gAt + i * D;
      let s = 0;
      for (let j = 0; j < D; j++) s += g[r + j]! * states[p + j]!;
      states[q + i] = s;
    }
  }
}
