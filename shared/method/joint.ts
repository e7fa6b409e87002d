import { DEFAULT_REPLICATES, MISFIT_DRAWS } from '#shared/method/constants.ts';
import { determinedCircuits } from '#shared/method/determined.ts';
import { planBenchFigures } from '#shared/method/bench-plans.ts';
import { planFigure, writeFigure, type FigurePlan, type FigureValues } from '#shared/method/figure-plan.ts';
import { frequenciesOf, type Frequencies } from '#shared/method/frequencies.ts';
import { planGateFigures } from '#shared/method/gate-plans.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { misfitOf } from '#shared/method/misfit.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import { runPasses, type Passes } from '#shared/method/passes.ts';
import { blockingReason, intervalsWithheld, reportPatch, warningsOf } from '#shared/method/patch-report.ts';
import { poseProblem, type PatchProblem } from '#shared/method/patch-problem.ts';
import { predict } from '#shared/method/predictions.ts';
import { idealProbabilities, probabilitiesOf, Reader, ReadingCircuits } from '#shared/method/readings.ts';
import { drawReplicates, NO_REPLICATES, type Replicates } from '#shared/method/replicates.ts';
import { SealedReference } from '#shared/method/sealed-check.ts';
import type { EstimateInput, EstimateOutput, ReplicateTable } from '#shared/method/types.ts';
import type { MethodVersion } from '#shared/method/versions.ts';
import { openStream } from '#shared/random/streams.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';

/** The estimate of a joint dataset: exactly one patch of one or two qubits, every gate with a full error map. */
export function estimateJoint(input: EstimateInput, method: MethodVersion): EstimateOutput {
  const { dataset, contentId, gateClass, onProgress } = input;
  const patch = dataset.patches[0]!;
  const sealedIds = new Set(input.seal?.sealed ?? []);
  const set = idealGateSet(dataset.gates, patch.qubits);
  const problem = poseProblem(set, patch.circuits.filter((c) => !sealedIds.has(c.id)), onProgress, undefined, input.factors ?? null);
  const sealedCircuits = patch.circuits.filter((c) => sealedIds.has(c.id));
  onProgress?.({ stage: 'passes', fraction: 0 });
  const passes = runPasses(problem, problem.observed, method.passes);
  const count = input.replicates ?? DEFAULT_REPLICATES;
  const replicates = drawReplicates(problem, passes, count, openStream(contentId, method.id, 'replicates'), (done) =>
    onProgress?.({ stage: 'replicates', fraction: done / count, replicatesDone: done }));

  const maps = emptyMaps(set);
  applyParameters(set, problem.layout, passes.e, maps);
  const draws = set.n === 1 ? MISFIT_DRAWS.one : MISFIT_DRAWS.pair;
  const misfit = misfitOf(problem, probabilitiesOf(set, problem.circuits, maps), draws, openStream(contentId, method.id, 'misfit'));
  const blocked = blockingReason(problem, replicates);
  const withheld = intervalsWithheld(problem, misfit);

  const circuits = new ReadingCircuits();
  const bench = planBenchFigures(problem, gateClass, dataset.gates, patch.qubits, circuits);
  const gate = planGateFigures(problem, patch.qubits);
  const sealed = planSealed(problem, patch.qubits, indexCircuits(set, sealedCircuits), frequenciesOf(sealedCircuits, set.n), circuits);
  const plans = [...bench.retained, ...bench.output, gate.error, ...gate.loss, ...gate.angle, bench.readout, sealed.plan].map((p) => (blocked === null || p.reason === 'no bench circuits' ? p : { ...p, reason: blocked }));

  const reference = sealed.plan.reason === null && blocked === null ? sealed.reference(passes, openStream(contentId, method.id, 'sealed')) : null;
  const read = readFigures(problem, passes, replicates, plans, circuits.circuits, (p) => reference?.add(p, sealed.from), (fraction) => onProgress?.({ stage: 'figures', fraction }));
  const figures = plans.map((plan, i) => writeFigure(plan, read.values[i]!, withheld && plan.firstOrderOnly));
  const predictions = input.predict ? predict(problem, passes, replicates, input.predict.circuits, { reason: blocked, withheld }) : [];
  const error = figures[figures.length - 1]!.value;
  const result: EstimateOutput['result'] = {
    format: 'evenbeam.result', formatVersion: '1.0.0', method: method.id, datasetSha256: contentId, replicates: count, sealed: sealedCircuits.length,
    patches: [reportPatch(problem, gateClass, patch.qubits, passes, misfit)], figures,
    sealedCheck: reference && error !== null ? reference.check(error, sealed.idealError()) : null,
    predictions, warnings: warningsOf(problem, gateClass, passes, replicates, misfit),
  };
  onProgress?.({ stage: 'figures', fraction: 1 });
  const probabilities = input.probabilitiesOf ? predict(problem, passes, NO_REPLICATES, input.probabilitiesOf.circuits, { reason: blocked, withheld }) : [];
  return { result, replicates: read.table, probabilities };
}

