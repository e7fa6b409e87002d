import { multiplyFour, type SparseRows } from '#shared/linalg/sparse.ts';
import { openArena, type Arena } from '#shared/linalg/wasm/arena.ts';
import { WIDE } from '#shared/linalg/wasm/kernels.ts';

/** Groups of four vectors that are held at once. */
const MOST_GROUPS = 16;

/** Y = A·X for a sparse A that is used again and again, on groups of four interleaved vectors. */
export class SparseProduct {
  private readonly matrix: SparseRows;
  private readonly arena: Arena;
  private readonly x: Float64Array;
  private readonly y: Float64Array;
  private readonly at: { start: number; index: number; value: number; x: number; y: number };

  constructor(matrix: SparseRows, plain = false) {
    this.matrix = matrix;
    const { rows, columns, start, index, value } = matrix;
    const x = value.length * 8;
    const y = x + MOST_GROUPS * columns * 32;
    const startAt = y + MOST_GROUPS * rows * 32;
    const indexAt = startAt + start.length * 4;
    this.at = { value: 0, x, y, start: startAt, index: indexAt };
    this.arena = openArena(indexAt + index.length * 4, plain);
    const { buffer } = this.arena;
    new Float64Array(buffer, 0, value.length).set(value);
    new Int32Array(buffer, startAt, start.length).set(start);
    const offsets = new Int32Array(buffer, indexAt, index.length);
    for (let e = 0; e < index.length; e++) offsets[e] = 32 * index[e]!;
    this.x = new Float64Array(buffer, x, MOST_GROUPS * columns * 4);
    this.y = new Float64Array(buffer, y, MOST_GROUPS * rows * 4);
  }

  /** Reads `groups` groups of columns×4 from x, writes groups of rows×4 to y. Cost 4 multiply-adds an entry and group. */
  apply(x: Float64Array, y: Float64Array, groups: number): void {
    const { rows, columns } = this.matrix;
    for (let from = 0; from < groups; from += MOST_GROUPS) {
      const here = Math.min(MOST_GROUPS, groups - from);
      this.x.set(x.subarray(from * columns * 4, (from + here) * columns * 4));
      this.applyHeld(here);
      y.set(this.y.subarray(0, here * rows * 4), from * rows * 4);
    }
  }

  private applyHeld(groups: number): void {
    const { kernels } = this.arena;
    const { rows, columns } = this.matrix;
    const { at } = this;
    if (!kernels) {
      for (let g = 0; g < groups; g++) multiplyFour(this.matrix, this.x, g * columns * 4, this.y, g * rows * 4);
      return;
    }
    let g = 0;
    for (; g + WIDE <= groups; g += WIDE) kernels.sparse4(at.start, at.index, at.value, rows, at.x + g * columns * 32, at.y + g * rows * 32, columns * 32, rows * 32);
    for (; g < groups; g++) kernels.sparse1(at.start, at.index, at.value, rows, at.x + g * columns * 32, at.y + g * rows * 32);
  }
}
