import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { Dataset, GateClass } from '#shared/formats/types.ts';
import { planBenchFigures } from '#shared/method/bench-plans.ts';
import { MISFIT_DRAWS } from '#shared/method/constants.ts';
import { writeFigure, type FigurePlan } from '#shared/method/figure-plan.ts';
import { planGateFigures } from '#shared/method/gate-plans.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { misfitOf } from '#shared/method/misfit.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import { runPasses, type Passes } from '#shared/method/passes.ts';
import { poseProblem, type PatchProblem } from '#shared/method/patch-problem.ts';
import { probabilitiesOf, Reader, ReadingCircuits } from '#shared/method/readings.ts';
import { drawReplicates, type Replicates } from '#shared/method/replicates.ts';
import { officialMethod } from '#shared/method/versions.ts';
import { openStream } from '#shared/random/streams.ts';

/** Stages as the numpy script reports them; `rest` is what it does not do: misfit and the figures beyond gate loss and retained signal. */
export const STAGES = ['read', 'design', 'inverse', 'passes', 'replicates', 'figures'] as const;
export type Seconds = Record<(typeof STAGES)[number] | 'total' | 'rest', number>;

/** The whole estimate of a joint dataset taken apart, seconds by stage. `total` is without `rest`. */
export function timeJoint(text: string, gateClass: GateClass, count: number): Seconds {
  const seconds: Partial<Seconds> = {};
  let last = performance.now();
  const mark = (stage: keyof Seconds): void => {
    const now = performance.now();
    seconds[stage] = (now - last) / 1000;
    last = now;
  };
  const dataset = JSON.parse(text) as Dataset;
  const patch = dataset.patches[0]!;
  const contentId = contentIdOf(dataset);
  const set = idealGateSet(dataset.gates, patch.qubits);
  const problem = poseProblem(set, patch.circuits, ({ stage }) => mark(stage === 'design' ? 'read' : 'design'));
  mark('inverse');
  const passes = runPasses(problem);
  mark('passes');
  const replicates = drawReplicates(problem, passes, count, openStream(contentId, officialMethod.id, 'replicates'));
  mark('replicates');
  const circuits = new ReadingCircuits();
  const bench = planBenchFigures(problem, gateClass, dataset.gates, patch.qubits, circuits);
  const gate = planGateFigures(problem, patch.qubits);
  readAll(problem, passes, replicates, [...bench.retained.filter((plan) => plan.depth !== 0), ...gate.loss], circuits.circuits);
  mark('figures');
  readAll(problem, passes, replicates, [...bench.output, gate.error, ...gate.angle, bench.readout], circuits.circuits);
  const maps = emptyMaps(set);
  applyParameters(set, problem.layout, passes.e, maps);
  misfitOf(problem, probabilitiesOf(set, problem.circuits, maps), set.n === 1 ? MISFIT_DRAWS.one : MISFIT_DRAWS.pair, openStream(contentId, officialMethod.id, 'misfit'));
  mark('rest');
  return { ...(seconds as Seconds), total: STAGES.reduce((sum, stage) => sum + seconds[stage]!, 0) };
}

/** Estimate and every replicate of some figures, with their intervals. */
function readAll(problem: PatchProblem, passes: Passes, replicates: Replicates, plans: readonly FigurePlan[], circuits: readonly Int32Array[]): void {
  const { set, layout } = problem;
  const reader = new Reader(set, circuits);
  const maps = emptyMaps(set);
  const { count, parameters } = replicates;
  const read = (e: Float64Array): number[] => {
    applyParameters(set, layout, e, maps);
    const context = reader.read(maps);
    return plans.map((plan) => plan.read(context));
  };
  const [estimate, first] = [read(passes.e), read(passes.first)];
  const rows = plans.map(() => new Float64Array(count));
  for (let b = 0; b < count; b++) read(parameters.subarray(b * layout.columns, (b + 1) * layout.columns)).forEach((v, i) => (rows[i]![b] = v));
  plans.forEach((plan, i) => writeFigure(plan, { value: estimate[i]!, firstOrder: first[i]!, replicates: rows[i]! }, false));
}
