/** Solves A·x = b in place for a general square matrix. */
export interface Lu {
  solve: (b: Float64Array) => void;
}

/** LU factorisation with row pivoting of `a` (n×n row-major, overwritten). A zero pivot becomes a tiny one, as inverse iteration wants. Cost n³/3. */
export function luFactor(a: Float64Array, n: number): Lu {
  const order = new Int32Array(n);
  for (let k = 0; k < n; k++) {
    let best = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(a[i * n + k]!) > Math.abs(a[best * n + k]!)) best = i;
    order[k] = best;
    if (best !== k) {
      for (let j = 0; j < n; j++) {
        const t = a[k * n + j]!;
        a[k * n + j] = a[best * n + j]!;
        a[best * n + j] = t;
      }
    }
    if (a[k * n + k] === 0) a[k * n + k] = Number.EPSILON;
    const pivot = a[k * n + k]!;
    for (let i = k + 1; i < n; i++) {
      const factor = a[i * n + k]! / pivot;
      a[i * n + k] = factor;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) a[i * n + j]! -= factor * a[k * n + j]!;
    }
  }
  return {
    solve: (b) => {
      for (let k = 0; k < n; k++) {
        const t = b[order[k]!]!;
        b[order[k]!] = b[k]!;
        b[k] = t;
      }
      for (let i = 1; i < n; i++) {
        let s = b[i]!;
        for (let j = 0; j < i; j++) s -= a[i * n + j]! * b[j]!;
        b[i] = s;
      }
      for (let i = n - 1; i >= 0; i--) {
        let s = b[i]!;
        for (let j = i + 1; j < n; j++) s -= a[i * n + j]! * b[j]!;
        b[i] = s / a[i * n + i]!;
      }
    },
  };
}
