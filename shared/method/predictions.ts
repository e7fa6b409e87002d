import type { PlainCircuit, Prediction } from '#shared/formats/types.ts';
import { determinedCircuits } from '#shared/method/determined.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import { indexCircuits } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import type { Passes } from '#shared/method/passes.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { Reader } from '#shared/method/readings.ts';
import type { Replicates } from '#shared/method/replicates.ts';
import { percentileInterval } from '#shared/stats/bootstrap-intervals.ts';

/** Circuits whose replicates are held in memory together. */
const CHUNK = 256;

export interface PredictionOptions {
  /** Why nothing at all is determined, or null. */
  reason: string | null;
  /** Probabilities without intervals. */
  withheld: boolean;
}

/** Outcome probabilities of further circuits, neither they nor their 95 % percentile intervals clipped. */
export function predict(problem: PatchProblem, passes: Passes, replicates: Replicates, circuits: readonly PlainCircuit[], options: PredictionOptions): Prediction[] {
  const indexed = indexCircuits(problem.set, circuits);
  const known = options.reason === null ? determinedCircuits(problem, indexed) : indexed.map(() => false);
  const out: Prediction[] = [];
  for (let from = 0; from < circuits.length; from += CHUNK) {
    const chunk = indexed.slice(from, from + CHUNK).filter((_, i) => known[from + i]);
    const values = chunk.length > 0 ? readChunk(problem, passes, replicates, chunk) : null;
    let place = 0;
    for (let i = from; i < Math.min(from + CHUNK, circuits.length); i++) {
      const id = circuits[i]!.id;
      const firstOrderOnly = !problem.complete;
      if (!known[i] || !values) {
        out.push({ id, determined: false, reason: options.reason ?? 'not determined by this gate set', firstOrderOnly, probabilities: null, intervals: null });
        continue;
      }
      out.push({ id, determined: true, reason: null, firstOrderOnly, ...describe(problem.set.n, values, place++, options.withheld) });
    }
  }
  return out;
}

interface ChunkValues {
  estimate: Float64Array;
  /** One array of finite replicates for each (circuit, outcome). */
  replicates: Float64Array[];
}

function readChunk(problem: PatchProblem, passes: Passes, replicates: Replicates, circuits: readonly Int32Array[]): ChunkValues {
  const { set, layout } = problem;
  const reader = new Reader(set, circuits);
  const maps = emptyMaps(set);
  applyParameters(set, layout, passes.e, maps);
  const estimate = reader.read(maps).probabilities.slice();
  const kept = replicates.count - replicates.dropped;
  const table = Array.from({ length: estimate.length }, () => new Float64Array(kept));
  let column = 0;
  for (let b = 0; b < replicates.count; b++) {
    if (!replicates.finite[b]) continue;
    applyParameters(set, layout, replicates.parameters.subarray(b * layout.columns, (b + 1) * layout.columns), maps);
    const { probabilities } = reader.read(maps);
    for (let i = 0; i < table.length; i++) table[i]![column] = probabilities[i]!;
    column++;
  }
  for (const row of table) row.sort();
  return { estimate, replicates: table };
}

function describe(n: number, values: ChunkValues, place: number, withheld: boolean): Pick<Prediction, 'probabilities' | 'intervals'> {
  const labels = outcomeLabels(n);
  const probabilities: Record<string, number> = {};
  const intervals: Record<string, [number, number]> = {};
  let bare = withheld;
  labels.forEach((label, o) => {
    const i = place * labels.length + o;
    probabilities[label] = values.estimate[i]!;
    const sorted = values.replicates[i]!;
    if (sorted.length === 0) bare = true;
    else {
      const { low, high } = percentileInterval(sorted, 0.95);
      intervals[label] = [low, high];
    }
  });
  return { probabilities, intervals: bare ? null : intervals };
}
