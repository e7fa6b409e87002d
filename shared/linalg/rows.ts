/** Row arrays of a row-major matrix, as ml-matrix takes them. */
export function toRows(a: Float64Array, rows: number, columns: number): number[][] {
  return Array.from({ length: rows }, (_, i) => Array.from(a.subarray(i * columns, (i + 1) * columns)));
}
