/** A sparse matrix by rows: the entries of row i are start[i] … start[i + 1) of `index` (column) and `value`. */
export interface SparseRows {
  rows: number;
  columns: number;
  start: Int32Array;
  index: Int32Array;
  value: Float64Array;
}

/** Collects rows one at a time from a dense scratch row; exact zeros are left out. */
export class SparseBuilder {
  private readonly columns: number;
  private start: number[] = [0];
  private index = new Int32Array(1024);
  private value = new Float64Array(1024);
  private size = 0;

  constructor(columns: number) {
    this.columns = columns;
  }

  /** Takes over the row and sets it back to zero. */
  push(row: Float64Array): void {
    if (this.size + this.columns > this.index.length) this.grow();
    for (let j = 0; j < this.columns; j++) {
      const v = row[j]!;
      if (v === 0) continue;
      this.index[this.size] = j;
      this.value[this.size++] = v;
    }
    row.fill(0);
    this.start.push(this.size);
  }

  private grow(): void {
    const length = 2 * this.index.length + this.columns;
    const index = new Int32Array(length);
    index.set(this.index);
    const value = new Float64Array(length);
    value.set(this.value);
    this.index = index;
    this.value = value;
  }

  build(): SparseRows {
    return { rows: this.start.length - 1, columns: this.columns, start: Int32Array.from(this.start), index: this.index.slice(0, this.size), value: this.value.slice(0, this.size) };
  }
}

/** The transpose, rows and their entries in ascending order. Cost: one pass over the entries. */
export function transposeSparse(a: SparseRows): SparseRows {
  const start = new Int32Array(a.columns + 1);
  const size = a.start[a.rows]!;
  for (let e = 0; e < size; e++) start[a.index[e]! + 1]!++;
  for (let j = 0; j < a.columns; j++) start[j + 1]! += start[j]!;
  const next = start.slice();
  const index = new Int32Array(size);
  const value = new Float64Array(size);
  for (let i = 0; i < a.rows; i++) {
    for (let e = a.start[i]!; e < a.start[i + 1]!; e++) {
      const place = next[a.index[e]!]!++;
      index[place] = i;
      value[place] = a.value[e]!;
    }
  }
  return { rows: a.columns, columns: a.rows, start, index, value };
}

/** Dense copy, row-major. */
export function toDense(a: SparseRows): Float64Array {
  const out = new Float64Array(a.rows * a.columns);
  for (let i = 0; i < a.rows; i++) {
    for (let e = a.start[i]!; e < a.start[i + 1]!; e++) out[i * a.columns + a.index[e]!] = a.value[e]!;
  }
  return out;
}

/** y = A·x for one vector. */
export function multiplyVector(a: SparseRows, x: Float64Array, y: Float64Array): void {
  for (let i = 0; i < a.rows; i++) {
    let sum = 0;
    for (let e = a.start[i]!; e < a.start[i + 1]!; e++) sum += a.value[e]! * x[a.index[e]!]!;
    y[i] = sum;
  }
}

/**
 * Y = A·X for four vectors at once, interleaved: x[4j + l] is element j of vector l. `xOffset` and `yOffset` are where
 * the group of four starts. Cost 4 multiply-adds an entry.
 */
export function multiplyFour(a: SparseRows, x: Float64Array, xOffset: number, y: Float64Array, yOffset: number): void {
  const { start, index, value } = a;
  for (let i = 0; i < a.rows; i++) {
    let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
    const end = start[i + 1]!;
    for (let e = start[i]!; e < end; e++) {
      const v = value[e]!;
      const p = xOffset + 4 * index[e]!;
      s0 += v * x[p]!;
      s1 += v * x[p + 1]!;
      s2 += v * x[p + 2]!;
      s3 += v * x[p + 3]!;
    }
    const q = yOffset + 4 * i;
    y[q] = s0;
    y[q + 1] = s1;
    y[q + 2] = s2;
    y[q + 3] = s3;
  }
}
