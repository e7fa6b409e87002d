/** A square complex matrix of order n; `re` and `im` row-major, length n². */
export interface ComplexSquare {
  n: number;
  re: Float64Array;
  im: Float64Array;
}

export function complexSquare(n: number): ComplexSquare {
  return { n, re: new Float64Array(n * n), im: new Float64Array(n * n) };
}

/** From rows of [re, im] pairs; the caller has checked that they are square. */
export function complexFromRows(rows: readonly (readonly (readonly [number, number])[])[]): ComplexSquare {
  const n = rows.length;
  const out = complexSquare(n);
  rows.forEach((row, i) => row.forEach(([re, im], j) => {
    out.re[i * n + j] = re;
    out.im[i * n + j] = im;
  }));
  return out;
}

/** The product a·b. Cost n³ complex multiplications. */
export function complexMultiply(a: ComplexSquare, b: ComplexSquare): ComplexSquare {
  const n = a.n;
  const out = complexSquare(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const ar = a.re[i * n + k]!, ai = a.im[i * n + k]!, br = b.re[k * n + j]!, bi = b.im[k * n + j]!;
        re += ar * br - ai * bi;
        im += ar * bi + ai * br;
      }
      out.re[i * n + j] = re;
      out.im[i * n + j] = im;
    }
  }
  return out;
}

/** The conjugate transpose. */
export function adjoint(a: ComplexSquare): ComplexSquare {
  const n = a.n;
  const out = complexSquare(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      out.re[j * n + i] = a.re[i * n + j]!;
      out.im[j * n + i] = -a.im[i * n + j]!;
    }
  }
  return out;
}

/** Largest |(UU†  − 1)_ij|: 0 for a unitary. */
export function unitarityDefect(u: ComplexSquare): number {
  const p = complexMultiply(u, adjoint(u));
  let worst = 0;
  for (let i = 0; i < u.n; i++) {
    for (let j = 0; j < u.n; j++) {
      const re = p.re[i * u.n + j]! - (i === j ? 1 : 0);
      const im = p.im[i * u.n + j]!;
      worst = Math.max(worst, Math.abs(re), Math.abs(im));
    }
  }
  return worst;
}

/**
 * The nearest unitary of a matrix that is unitary to 1e-9, by one Newton–Schulz step U(3 − U†U)/2.
 * The defect is squared, so what is left is below rounding: a unitary typed with ten digits then gives
 * an exactly trace-preserving map.
 */
export function polishUnitary(u: ComplexSquare): ComplexSquare {
  const n = u.n;
  const h = complexMultiply(adjoint(u), u);
  for (let i = 0; i < n * n; i++) {
    h.re[i] = (i % (n + 1) === 0 ? 1.5 : 0) - h.re[i]! / 2;
    h.im[i] = -h.im[i]! / 2;
  }
  return complexMultiply(u, h);
}
