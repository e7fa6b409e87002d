import { ColumnStore } from '#shared/linalg/column-store.ts';
import { luFactor } from '#shared/linalg/lu.ts';

/** A step that moves the eigenvalue by less is the last: each is some ten times smaller than the one before. */
const STILL = 1e-14;
/** Nearby maps take about eight steps; one that takes more than this is not nearby. */
const MOST_STEPS = 40;
const INVERSE_STEPS = 4;

/**
 * Eigenvalues of maps T near a known map T̂ with simple eigenvalue λ̂, right vector x̂ and left vector ŷ (ŷ·x̂ = 1):
 * x ← x + R(Tx − λx), λ = ŷ·Tx, with R = (λ̂ − T̂)⁻¹ on the complement of x̂. Converges by the factor ‖R(T − T̂)‖ a step to the
 * eigenvalue of T that is continued from λ̂. R is formed once; each step costs size² multiply-adds and one application of T.
 */
export class Resolvent {
  private readonly start: Float64Array;
  private readonly left: Float64Array;
  private readonly r: ColumnStore;

  private constructor(start: Float64Array, left: Float64Array, r: Float64Array) {
    this.start = start;
    this.left = left;
    this.r = new ColumnStore(r, start.length);
  }

  /** @param map T̂ (size² row-major) @param transposedMap its transpose; both are used up; null where λ̂ is not simple */
  static of(map: Float64Array, transposedMap: Float64Array, right: Float64Array, lambda: number): Resolvent | null {
    const size = right.length;
    // The left vector by inverse iteration: the shifted matrix is as good as singular, which is what makes it quick.
    for (let i = 0; i < size; i++) transposedMap[i * size + i]! -= lambda;
    const lu = luFactor(transposedMap, size);
    const left = right.slice();
    for (let step = 0; step < INVERSE_STEPS; step++) {
      lu.solve(left);
      let largest = 0;
      for (const v of left) largest = Math.max(largest, Math.abs(v));
      for (let i = 0; i < size; i++) left[i]! /= largest;
    }
    let scale = 0;
    for (let i = 0; i < size; i++) scale += left[i]! * right[i]!;
    for (let i = 0; i < size; i++) left[i]! /= scale;
    if (!left.every(Number.isFinite)) return null;
    // λ̂ − T̂ + x̂ŷᵀ is regular and agrees with λ̂ − T̂ on the complement.
    for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) map[i * size + j] = (i === j ? lambda : 0) - map[i * size + j]! + right[i]! * left[j]!;
    const regular = luFactor(map, size);
    const r = new Float64Array(size * size);
    const column = new Float64Array(size);
    for (let j = 0; j < size; j++) {
      for (let i = 0; i < size; i++) column[i] = (i === j ? 1 : 0) - right[i]! * left[j]!;
      regular.solve(column);
      for (let i = 0; i < size; i++) r[i * size + j] = column[i]!;
    }
    return r.every(Number.isFinite) ? new Resolvent(right.slice(), left, r) : null;
  }

  /**
   * Eigenvalue of the map that `advance` applies, reading x and leaving T·x in `image`.
   * @returns NaN when the steps do not settle
   */
  solve(image: Float64Array, advance: (x: Float64Array) => void): number {
    const { left, r } = this;
    const { x: residual, out: x } = r;
    const size = x.length;
    x.set(this.start);
    let lambda = NaN;
    for (let step = 0; step < MOST_STEPS; step++) {
      advance(x);
      let along = 0;
      let scale = 0;
      for (let i = 0; i < size; i++) {
        along += left[i]! * image[i]!;
        scale += left[i]! * x[i]!;
      }
      const next = along / scale;
      if (Math.abs(next - lambda) < STILL) return next;
      lambda = next;
      for (let i = 0; i < size; i++) residual[i] = image[i]! - lambda * x[i]!;
      r.addProduct();
    }
    return NaN;
  }
}
