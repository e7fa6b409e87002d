import ln from '@stdlib/math-base-special-ln';
import type { SparseRows } from '#shared/linalg/sparse.ts';
import type { Frequencies } from '#shared/method/frequencies.ts';

/**
 * Below this probability the logarithm is continued by its second-order expansion, because maps that need not be completely
 * positive may predict a little less than zero: a curve that an optimiser can follow, and a tenth of a shot in a thousand.
 */
export const LEAST_PROBABILITY = 1e-4;

/**
 * Multinomial log-likelihood of the counts above that of the frequencies themselves: Σ_c Σ_o n_co ln(p_co/f_co) ≤ 0, in natural
 * units. For p < 1e-4 the logarithm is continued to second order; an outcome that was never seen costs N p²/(2·1e-4) where its
 * probability is negative. Once continuously differentiable and concave in p.
 * @param p circuits × d
 */
export function logLikelihood(counts: Frequencies, p: Float64Array): number {
  const { d, observed, shots } = counts;
  let sum = 0;
  for (let i = 0; i < p.length; i++) {
    const N = shots[Math.floor(i / d)]!;
    const f = observed[i]!;
    const x = p[i]!;
    if (f === 0) {
      if (x < 0) sum -= (N * x * x) / (2 * LEAST_PROBABILITY);
      continue;
    }
    if (x >= LEAST_PROBABILITY) sum += N * f * ln(x / f);
    else {
      const t = (x - LEAST_PROBABILITY) / LEAST_PROBABILITY;
      sum += N * f * (ln(LEAST_PROBABILITY / f) + t - (t * t) / 2);
    }
  }
  return sum;
}

/** Its slope in one probability. */
function slope(N: number, f: number, x: number): number {
  if (f === 0) return x < 0 ? (-N * x) / LEAST_PROBABILITY : 0;
  if (x >= LEAST_PROBABILITY) return (N * f) / x;
  return (N * f * (2 - x / LEAST_PROBABILITY)) / LEAST_PROBABILITY;
}

/** Gradient and Fisher information of the log-likelihood in the parameters, the latter as the rows whose Gram matrix it is. */
export interface Score {
  /** g_j = Σ_co slope·∂p_co/∂e_j. */
  gradient: Float64Array;
  /** Rows √(N_c/p_co)·∂p_co/∂e over all outcomes: F = AᵀA. p below 1e-4 counts as 1e-4. */
  rows: SparseRows;
}

/** @param design ∂p/∂e, row (circuit, outcome < d − 1); the last outcome's row is minus the sum of the others */
export function scoreOf(counts: Frequencies, p: Float64Array, design: SparseRows): Score {
  const { circuits, d, observed, shots } = counts;
  const { columns, start, index, value } = design;
  const gradient = new Float64Array(columns);
  const last = new Float64Array(columns);
  const rows = new RowList(columns, circuits * d, start[design.rows]!);
  for (let c = 0; c < circuits; c++) {
    const N = shots[c]!;
    const end = c * d + d - 1;
    const slopeLast = slope(N, observed[end]!, p[end]!);
    for (let o = 0; o < d - 1; o++) {
      const r = c * (d - 1) + o;
      const i = c * d + o;
      const g = slope(N, observed[i]!, p[i]!) - slopeLast;
      const weight = Math.sqrt(N / Math.max(p[i]!, LEAST_PROBABILITY));
      for (let e = start[r]!; e < start[r + 1]!; e++) {
        const j = index[e]!;
        gradient[j]! += g * value[e]!;
        last[j]! -= value[e]!;
      }
      rows.push(index, value, start[r]!, start[r + 1]!, weight);
    }
    rows.pushDense(last, Math.sqrt(N / Math.max(p[end]!, LEAST_PROBABILITY)));
  }
  return { gradient, rows: rows.build() };
}

/** Sparse rows of which the number and about the size are known beforehand. */
class RowList {
  private readonly columns: number;
  private readonly start: Int32Array;
  private index: Int32Array;
  private value: Float64Array;
  private count = 0;
  private size = 0;

  constructor(columns: number, rows: number, entries: number) {
    this.columns = columns;
    this.start = new Int32Array(rows + 1);
    this.index = new Int32Array(2 * entries + columns);
    this.value = new Float64Array(2 * entries + columns);
  }

  push(index: Int32Array, value: Float64Array, from: number, to: number, weight: number): void {
    for (let e = from; e < to; e++) {
      this.index[this.size] = index[e]!;
      this.value[this.size++] = weight * value[e]!;
    }
    this.start[++this.count] = this.size;
  }

  /** Takes the row over and sets it back to zero. */
  pushDense(row: Float64Array, weight: number): void {
    for (let j = 0; j < row.length; j++) {
      if (row[j] === 0) continue;
      this.index[this.size] = j;
      this.value[this.size++] = weight * row[j]!;
    }
    row.fill(0);
    this.start[++this.count] = this.size;
  }

  build(): SparseRows {
    return { rows: this.count, columns: this.columns, start: this.start, index: this.index.subarray(0, this.size), value: this.value.subarray(0, this.size) };
  }
}
