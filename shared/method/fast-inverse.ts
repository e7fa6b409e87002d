import { Cholesky } from '#shared/linalg/cholesky.ts';
import { addGram, addRowProducts } from '#shared/linalg/gram.ts';
import { largestEigenvalue } from '#shared/linalg/lanczos.ts';
import { SparseProduct } from '#shared/linalg/sparse-product.ts';
import { multiplyVector, transposeSparse, type SparseRows } from '#shared/linalg/sparse.ts';
import { FAST_PATH_FLOOR, GAUGE_RESIDUE } from '#shared/linalg/tolerances.ts';
import type { Gauge } from '#shared/method/gauge.ts';
import type { Inverse } from '#shared/method/inverse.ts';

/** L of CᵀC + c·QQᵀ with the two singular values that were looked at. */
export interface FastFactor {
  lower: Cholesky;
  sigma1: number;
  sigmaR: number;
}

/**
 * C⁺ = (CᵀC + c·QQᵀ)⁻¹Cᵀ, exact when the gauge directions Q span the null space. Accepted only if ‖CQ‖ ≤ 1e-12 σ₁ (in the
 * Frobenius norm, which is the larger), the Cholesky factor exists, and σ_r from inverse iteration is at least 1e-4 σ₁.
 * Null = refused; a squared matrix must not decide a rank.
 */
export function fastInverse(design: SparseRows, gauge: Gauge): Inverse | null {
  const factor = factorDesign(design, gauge);
  return factor && inverseByFactor(design, gauge, factor);
}

/** The part that depends on the design alone and can be kept. Cost: columns³/6 and the products; about a second for a pair. */
export function factorDesign(design: SparseRows, gauge: Gauge): FastFactor | null {
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
  const lower = Cholesky.factor(gram, columns);
  if (!lower) return null;
  const four = new Float64Array(4 * columns);
  const sigmaR = 1 / Math.sqrt(largestEigenvalue(columns, (x, y) => {
    for (let i = 0; i < columns; i++) four[4 * i] = x[i]!;
    lower.solve(four, 1);
    for (let i = 0; i < columns; i++) y[i] = four[4 * i]!;
  }));
  return sigmaR >= FAST_PATH_FLOOR * sigma1 ? { lower, sigma1, sigmaR } : null;
}

/** C⁺ as a product and two triangular solutions. */
export function inverseByFactor(design: SparseRows, gauge: Gauge, { lower, sigma1, sigmaR }: FastFactor): Inverse {
  const { rows, columns } = design;
  const product = new SparseProduct(transposeSparse(design));
  const four = new Float64Array(4 * columns);
  return {
    rows, columns, rank: columns - gauge.dimension, rankAmbiguous: false, conditionRatio: sigmaR / sigma1, spectrum: [sigma1, sigmaR],
    get nullBasis() {
      return gauge.basis;
    },
    nullDimension: gauge.dimension,
    apply: (x, out, groups) => {
      product.apply(x, out, groups);
      lower.solve(out, groups);
    },
    applyTranspose: (w) => {
      const weights = new Float64Array(rows);
      four.fill(0);
      for (let i = 0; i < columns; i++) four[4 * i] = w[i]!;
      lower.solve(four, 1);
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
