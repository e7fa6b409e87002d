/** A = Q·R by Householder reflections: R upper triangular n×n (row-major), Q applied on demand. */
export interface Qr {
  r: Float64Array;
  /** Q·x for x of length n: length m. */
  applyQ: (x: Float64Array) => Float64Array;
  /** The first n elements of Qᵀ·y for y of length m. */
  applyQt: (y: Float64Array) => Float64Array;
}

/**
 * Householder QR of a dense m×n matrix, m ≥ n, row-major. Columns are worked on in a transposed copy so that every
 * pass runs along memory. Backward stable; no pivoting, so it decides no rank. Cost n²(m − n/3).
 */
export function householderQr(a: Float64Array, m: number, n: number): Qr {
  const columns = new Float64Array(n * m);
  for (let i = 0; i < m; i++) for (let j = 0; j < n; j++) columns[j * m + i] = a[i * n + j]!;
  const beta = new Float64Array(n);
  const r = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    const at = j * m;
    let tail = 0;
    for (let i = j; i < m; i++) tail += columns[at + i]! * columns[at + i]!;
    const head = columns[at + j]!;
    const alpha = head > 0 ? -Math.sqrt(tail) : Math.sqrt(tail);
    r[j * n + j] = alpha;
    if (tail === 0) continue;
    columns[at + j] = head - alpha;
    beta[j] = 1 / (tail - head * alpha);
    for (let c = j + 1; c < n; c++) reflect(columns, at, beta[j]!, columns, c * m, j, m);
  }
  for (let j = 0; j < n; j++) for (let i = 0; i < j; i++) r[i * n + j] = columns[j * m + i]!;
  return {
    r,
    applyQ: (x) => {
      const y = new Float64Array(m);
      y.set(x);
      for (let j = n - 1; j >= 0; j--) reflect(columns, j * m, beta[j]!, y, 0, j, m);
      return y;
    },
    applyQt: (y) => {
      const x = y.slice();
      for (let j = 0; j < n; j++) reflect(columns, j * m, beta[j]!, x, 0, j, m);
      return x.slice(0, n);
    },
  };
}

/** x −= β·(v·x)·v over elements from … to. */
function reflect(v: Float64Array, vAt: number, beta: number, x: Float64Array, xAt: number, from: number, to: number): void {
  let dot = 0;
  for (let i = from; i < to; i++) dot += v[vAt + i]! * x[xAt + i]!;
  const s = beta * dot;
  if (s === 0) return;
  for (let i = from; i < to; i++) x[xAt + i]! -= s * v[vAt + i]!;
}
