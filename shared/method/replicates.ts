import { applyParameters, emptyMaps, type NoisyMaps } from '#shared/method/parameters.ts';
import type { Passes } from '#shared/method/passes.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/** Parameters of every replicate, one row of `columns` a replicate; a row that is not finite is marked and left out of everything. */
export interface Replicates {
  count: number;
  parameters: Float64Array;
  finite: Uint8Array;
  dropped: number;
}

/** Sets the maps of replicate b from its parameters: in a pair of a chained register they stand on its locals' replicate b. */
export type FillMaps = (b: number, e: Float64Array, maps: NoisyMaps) => void;

/** Groups of four replicates taken through the inverse together: large enough to reuse its rows, small enough for the cache. */
const GROUPS = 16;

/**
 * Replicate b: f_b drawn from the smoothed frequencies s; centred step e_b = ê + C⁺(f_b − s); exactly one further pass
 * e_b ← e_b + C⁺(f + f_b − s − p(e_b)). Where the passes were stopped the further pass is left out too.
 * Replicates are drawn one after another, so that fewer are a prefix of more.
 */
export function drawReplicates(problem: PatchProblem, passes: Passes, count: number, generator: Xoshiro256, onProgress?: (done: number) => void, fill?: FillMaps): Replicates {
  const { set, layout, inverse, evaluator, observed, smoothed, counts } = problem;
  const { rows, columns } = inverse;
  const table = new MultinomialTable(counts.smoothed, counts.shots, counts.d);
  const parameters = new Float64Array(count * columns);
  const finite = new Uint8Array(count).fill(1);
  const maps = emptyMaps(set);
  const drawn = new Float64Array(GROUPS * rows * 4);
  const residual = new Float64Array(GROUPS * rows * 4);
  const step = new Float64Array(GROUPS * columns * 4);
  let dropped = 0;
  for (let from = 0; from < count; from += 4 * GROUPS) {
    const here = Math.min(4 * GROUPS, count - from);
    const groups = Math.ceil(here / 4);
    drawn.fill(0);
    for (let r = 0; r < here; r++) {
      const at = (r >> 2) * rows * 4 + (r & 3);
      table.draw(generator, drawn, at, 4);
      for (let i = 0; i < rows; i++) drawn[at + 4 * i]! -= smoothed[i]!;
    }
    inverse.apply(drawn, step, groups);
    for (let r = 0; r < here; r++) addStep(parameters, (from + r) * columns, passes.e, step, (r >> 2) * columns * 4 + (r & 3), columns);
    if (!passes.stopped) {
      for (let r = 0; r < here; r++) {
        const at = (r >> 2) * rows * 4 + (r & 3);
        const e = parameters.subarray((from + r) * columns, (from + r + 1) * columns);
        if (fill) fill(from + r, e, maps);
        else applyParameters(set, layout, e, maps);
        evaluator.run(maps, residual, at, 4);
        for (let i = 0; i < rows; i++) residual[at + 4 * i] = observed[i]! + drawn[at + 4 * i]! - residual[at + 4 * i]!;
      }
      inverse.apply(residual, step, groups);
      for (let r = 0; r < here; r++) {
        const row = parameters.subarray((from + r) * columns, (from + r + 1) * columns);
        addStep(parameters, (from + r) * columns, row, step, (r >> 2) * columns * 4 + (r & 3), columns);
      }
    }
    for (let r = from; r < from + here; r++) {
      for (let j = 0; j < columns && finite[r]; j++) if (!Number.isFinite(parameters[r * columns + j]!)) finite[r] = 0;
      if (!finite[r]) dropped++;
    }
    onProgress?.(from + here);
  }
  return { count, parameters, finite, dropped };
}

function addStep(out: Float64Array, at: number, from: Float64Array, step: Float64Array, stepAt: number, columns: number): void {
  for (let j = 0; j < columns; j++) out[at + j] = from[j]! + step[stepAt + 4 * j]!;
}
