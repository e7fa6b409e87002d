import { openArena, type Arena } from '#shared/linalg/wasm/arena.ts';

/** Rows taken together. */
const TILE = 16;

/** A square matrix kept by columns for out += A·x on one vector at a time. Cost n² multiply-adds. */
export class ColumnStore {
  /** The vector that is read, length n. */
  readonly x: Float64Array;
  /** The vector that is added to, length n. */
  readonly out: Float64Array;
  private readonly arena: Arena;
  private readonly n: number;
  private readonly height: number;
  private readonly columns: Float64Array;
  private readonly sums: Float64Array;

  /** @param a n×n row-major */
  constructor(a: Float64Array, n: number, plain = false) {
    this.n = n;
    this.height = TILE * Math.ceil(n / TILE);
    const size = n * this.height;
    this.arena = openArena((size + 2 * this.height) * 8, plain);
    this.columns = new Float64Array(this.arena.buffer, 0, size);
    this.x = new Float64Array(this.arena.buffer, size * 8, n);
    this.out = new Float64Array(this.arena.buffer, (size + this.height) * 8, n);
    this.sums = new Float64Array(this.height);
    for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) this.columns[j * this.height + i] = a[i * n + j]!;
  }

  addProduct(): void {
    const { arena, n, height, columns, x, out, sums } = this;
    if (arena.kernels) {
      arena.kernels.columns(0, n, height * 8, n * height * 8, (n + 1) * height * 8);
      return;
    }
    sums.fill(0);
    for (let j = 0; j < n; j++) {
      const v = x[j]!;
      for (let i = 0; i < n; i++) sums[i]! += columns[j * height + i]! * v;
    }
    for (let i = 0; i < n; i++) out[i]! += sums[i]!;
  }
}
