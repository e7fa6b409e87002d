// AssemblyScript.
import { accumulate } from './panel.ts';

/**
 * y = A·x for one group of four interleaved vectors. `start` holds the first entry of each row, `index` byte offsets 32·column.
 */
export function sparse1(start: usize, index: usize, value: usize, rows: i32, x: usize, y: usize): void {
  while (rows > 0) {
    const end = <usize>load<i32>(start, 4);
    let a0 = f64x2.splat(0), a1 = f64x2.splat(0);
    for (let entry = <usize>load<i32>(start); entry < end; entry++) {
      const v = v128.load64_splat(value + (entry << 3));
      const p = x + <usize>load<i32>(index + (entry << 2));
      a0 = accumulate(a0, v, v128.load(p)); a1 = accumulate(a1, v, v128.load(p, 16));
    }
    v128.store(y, a0); v128.store(y, a1, 16);
    start += 4;
    y += 32;
    rows--;
  }
}

/** Four such groups at once, xGroup and yGroup bytes apart: eight sums hide the latency of an addition. */
export function sparse4(start: usize, index: usize, value: usize, rows: i32, x: usize, y: usize, xGroup: usize, yGroup: usize): void {
  while (rows > 0) {
    const end = <usize>load<i32>(start, 4);
    let a0 = f64x2.splat(0), a1 = f64x2.splat(0), b0 = f64x2.splat(0), b1 = f64x2.splat(0);
    let c0 = f64x2.splat(0), c1 = f64x2.splat(0), d0 = f64x2.splat(0), d1 = f64x2.splat(0);
    for (let entry = <usize>load<i32>(start); entry < end; entry++) {
      const v = v128.load64_splat(value + (entry << 3));
      let p = x + <usize>load<i32>(index + (entry << 2));
      a0 = accumulate(a0, v, v128.load(p)); a1 = accumulate(a1, v, v128.load(p, 16));
      p += xGroup;
      b0 = accumulate(b0, v, v128.load(p)); b1 = accumulate(b1, v, v128.load(p, 16));
      p += xGroup;
      c0 = accumulate(c0, v, v128.load(p)); c1 = accumulate(c1, v, v128.load(p, 16));
      p += xGroup;
      d0 = accumulate(d0, v, v128.load(p)); d1 = accumulate(d1, v, v128.load(p, 16));
    }
    let q = y;
    v128.store(q, a0); v128.store(q, a1, 16);
    q += yGroup;
    v128.store(q, b0); v128.store(q, b1, 16);
    q += yGroup;
    v128.store(q, c0); v128.store(q, c1, 16);
    q += yGroup;
    v128.store(q, d0); v128.store(q, d1, 16);
    start += 4;
    y += 32;
    rows--;
  }
}
