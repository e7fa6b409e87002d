// AssemblyScript.
import { accumulate } from './panel.ts';

// @ts-ignore: decorator
@inline
function add(out: usize, at: usize, sum: v128): void {
  v128.store(out + at, f64x2.add(v128.load(out + at), sum));
}

/** out += A·x, A stored by n columns of `height` bytes, a multiple of 128; sixteen rows at a time. */
export function columns(a: usize, n: i32, height: usize, x: usize, out: usize): void {
  const stop = a + height;
  const end = x + (<usize>n << 3);
  for (; a < stop; a += 128, out += 128) {
    let s0 = f64x2.splat(0), s1 = f64x2.splat(0), s2 = f64x2.splat(0), s3 = f64x2.splat(0);
    let s4 = f64x2.splat(0), s5 = f64x2.splat(0), s6 = f64x2.splat(0), s7 = f64x2.splat(0);
    let p = a;
    for (let q = x; q < end; q += 8, p += height) {
      const v = v128.load64_splat(q);
      s0 = accumulate(s0, v128.load(p), v); s1 = accumulate(s1, v128.load(p, 16), v);
      s2 = accumulate(s2, v128.load(p, 32), v); s3 = accumulate(s3, v128.load(p, 48), v);
      s4 = accumulate(s4, v128.load(p, 64), v); s5 = accumulate(s5, v128.load(p, 80), v);
      s6 = accumulate(s6, v128.load(p, 96), v); s7 = accumulate(s7, v128.load(p, 112), v);
    }
    add(out, 0, s0); add(out, 16, s1); add(out, 32, s2); add(out, 48, s3);
    add(out, 64, s4); add(out, 80, s5); add(out, 96, s6); add(out, 112, s7);
  }
}
