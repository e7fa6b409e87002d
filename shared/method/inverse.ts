import { Cholesky } from '#shared/linalg/cholesky.ts';
import { addGram, addRowProducts } from '#shared/linalg/gram.ts';
import { largestEigenvalue } from '#shared/linalg/lanczos.ts';
import { HELD_GROUPS, PanelStore } from '#shared/linalg/panel-store.ts';
import { SparseProduct } from '#shared/linalg/sparse-product.ts';
import { multiplyVector, toDense, transposeSparse, type SparseRows } from '#shared/linalg/sparse.ts';
import { invertSvd, rankAt, singularValues } from '#shared/linalg/svd.ts';
import { AMBIGUOUS_FROM, AMBIGUOUS_TO, FAST_PATH_FLOOR, GAUGE_RESIDUE, RANK_CUT } from '#shared/linalg/tolerances.ts';
import type { Gauge } from '#shared/method/gauge.ts';

/** What a design determines, and C⁺ as a thing that can be applied. */
export interface Inverse {
  rows: number;
  columns: number;
  rank: number;
  rankAmbiguous: boolean;
  /** σ_r/σ₁. */
  conditionRatio: number;
  /** All singular values, or [σ₁, σ_r] where no SVD was needed. */
  spectrum: number[];
  /** Orthonormal basis of the null space, vectors of length `columns` one after another. */
  nullBasis: Float64Array;
  nullDimension: number;
  /**
   * out = C⁺·x for `groups` groups of four vectors, interleaved: element i of vector l of group g at (g·rows + i)·4 + l,
   * in `out` alike with `columns`. `out` is overwritten.
   */
  apply: (x: Float64Array, out: Float64Array, groups: number) => void;
  /** (C⁺)ᵀ·w: how a linear function w of the parameters weighs the rows. */
  applyTranspose: (w: Float64Array) => Float64Array;
}

/** Designs up to this many columns always get the SVD: it costs milliseconds and its whole spectrum is published. */
const SVD_COLUMNS = 100;

/** The Moore–Penrose inverse of the design (method M1, pseudo-inverse, rank, soundness). */
export function invertDesign(design: SparseRows, gauge: Gauge): Inverse {
  if (design.columns > SVD_COLUMNS) {
    const fast = fastInverse(design, gauge);
    if (fast) return fast;
  }
  return svdInverse(design);
}

/**
 * C⁺ = (CᵀC + c·QQᵀ)⁻¹Cᵀ, exact when the gauge directions Q span the null space. Accepted only if ‖CQ‖ ≤ 1e-12 σ₁ (in the
 * Frobenius norm, which is the larger), the Cholesky factor exists, and σ_r from inverse iteration is at least 1e-4 σ₁.
 * Null = refused; a squared matrix must not decide a rank.
 */
export function fastInverse(design: SparseRows, gauge: Gauge): Inverse | null {
  const { rows, columns } = design;
  if (rows < columns - gauge.dimension) return null;
  const transpose = transposeSparse(design);
  const scratch = new Float64Array(rows);
  const sigma1 = Math.sqrt(largestEigenvalue(columns, (x, y) => {
    multiplyVector(design, x, scratch);
    multiplyVector(transpose, scratch, y);
  }));
  const residue = squaredImage(design, gauge);
  if (!(Math.sqrt(residue) <= GAUGE_RESIDUE * sigma1)) return null;
  const gram = new Float64Array(columns * columns);
  addGram(design, gram);
  addRowProducts(transposeRows(gauge.basis, gauge.dimension, columns), columns, gauge.dimension, sigma1 * sigma1, gram);
  const factor = Cholesky.factor(gram, columns);
  if (!factor) return null;
  const four = new Float64Array(4 * columns);
  const sigmaR = 1 / Math.sqrt(largestEigenvalue(columns, (x, y) => {
    for (let i = 0; i < columns; i++) four[4 * i] = x[i]!;
    factor.solve(four, 1);
    for (let i = 0; i < columns; i++) y[i] = four[4 * i]!;
  }));
  if (!(sigmaR >= FAST_PATH_FLOOR * sigma1)) return null;
  const product = new SparseProduct(transpose);
  return {
    rows, columns, rank: columns - gauge.dimension, rankAmbiguous: false, conditionRatio: sigmaR / sigma1, spectrum: [sigma1, sigmaR],
    nullBasis: gauge.basis, nullDimension: gauge.dimension,
    apply: (x, out, groups) => {
      product.apply(x, out, groups);
      factor.solve(out, groups);
    },
    applyTranspose: (w) => {
      const weights = new Float64Array(rows);
      for (let i = 0; i < columns; i++) four[4 * i] = w[i]!;
      factor.solve(four, 1);
      multiplyVector(design, four.filter((_, i) => i % 4 === 0), weights);
      return weights;
    },
  };
}

