/** A complex matrix, row-major. Its size is small (2 to 9) for gates, at most 32 × 32 for five qubits. */
export interface Matrix {
  rows: number;
  columns: number;
  re: Float64Array;
  im: Float64Array;
}

export function zeros(rows: number, columns = rows): Matrix {
  return { rows, columns, re: new Float64Array(rows * columns), im: new Float64Array(rows * columns) };
}

/** From rows of [re, im] pairs. */
export function fromPairs(pairs: readonly (readonly (readonly [number, number])[])[]): Matrix {
  const out = zeros(pairs.length, pairs[0]?.length ?? 0);
  pairs.flat().forEach(([re, im], i) => {
    out.re[i] = re;
    out.im[i] = im;
  });
  return out;
}

export function identity(size: number): Matrix {
  const out = zeros(size);
  for (let i = 0; i < size; i += 1) out.re[i * size + i] = 1;
  return out;
}

/** The matrix times (re + i im). */
export function scale(a: Matrix, re: number, im = 0): Matrix {
  const out = zeros(a.rows, a.columns);
  for (let i = 0; i < a.re.length; i += 1) {
    out.re[i] = a.re[i]! * re - a.im[i]! * im;
    out.im[i] = a.re[i]! * im + a.im[i]! * re;
  }
  return out;
}

export function add(a: Matrix, b: Matrix): Matrix {
  return { ...a, re: a.re.map((x, i) => x + b.re[i]!), im: a.im.map((x, i) => x + b.im[i]!) };
}

export function multiply(a: Matrix, b: Matrix): Matrix {
  const out = zeros(a.rows, b.columns);
  for (let i = 0; i < a.rows; i += 1) {
    for (let k = 0; k < a.columns; k += 1) {
      const ar = a.re[i * a.columns + k]!;
      const ai = a.im[i * a.columns + k]!;
      for (let j = 0; j < b.columns; j += 1) {
        const at = i * b.columns + j;
        const br = b.re[k * b.columns + j]!;
        const bi = b.im[k * b.columns + j]!;
        out.re[at] = out.re[at]! + ar * br - ai * bi;
        out.im[at] = out.im[at]! + ar * bi + ai * br;
      }
    }
  }
  return out;
}

export function adjoint(a: Matrix): Matrix {
  const out = zeros(a.columns, a.rows);
  for (let i = 0; i < a.rows; i += 1) {
    for (let j = 0; j < a.columns; j += 1) {
      out.re[j * a.rows + i] = a.re[i * a.columns + j]!;
      out.im[j * a.rows + i] = -a.im[i * a.columns + j]!;
    }
  }
  return out;
}

/** Tensor product, the first factor most significant. */
export function kron(a: Matrix, b: Matrix): Matrix {
  const out = zeros(a.rows * b.rows, a.columns * b.columns);
  for (let i = 0; i < out.rows; i += 1) {
    for (let j = 0; j < out.columns; j += 1) {
      const p = Math.floor(i / b.rows) * a.columns + Math.floor(j / b.columns);
      const q = (i % b.rows) * b.columns + (j % b.columns);
      out.re[i * out.columns + j] = a.re[p]! * b.re[q]! - a.im[p]! * b.im[q]!;
      out.im[i * out.columns + j] = a.re[p]! * b.im[q]! + a.im[p]! * b.re[q]!;
    }
  }
  return out;
}

export function trace(a: Matrix): [number, number] {
  let re = 0;
  let im = 0;
  for (let i = 0; i < a.rows; i += 1) {
    re += a.re[i * a.columns + i]!;
    im += a.im[i * a.columns + i]!;
  }
  return [re, im];
}
