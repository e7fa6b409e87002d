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

/** For readings of the estimate alone. */
export const NO_REPLICATES: Replicates = { count: 0, parameters: new Float64Array(0), finite: new Uint8Array(0), dropped: 0 };

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
  const four = Array.from({ length: 4 }, () => new Float64Array(rows));
  const centre = new Float64Array(4 * columns);
  for (let l = 0; l < 4; l++) centre.set(passes.e, l * columns);
  let dropped = 0;
  for (let from = 0; from < count; from += 4 * GROUPS) {
    const here = Math.min(4 * GROUPS, count - from);
    const groups = Math.ceil(here / 4);
    for (let g = 0; g < groups; g++) {
      for (let l = 0; l < Math.min(4, here - 4 * g); l++) table.draw(generator, four[l]!, 0, 1);
      takeCentred(drawn, g * rows * 4, four, smoothed);
    }
    inverse.apply(drawn, step, groups);
    for (let g = 0; g < groups; g++) addSteps(parameters, (from + 4 * g) * columns, centre, 0, step, g * columns * 4, columns, Math.min(4, here - 4 * g));
    if (!passes.stopped) {
      for (let g = 0; g < groups; g++) {
        const lanes = Math.min(4, here - 4 * g);
        for (let l = 0; l < lanes; l++) {
          const b = from + 4 * g + l;
          const e = parameters.subarray(b * columns, (b + 1) * columns);
          if (fill) fill(b, e, maps);
          else applyParameters(set, layout, e, maps);
          evaluator.run(maps, four[l]!);
        }
        takeResiduals(residual, drawn, g * rows * 4, observed, four);
      }
      inverse.apply(residual, step, groups);
      for (let g = 0; g < groups; g++) {
        const at = (from + 4 * g) * columns;
        addSteps(parameters, at, parameters, at, step, g * columns * 4, columns, Math.min(4, here - 4 * g));
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

/** f_b − s for four replicates, interleaved at `at`. Walking all four together reads every line of memory once. */
function takeCentred(out: Float64Array, at: number, drawn: readonly Float64Array[], smoothed: Float64Array): void {
  const [f0, f1, f2, f3] = [drawn[0]!, drawn[1]!, drawn[2]!, drawn[3]!];
  for (let i = 0, p = at; i < smoothed.length; i++, p += 4) {
    const s = smoothed[i]!;
    out[p] = f0[i]! - s;
    out[p + 1] = f1[i]! - s;
    out[p + 2] = f2[i]! - s;
    out[p + 3] = f3[i]! - s;
  }
}

/** f + (f_b − s) − p(e_b) for four replicates, interleaved at `at`. */
function takeResiduals(out: Float64Array, drawn: Float64Array, at: number, observed: Float64Array, predicted: readonly Float64Array[]): void {
  const [p0, p1, p2, p3] = [predicted[0]!, predicted[1]!, predicted[2]!, predicted[3]!];
  for (let i = 0, p = at; i < observed.length; i++, p += 4) {
    const f = observed[i]!;
    out[p] = f + drawn[p]! - p0[i]!;
    out[p + 1] = f + drawn[p + 1]! - p1[i]!;
    out[p + 2] = f + drawn[p + 2]! - p2[i]!;
    out[p + 3] = f + drawn[p + 3]! - p3[i]!;
  }
}

/** Rows of `out` from `at` on: rows of `from` plus the steps of as many replicates as `lanes` says, interleaved at `stepAt`. */
function addSteps(out: Float64Array, at: number, from: Float64Array, fromAt: number, step: Float64Array, stepAt: number, columns: number, lanes: number): void {
  for (let l = 0; l < lanes; l++) for (let j = 0; j < columns; j++) out[at + l * columns + j] = from[fromAt + l * columns + j]! + step[stepAt + 4 * j + l]!;
}
