// AssemblyScript.

/** m·x for element k of a row of the map and four positions' worth (two here) of inputs. */
// @ts-ignore: decorator
@inline
function term(row: usize, x: usize, k: usize): v128 {
  return f64x2.mul(v128.load64_splat(row + (k << 3)), v128.load(x + (k << 5)));
}

/**
 * The 16×16 map at `map` (row-major) on two digits of a vector over Paulis, in place. `rest` holds `count` byte offsets, a
 * multiple of four, at which both digits are zero; the digits are `si` and `sj` bytes apart. `scratch` has room for 64 doubles.
 * Four positions at a time; the sums are those of the plain code, four products before they join.
 */
export function applyTwo(v: usize, rest: usize, count: i32, si: usize, sj: usize, map: usize, scratch: usize): void {
  const end = scratch + 512;
  for (; count > 0; count -= 4, rest += 16) {
    const p0 = v + <usize>load<i32>(rest), p1 = v + <usize>load<i32>(rest, 4), p2 = v + <usize>load<i32>(rest, 8), p3 = v + <usize>load<i32>(rest, 12);
    let to = scratch;
    for (let i: usize = 0; i < 4; i++) {
      let at = i * si;
      for (let j: usize = 0; j < 4; j++, at += sj, to += 32) {
        store<f64>(to, load<f64>(p0 + at));
        store<f64>(to, load<f64>(p1 + at), 8);
        store<f64>(to, load<f64>(p2 + at), 16);
        store<f64>(to, load<f64>(p3 + at), 24);
      }
    }
    let row = map;
    for (let i: usize = 0; i < 4; i++) {
      let at = i * si;
      for (let j: usize = 0; j < 4; j++, at += sj) {
        let low = f64x2.splat(0), high = f64x2.splat(0);
        for (let x = scratch; x < end; x += 128, row += 32) {
          low = f64x2.add(low, f64x2.add(f64x2.add(f64x2.add(term(row, x, 0), term(row, x, 1)), term(row, x, 2)), term(row, x, 3)));
          const y = x + 16;
          high = f64x2.add(high, f64x2.add(f64x2.add(f64x2.add(term(row, y, 0), term(row, y, 1)), term(row, y, 2)), term(row, y, 3)));
        }
        store<f64>(p0 + at, f64x2.extract_lane(low, 0));
        store<f64>(p1 + at, f64x2.extract_lane(low, 1));
        store<f64>(p2 + at, f64x2.extract_lane(high, 0));
        store<f64>(p3 + at, f64x2.extract_lane(high, 1));
      }
    }
  }
}

/** The 4×4 map at `map` on one digit, in place: `size` bytes in all, the digit `stride` bytes apart, a multiple of 16. */
export function applyOne(v: usize, size: usize, stride: usize, map: usize): void {
  const end = v + size;
  for (let block = v; block < end; block += stride << 2) {
    const stop = block + stride;
    for (let p = block; p < stop; p += 16) {
      const q = p + stride, r = q + stride, s = r + stride;
      const a = v128.load(p), b = v128.load(q), c = v128.load(r), e = v128.load(s);
      let row = map;
      for (let out = p; out <= s; out += stride, row += 32) {
        v128.store(out, f64x2.add(f64x2.add(f64x2.add(
          f64x2.mul(v128.load64_splat(row), a), f64x2.mul(v128.load64_splat(row, 8), b)), f64x2.mul(v128.load64_splat(row, 16), c)), f64x2.mul(v128.load64_splat(row, 24), e)));
      }
    }
  }
}