/** ‖CQ‖² (Frobenius). */
function squaredImage(design: SparseRows, gauge: Gauge): number {
  const { rows, columns } = design;
  const product = new SparseProduct(design);
  const groups = Math.ceil(gauge.dimension / 4);
  const x = new Float64Array(groups * columns * 4);
  for (let q = 0; q < gauge.dimension; q++) {
    const at = (q >> 2) * columns * 4 + (q & 3);
    for (let j = 0; j < columns; j++) x[at + 4 * j] = gauge.basis[q * columns + j]!;
  }
  const image = new Float64Array(groups * rows * 4);
  product.apply(x, image, groups);
  let sum = 0;
  for (let i = 0; i < image.length; i++) sum += image[i]! * image[i]!;
  return sum;
}

function transposeRows(a: Float64Array, rows: number, columns: number): Float64Array {
  const out = new Float64Array(a.length);
  for (let i = 0; i < rows; i++) for (let j = 0; j < columns; j++) out[j * rows + i] = a[i * columns + j]!;
  return out;
}

/** C⁺ from a singular value decomposition, singular values above RANK_CUT kept. */
export function svdInverse(design: SparseRows): Inverse {
  const { rows, columns } = design;
  const svd = singularValues(toDense(design), rows, columns);
  const rank = rankAt(svd.values, RANK_CUT);
  const inverse = invertSvd(svd, rank, rows, columns);
  const nullBasis = new Float64Array((columns - rank) * columns);
  for (let k = rank; k < columns; k++) nullBasis.set(svd.right[k]!, (k - rank) * columns);
  const product = denseProduct(inverse, columns, rows);
  return {
    rows, columns, rank, rankAmbiguous: rankAt(svd.values, AMBIGUOUS_FROM) !== rankAt(svd.values, AMBIGUOUS_TO),
    conditionRatio: rank > 0 ? svd.values[rank - 1]! / svd.values[0]! : 0, spectrum: Array.from(svd.values), nullBasis, nullDimension: columns - rank,
    apply: product,
    applyTranspose: (w) => {
      const weights = new Float64Array(rows);
      for (let i = 0; i < columns; i++) for (let j = 0; j < rows; j++) weights[j]! += w[i]! * inverse[i * rows + j]!;
      return weights;
    },
  };
}

/** out = A·x for a dense A (m×n) and groups of four vectors. */
function denseProduct(a: Float64Array, m: number, n: number): Inverse['apply'] {
  const store = new PanelStore(m * n, m + n);
  // Kept with its sign turned: panels are subtracted.
  for (let i = 0; i < a.length; i++) store.matrix[i] = -a[i]!;
  const { vectors } = store;
  return (x, out, groups) => {
    for (let from = 0; from < groups; from += HELD_GROUPS) {
      const here = Math.min(HELD_GROUPS, groups - from);
      const image = here * n * 4;
      vectors.set(x.subarray(from * n * 4, (from + here) * n * 4));
      vectors.fill(0, image, image + here * m * 4);
      for (let g = 0; g < here; g++) store.subtract(0, n, 0, m, 0, n, g * n * 4, image + g * m * 4);
      out.set(vectors.subarray(image, image + here * m * 4), from * m * 4);
    }
  };
}
