import { matchGates } from '#shared/formats/match-gates.ts';
import type { GateClass, GateDeclaration } from '#shared/formats/types.ts';
import { BENCH_DEPTHS, EXTRAPOLATION } from '#shared/method/constants.ts';
import { determinedCircuits, weightedRowsDetermined } from '#shared/method/determined.ts';
import { planFigure, type FigurePlan } from '#shared/method/figure-plan.ts';
import { indexCircuits } from '#shared/method/gate-set.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { idealProbabilities, type ReadingCircuits } from '#shared/method/readings.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';

/** Σ(p − 1/d)(p̂ − 1/d)/Σ(p − 1/d)² over circuits and outcomes: 1 = ideal, 0 = nothing left. */
export function retainedSignal(ideal: Float64Array, predicted: Float64Array, from: number, d: number): number {
  let along = 0;
  let size = 0;
  for (let i = 0; i < ideal.length; i++) {
    const w = ideal[i]! - 1 / d;
    along += w * (predicted[from * d + i]! - 1 / d);
    size += w * w;
  }
  return along / size;
}

/** Bench circuits name gates by the class's labels; the dataset's are free, so gates are paired by what they do. */
function benchCircuits(problem: PatchProblem, gateClass: GateClass, declared: readonly GateDeclaration[], depth: number): Int32Array[] {
  const bench = gateClass.bench.find((b) => b.depth === depth);
  if (!bench) return [];
  const { labels } = matchGates(gateClass.gates, declared);
  return indexCircuits(problem.set, bench.circuits.map((c) => ({ gates: c.gates.map((label) => labels.get(label) ?? label) })));
}

/** Retained signal and output error at every bench depth, and readout loss from the empty circuit. */
export function planBenchFigures(problem: PatchProblem, gateClass: GateClass | null, declared: readonly GateDeclaration[], qubits: readonly number[], circuits: ReadingCircuits): { retained: FigurePlan[]; output: FigurePlan[]; readout: FigurePlan } {
  const { d } = problem.set;
  const firstOrderOnly = !problem.complete;
  const retained: FigurePlan[] = [];
  const output: FigurePlan[] = [];
  for (const depth of BENCH_DEPTHS) {
    const bench = gateClass ? benchCircuits(problem, gateClass, declared, depth) : [];
    const common = { depth, qubits, extrapolated: depth > EXTRAPOLATION * problem.longest, firstOrderOnly };
    if (bench.length === 0) {
      retained.push(planFigure({ ...common, key: 'retained-signal', reason: 'no bench circuits' }));
      output.push(planFigure({ ...common, key: 'output-error', reason: 'no bench circuits', distance: true }));
      continue;
    }
    const ideal = idealProbabilities(problem.set, bench);
    const from = circuits.add(bench);
    const known = weightedRowsDetermined(problem, bench, ideal.map((p) => p - 1 / d));
    const unknown = determinedCircuits(problem, bench).filter((ok) => !ok).length;
    retained.push(planFigure({ ...common, key: 'retained-signal', reason: known ? null : 'not determined by this gate set', read: (c) => retainedSignal(ideal, c.probabilities, from, d) }));
    output.push(planFigure({
      ...common, key: 'output-error', distance: true,
      reason: unknown === 0 ? null : `not determined by this gate set: ${unknown} of ${bench.length} bench circuits`,
      read: (c) => meanTotalVariation(c.probabilities, from, ideal, 0, bench.length, d),
    }));
  }
  const empty = [new Int32Array(0)];
  const idealEmpty = idealProbabilities(problem.set, empty);
  const emptyAt = circuits.add(empty);
  const readKnown = weightedRowsDetermined(problem, empty, idealEmpty.map((p) => p - 1 / d));
  const readout = planFigure({
    key: 'readout-loss', qubits, firstOrderOnly, reason: readKnown ? null : 'not determined by this gate set',
    read: (c) => 1 - retainedSignal(idealEmpty, c.probabilities, emptyAt, d),
  });
  return { retained, output, readout };
}
