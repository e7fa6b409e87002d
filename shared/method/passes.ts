import { LARGEST_PARAMETER, PASSES, SETTLED_SHARE } from '#shared/method/constants.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';

export interface Passes {
  /** The estimate: of all passes, or of one where the passes were stopped. */
  e: Float64Array;
  /** The first-order estimate. */
  first: Float64Array;
  settled: boolean;
  /** The passes ran away: a parameter left [−1, 1] or was not finite. */
  stopped: boolean;
}

/**
 * e⁰ = C⁺(f − p(0)), then in each further pass e ← e + C⁺(f − p(e)), p(e) the full product of noisy maps, C⁺ never recomputed.
 * @param frequencies the design's rows; those observed unless told
 * @param count passes in all, as the method version says; at least one
 */
export function runPasses(problem: PatchProblem, frequencies: Float64Array = problem.observed, count: number = PASSES): Passes {
  const { set, layout, inverse, evaluator } = problem;
  const { rows, columns } = inverse;
  const maps = emptyMaps(set);
  const e = new Float64Array(columns);
  const p = new Float64Array(rows);
  const before = new Float64Array(rows);
  const residual = new Float64Array(4 * rows);
  const step = new Float64Array(4 * columns);
  let first = e;
  for (let pass = 0; pass < count; pass++) {
    applyParameters(set, layout, e, maps);
    evaluator.run(maps, p);
    for (let i = 0; i < rows; i++) residual[4 * i] = frequencies[i]! - p[i]!;
    inverse.apply(residual, step, 1);
    for (let j = 0; j < columns; j++) e[j]! += step[4 * j]!;
    if (pass === 0) first = e.slice();
    if (e.some((v) => !(Math.abs(v) <= LARGEST_PARAMETER))) return { e: first, first, settled: false, stopped: true };
    before.set(p);
  }
  applyParameters(set, layout, e, maps);
  evaluator.run(maps, p);
  let moved = 0;
  let noise = 0;
  const outcomes = set.d - 1;
  for (let i = 0; i < rows; i++) {
    const s = problem.smoothed[i]!;
    moved += (p[i]! - before[i]!) * (p[i]! - before[i]!);
    noise += (s * (1 - s)) / problem.counts.shots[Math.floor(i / outcomes)]!;
  }
  return { e, first, settled: Math.sqrt(moved) < SETTLED_SHARE * Math.sqrt(noise), stopped: false };
}
