/**
 * out[i] −= Σ_{k0 ≤ k < k1} a[i][k]·x[k] for rows i0 … i1 of a row-major matrix of `stride` columns at `aAt` of `a` and four vectors
 * interleaved in x (element k of vector l at xOffset + 4k + l) and out alike. The order of additions is fixed, so every
 * engine gives the same bits. Tiles of 3 rows × 4 vectors stay in registers.
 */
export function subtractPanel(a: Float64Array, aAt: number, stride: number, i0: number, i1: number, k0: number, k1: number, x: Float64Array, xOffset: number, out: Float64Array, outOffset: number): void {
  let i = i0;
  for (; i + 2 < i1; i += 3) {
    let r0 = aAt + i * stride + k0, r1 = r0 + stride, r2 = r1 + stride;
    let a0 = 0, a1 = 0, a2 = 0, a3 = 0, b0 = 0, b1 = 0, b2 = 0, b3 = 0, c0 = 0, c1 = 0, c2 = 0, c3 = 0;
    const end = xOffset + 4 * k1;
    for (let p = xOffset + 4 * k0; p < end; p += 4) {
      const x0 = x[p]!, x1 = x[p + 1]!, x2 = x[p + 2]!, x3 = x[p + 3]!;
      const u = a[r0++]!, v = a[r1++]!, w = a[r2++]!;
      a0 += u * x0; a1 += u * x1; a2 += u * x2; a3 += u * x3;
      b0 += v * x0; b1 += v * x1; b2 += v * x2; b3 += v * x3;
      c0 += w * x0; c1 += w * x1; c2 += w * x2; c3 += w * x3;
    }
    const o = outOffset + 4 * i;
    out[o]! -= a0; out[o + 1]! -= a1; out[o + 2]! -= a2; out[o + 3]! -= a3;
    out[o + 4]! -= b0; out[o + 5]! -= b1; out[o + 6]! -= b2; out[o + 7]! -= b3;
    out[o + 8]! -= c0; out[o + 9]! -= c1; out[o + 10]! -= c2; out[o + 11]! -= c3;
  }
  for (; i < i1; i++) {
    let r = aAt + i * stride + k0;
    let a0 = 0, a1 = 0, a2 = 0, a3 = 0;
    const end = xOffset + 4 * k1;
    for (let p = xOffset + 4 * k0; p < end; p += 4) {
      const u = a[r++]!;
      a0 += u * x[p]!; a1 += u * x[p + 1]!; a2 += u * x[p + 2]!; a3 += u * x[p + 3]!;
    }
    const o = outOffset + 4 * i;
    out[o]! -= a0; out[o + 1]! -= a1; out[o + 2]! -= a2; out[o + 3]! -= a3;
  }
}
