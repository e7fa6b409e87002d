// AssemblyScript.
import { accumulate } from './panel.ts';

/**
 * Vector t = G·vector parent[t] for t from … to, 16 components each, G stored by columns at byte g; `parent` is the byte
 * address of 32-bit indices. Two vectors at a time, eight rows of each in registers: the lower half of G, then the upper.
 */
export function advance16(g: usize, vectors: usize, parent: usize, from: i32, to: i32): void {
  const half = g + 128;
  for (; from + 1 < to; from += 2) {
    const at = parent + (<usize>from << 2);
    let out = vectors + (<usize>from << 7);
    for (let rows = g; rows < half; rows += 64, out += 64) {
      let p = vectors + (<usize>load<i32>(at) << 7), q = vectors + (<usize>load<i32>(at, 4) << 7);
      let a0 = f64x2.splat(0), a1 = f64x2.splat(0), a2 = f64x2.splat(0), a3 = f64x2.splat(0);
      let b0 = f64x2.splat(0), b1 = f64x2.splat(0), b2 = f64x2.splat(0), b3 = f64x2.splat(0);
      const end = rows + 2048;
      for (let column = rows; column < end; column += 128) {
        const s = v128.load64_splat(p), t = v128.load64_splat(q);
        p += 8;
        q += 8;
        let m = v128.load(column);
        a0 = accumulate(a0, m, s); b0 = accumulate(b0, m, t);
        m = v128.load(column, 16);
        a1 = accumulate(a1, m, s); b1 = accumulate(b1, m, t);
        m = v128.load(column, 32);
        a2 = accumulate(a2, m, s); b2 = accumulate(b2, m, t);
        m = v128.load(column, 48);
        a3 = accumulate(a3, m, s); b3 = accumulate(b3, m, t);
      }
      v128.store(out, a0); v128.store(out, a1, 16); v128.store(out, a2, 32); v128.store(out, a3, 48);
      v128.store(out, b0, 128); v128.store(out, b1, 144); v128.store(out, b2, 160); v128.store(out, b3, 176);
    }
  }
  if (from < to) {
    let out = vectors + (<usize>from << 7);
    for (let rows = g; rows < half; rows += 64, out += 64) {
      let p = vectors + (<usize>load<i32>(parent + (<usize>from << 2)) << 7);
      let a0 = f64x2.splat(0), a1 = f64x2.splat(0), a2 = f64x2.splat(0), a3 = f64x2.splat(0);
      const end = rows + 2048;
      for (let column = rows; column < end; column += 128) {
        const s = v128.load64_splat(p);
        p += 8;
        a0 = accumulate(a0, v128.load(column), s); a1 = accumulate(a1, v128.load(column, 16), s);
        a2 = accumulate(a2, v128.load(column, 32), s); a3 = accumulate(a3, v128.load(column, 48), s);
      }
      v128.store(out, a0); v128.store(out, a1, 16); v128.store(out, a2, 32); v128.store(out, a3, 48);
    }
  }
}

/** The same for four components: all of G stays in registers. */
export function advance4(g: usize, vectors: usize, parent: usize, from: i32, to: i32): void {
  const g00 = v128.load(g), g01 = v128.load(g, 16), g10 = v128.load(g, 32), g11 = v128.load(g, 48);
  const g20 = v128.load(g, 64), g21 = v128.load(g, 80), g30 = v128.load(g, 96), g31 = v128.load(g, 112);
  for (; from < to; from++) {
    const p = vectors + (<usize>load<i32>(parent + (<usize>from << 2)) << 5), out = vectors + (<usize>from << 5);
    let low = f64x2.splat(0), high = f64x2.splat(0);
    let s = v128.load64_splat(p);
    low = accumulate(low, g00, s); high = accumulate(high, g01, s);
    s = v128.load64_splat(p, 8);
    low = accumulate(low, g10, s); high = accumulate(high, g11, s);
    s = v128.load64_splat(p, 16);
    low = accumulate(low, g20, s); high = accumulate(high, g21, s);
    s = v128.load64_splat(p, 24);
    low = accumulate(low, g30, s); high = accumulate(high, g31, s);
    v128.store(out, low); v128.store(out, high, 16);
  }
}
