// AssemblyScript. Multiplication and addition are rounded one after the other, as in plain TypeScript: the bits agree.

/** acc + a·b for two doubles. */
// @ts-ignore: decorator
@inline
export function accumulate(acc: v128, a: v128, b: v128): v128 {
  return f64x2.add(acc, f64x2.mul(a, b));
}

// @ts-ignore: decorator
@inline
function take(out: usize, at: usize, sum: v128): void {
  v128.store(out + at, f64x2.sub(v128.load(out + at), sum));
}

/**
 * out[i] −= Σ_k a[i][k]·x[k] for four interleaved vectors; addresses and stride in bytes.
 * Tiles of four rows × four vectors are eight registers of two doubles.
 */
export function panel(a: usize, stride: usize, rows: i32, k: i32, x: usize, out: usize): void {
  const end = x + (<usize>k << 5);
  while (rows > 3) {
    let r0 = a, r1 = r0 + stride, r2 = r1 + stride, r3 = r2 + stride;
    let a0 = f64x2.splat(0), a1 = f64x2.splat(0), b0 = f64x2.splat(0), b1 = f64x2.splat(0);
    let c0 = f64x2.splat(0), c1 = f64x2.splat(0), d0 = f64x2.splat(0), d1 = f64x2.splat(0);
    for (let p = x; p < end; p += 32) {
      const x0 = v128.load(p), x1 = v128.load(p, 16);
      let t = v128.load64_splat(r0);
      a0 = accumulate(a0, t, x0); a1 = accumulate(a1, t, x1); r0 += 8;
      t = v128.load64_splat(r1);
      b0 = accumulate(b0, t, x0); b1 = accumulate(b1, t, x1); r1 += 8;
      t = v128.load64_splat(r2);
      c0 = accumulate(c0, t, x0); c1 = accumulate(c1, t, x1); r2 += 8;
      t = v128.load64_splat(r3);
      d0 = accumulate(d0, t, x0); d1 = accumulate(d1, t, x1); r3 += 8;
    }
    take(out, 0, a0); take(out, 16, a1); take(out, 32, b0); take(out, 48, b1);
    take(out, 64, c0); take(out, 80, c1); take(out, 96, d0); take(out, 112, d1);
    a += stride << 2;
    out += 128;
    rows -= 4;
  }
  while (rows > 0) {
    let r = a;
    let a0 = f64x2.splat(0), a1 = f64x2.splat(0);
    for (let p = x; p < end; p += 32) {
      const t = v128.load64_splat(r);
      a0 = accumulate(a0, t, v128.load(p)); a1 = accumulate(a1, t, v128.load(p, 16));
      r += 8;
    }
    take(out, 0, a0); take(out, 16, a1);
    a += stride;
    out += 32;
    rows--;
  }
}
