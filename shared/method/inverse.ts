import { HELD_GROUPS, PanelStore } from '#shared/linalg/panel-store.ts';
import { toDense, type SparseRows } from '#shared/linalg/sparse.ts';
import { invertSvd, rankAt, singularValues } from '#shared/linalg/svd.ts';
import { AMBIGUOUS_FROM, AMBIGUOUS_TO, RANK_CUT } from '#shared/linalg/tolerances.ts';
import { fastInverse } from '#shared/method/fast-inverse.ts';
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
export const SVD_COLUMNS = 100;

/** The Moore–Penrose inverse of the design (method M1, pseudo-inverse, rank, soundness). */
export function invertDesign(design: SparseRows, gauge: Gauge): Inverse {
  if (design.columns > SVD_COLUMNS) {
    const fast = fastInverse(design, gauge);
    if (fast) return fast;
  }
  return svdInverse(design);
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
