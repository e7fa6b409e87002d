import type { Misfit } from '#shared/formats/types.ts';
import { SparseProduct } from '#shared/linalg/sparse-product.ts';
import { withoutLast } from '#shared/method/frequencies.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { moments } from '#shared/stats/moments.ts';

/** Groups of four draws taken through the inverse together. */
const GROUPS = 8;

/**
 * Misfit: S = Σ over circuits and all outcomes of (f − p̂)², unweighted, against a parametric bootstrap: f_b drawn from p̂
 * clipped to at least ½/(N + d/2) and renormalised, residual (1 − CC⁺)(f_b − p̂) with the unclipped p̂.
 * sigmas = (S − mean)/sd; p = min(1, 2·min(a + 1, B + 1 − a)/(B + 1)), a = draws with S_b ≥ S.
 * High: drift, leakage, crosstalk. Low: less scatter than shot noise allows.
 * @param predicted p̂ of the problem's circuits, circuits × d
 * @param centreOf in a pair of a chained register: p(ê; locals b) of draw b, the design's rows, subtracted instead of p̂; null
 *   where the locals have no replicate b, and the draw is left out
 */
export function misfitOf(problem: PatchProblem, predicted: Float64Array, draws: number, generator: Xoshiro256, centreOf?: (b: number) => Float64Array | null): Misfit {
  const { counts, design, inverse } = problem;
  const { circuits, d, observed, shots } = counts;
  let residualSum = 0;
  for (let i = 0; i < observed.length; i++) residualSum += (observed[i]! - predicted[i]!) * (observed[i]! - predicted[i]!);
  const table = new MultinomialTable(clipped(predicted, shots, d), shots, d);
  const { rows, columns } = inverse;
  const x = new Float64Array(GROUPS * rows * 4);
  const y = new Float64Array(GROUPS * columns * 4);
  const fitted = new Float64Array(GROUPS * rows * 4);
  const product = new SparseProduct(design);
  const centre = withoutLast(predicted, circuits, d);
  const drawn = new Float64Array(rows);
  const sums: number[] = [];
  for (let from = 0; from < draws; from += 4 * GROUPS) {
    const here = Math.min(4 * GROUPS, draws - from);
    const groups = Math.ceil(here / 4);
    x.fill(0);
    const kept: boolean[] = [];
    for (let r = 0; r < here; r++) {
      table.draw(generator, drawn, 0, 1);
      const own = centreOf ? centreOf(from + r) : centre;
      kept.push(own !== null);
      if (own) for (let i = 0, at = (r >> 2) * rows * 4 + (r & 3); i < rows; i++, at += 4) x[at] = drawn[i]! - own[i]!;
    }
    inverse.apply(x, y, groups);
    product.apply(y, fitted, groups);
    for (let r = 0; r < here; r++) if (kept[r]) sums.push(squaredResidual(x, fitted, (r >> 2) * rows * 4 + (r & 3), circuits, d));
  }
  const { mean, deviation } = moments(sums);
  const made = sums.length;
  let above = 0;
  for (const s of sums) if (s >= residualSum) above++;
  return {
    residualSum, expected: mean, sigmas: deviation > 0 ? (residualSum - mean) / deviation : 0,
    pValue: Math.min(1, (2 * Math.min(above + 1, made + 1 - above)) / (made + 1)),
  };
}

/** Σ over circuits and all outcomes of (x − fitted)², one of four interleaved vectors; the last outcome is what the others leave. */
function squaredResidual(x: Float64Array, fitted: Float64Array, at: number, circuits: number, d: number): number {
  let sum = 0;
  for (let c = 0, i = at; c < circuits; c++) {
    let last = 0;
    for (let o = 0; o < d - 1; o++, i += 4) {
      const r = x[i]! - fitted[i]!;
      last -= r;
      sum += r * r;
    }
    sum += last * last;
  }
  return sum;
}

function clipped(predicted: Float64Array, shots: Float64Array, d: number): Float64Array {
  const out = new Float64Array(predicted.length);
  for (let c = 0; c < shots.length; c++) {
    const least = 0.5 / (shots[c]! + d / 2);
    let sum = 0;
    for (let o = 0; o < d; o++) {
      out[c * d + o] = Math.max(least, predicted[c * d + o]!);
      sum += out[c * d + o]!;
    }
    for (let o = 0; o < d; o++) out[c * d + o]! /= sum;
  }
  return out;
}
