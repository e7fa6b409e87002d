// AssemblyScript.
import { accumulate } from './panel.ts';

/**
 * out[i] = a·b for vectors of `bytes` bytes whose addresses are pairs[2i], pairs[2i + 1]; four sums side by side, added as
 * (s0 + s1) + (s2 + s3).
 */
export function dots(pairs: usize, count: i32, out: usize, bytes: usize): void {
  while (count > 0) {
    let a = <usize>load<i32>(pairs), b = <usize>load<i32>(pairs, 4);
    const end = a + bytes;
    let low = f64x2.splat(0), high = f64x2.splat(0);
    for (; a < end; a += 32, b += 32) {
      low = accumulate(low, v128.load(a), v128.load(b));
      high = accumulate(high, v128.load(a, 16), v128.load(b, 16));
    }
    const sum = f64x2.extract_lane(low, 0) + f64x2.extract_lane(low, 1) + (f64x2.extract_lane(high, 0) + f64x2.extract_lane(high, 1));
    store<f64>(out, sum);
    pairs += 8;
    out += 8;
    count--;
  }
}