/** Prediction error: the distance between p̂ and what was counted on the sealed circuits. */
function planSealed(problem: PatchProblem, qubits: readonly number[], indexed: Int32Array[], counts: Frequencies, circuits: ReadingCircuits) {
  const { d } = problem.set;
  const from = circuits.add(indexed);
  const unknown = determinedCircuits(problem, indexed).filter((ok) => !ok).length;
  let reason: string | null = null;
  if (indexed.length === 0) reason = 'no sealed circuits';
  else if (unknown > 0) reason = `not determined by this gate set: ${unknown} of ${indexed.length} sealed circuits`;
  const plan: FigurePlan = planFigure({
    key: 'prediction-error', qubits, reason, distance: true, firstOrderOnly: !problem.complete,
    read: (c) => meanTotalVariation(c.probabilities, from, counts.observed, 0, indexed.length, d),
  });
  return {
    plan, from,
    idealError: () => meanTotalVariation(idealProbabilities(problem.set, indexed), 0, counts.observed, 0, indexed.length, d),
    reference: (passes: Passes, generator: ReturnType<typeof openStream>) => {
      const maps = emptyMaps(problem.set);
      applyParameters(problem.set, problem.layout, passes.e, maps);
      return new SealedReference(probabilitiesOf(problem.set, indexed, maps), counts, generator);
    },
  };
}

interface Read {
  values: FigureValues[];
  table: ReplicateTable;
}

/** Reads every figure from the estimate, the single pass and each replicate; figures with a reason stay NaN. */
function readFigures(problem: PatchProblem, passes: Passes, replicates: Replicates, plans: readonly FigurePlan[], circuits: readonly Int32Array[], onReplicate: (probabilities: Float64Array) => void, onProgress: (fraction: number) => void): Read {
  const { set, layout } = problem;
  const { count } = replicates;
  const reader = new Reader(set, circuits);
  const maps = emptyMaps(set);
  const open = plans.flatMap((plan, i) => (plan.reason === null ? [i] : []));
  const readAll = (e: Float64Array): Float64Array => {
    const out = new Float64Array(plans.length).fill(NaN);
    applyParameters(set, layout, e, maps);
    const context = reader.read(maps);
    for (const i of open) out[i] = plans[i]!.read(context);
    return out;
  };
  const estimate = readAll(passes.e);
  const first = readAll(passes.first);
  const table = new Float64Array(plans.length * count).fill(NaN);
  for (let b = 0; b < count; b++) {
    if (!replicates.finite[b]) continue;
    applyParameters(set, layout, replicates.parameters.subarray(b * layout.columns, (b + 1) * layout.columns), maps);
    const context = reader.read(maps);
    for (const i of open) table[i * count + b] = plans[i]!.read(context);
    onReplicate(context.probabilities);
    if (b % 100 === 99) onProgress((b + 1) / count);
  }
  return {
    values: plans.map((_, i) => ({ value: estimate[i]!, firstOrder: first[i]!, replicates: table.subarray(i * count, (i + 1) * count) })),
    table: { figures: plans.length, replicates: count, values: table },
  };
}
