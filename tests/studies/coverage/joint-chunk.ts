import type { GateClass } from '#shared/formats/types.ts';
import { planBenchFigures } from '#shared/method/bench-plans.ts';
import { determinedCircuits } from '#shared/method/determined.ts';
import { PASSES } from '#shared/method/constants.ts';
import { planFigure, type FigurePlan } from '#shared/method/figure-plan.ts';
import { withoutLast, type Frequencies } from '#shared/method/frequencies.ts';
import { planGateFigures } from '#shared/method/gate-plans.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { isCompleteAndSound, judgeDesign } from '#shared/method/judge-design.ts';
import { misfitOf } from '#shared/method/misfit.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import { runPasses } from '#shared/method/passes.ts';
import { poseProblem, type PatchProblem } from '#shared/method/patch-problem.ts';
import { intervalsWithheld } from '#shared/method/patch-report.ts';
import { probabilitiesOf, Reader, ReadingCircuits } from '#shared/method/readings.ts';
import { drawReplicates } from '#shared/method/replicates.ts';
import { SealedReference } from '#shared/method/sealed-check.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { drawCircuits } from '#shared/runsheet/draw-circuits.ts';
import { patchPlans } from '#shared/runsheet/sheet-plan.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';
import type { Cell } from '#tests/studies/coverage/cells.ts';
import type { Found } from '#tests/studies/coverage/chunk.ts';
import { makeDevice } from '#tests/studies/coverage/device.ts';
import { exactOn, exactProbabilities, type Exact } from '#tests/studies/coverage/exact.ts';
import { Tally, type FigureName } from '#tests/studies/coverage/tally.ts';

/** Lengths of the further circuits whose outcome probabilities are predicted: one circuit each, its first outcome. */
const PREDICTED = [4, 16, 32];
/** Draws of the misfit where it decides whether intervals are published at all. */
const DRAWS = 400;

/** A plan of the method, or a prediction, under the name the study counts it by. */
interface Counted {
  name: FigureName;
  plan: FigurePlan;
}

/** The class's least sheet, sealed circuits last; drawn again until the others are sound. */
function drawSheet(gateClass: GateClass, generator: Xoshiro256): { estimated: string[][]; sealed: string[][] } {
  const plan = patchPlans(gateClass, gateClass.floor.circuits, true)[0]!;
  for (;;) {
    const circuits = drawCircuits(generator, plan.estimated + plan.sealed, plan.lengths, plan.labels);
    const estimated = circuits.slice(0, plan.estimated);
    const input = { gates: gateClass.gates, qubits: plan.qubits, circuits: estimated.map((gates) => ({ gates })) };
    const sound = plan.qubits.length === 1 ? judgeDesign(input).sound(gateClass.expectedRank) : isCompleteAndSound(input);
    if (sound) return { estimated, sealed: circuits.slice(plan.estimated) };
  }
}

/** One dataset: frequencies drawn from exact probabilities. */
function drawFrequencies(table: MultinomialTable, circuits: number, d: number, shots: Float64Array, generator: Xoshiro256): Frequencies {
  const rows = new Float64Array(circuits * (d - 1));
  table.draw(generator, rows, 0, 1);
  const observed = new Float64Array(circuits * d);
  const smoothed = new Float64Array(circuits * d);
  for (let c = 0; c < circuits; c++) {
    const n = shots[c]!;
    let left = n;
    for (let o = 0; o < d; o++) {
      const count = o < d - 1 ? Math.round(rows[c * (d - 1) + o]! * n) : left;
      left -= count;
      observed[c * d + o] = count / n;
      smoothed[c * d + o] = (count + 0.5) / (n + d / 2);
    }
  }
  return { circuits, d, shots, observed, smoothed };
}

const clip = (p: Float64Array): Float64Array => p.map((v) => Math.min(1, Math.max(0, v)));

/** What a comparison does otherwise than the study. */
export interface ChunkOptions {
  passes?: number;
  /** Counts in its own way. */
  tally?: Tally;
}

/** Trials of a class with one patch: the method's own steps, the design and its inverse made once for the chunk. */
export function runJointChunk(cell: Cell, gateClass: GateClass, generator: Xoshiro256, _chunk = 0, { passes: count = PASSES, tally = new Tally() }: ChunkOptions = {}): Found {
  const { gates } = gateClass;
  const qubits = Array.from({ length: gateClass.registerSize }, (_, q) => q);
  const device = makeDevice(gates, qubits.length, cell.noise, cell.coherent, generator);
  const sheet = drawSheet(gateClass, generator);
  const further = PREDICTED.map((length) => drawCircuits(generator, 1, [length], gateClass.drawing)[0]!);
  const set = idealGateSet(gates, qubits);
  const posed = poseProblem(set, sheet.estimated.map((own, c) => ({ id: `c${c}`, gates: own, shots: cell.shots, counts: {} })));

  const reading = new ReadingCircuits();
  const counted: Counted[] = [];
  const take = (plan: FigurePlan, key: FigureName['key'] = plan.key): void => {
    if (plan.reason === null) counted.push({ name: { key, depth: plan.depth, gate: plan.gate, qubits: plan.qubits }, plan });
  };
  const bench = planBenchFigures(posed, gateClass, gates, qubits, reading);
  const own = planGateFigures(posed, qubits);
  [...bench.retained, ...bench.output, bench.readout, own.error, ...own.loss, ...own.angle].forEach((plan) => take(plan));
  const index = (circuits: string[][]) => indexCircuits(set, circuits.map((g) => ({ gates: g })));
  const furtherAt = reading.add(index(further));
  determinedCircuits(posed, index(further)).forEach((known, i) => {
    if (known) take(planFigure({ key: 'prediction-error', qubits, depth: PREDICTED[i]!, read: (c) => c.probabilities[(furtherAt + i) * set.d]! }), 'prediction');
  });
  const sealedIndexed = index(sheet.sealed);
  const sealedAt = reading.add(sealedIndexed);
  let sealedCounts: Frequencies | null = null;
  const sealedKnown = determinedCircuits(posed, sealedIndexed).every((known) => known);
  if (sealedKnown) take(planFigure({ key: 'prediction-error', qubits, distance: true, read: (c) => meanTotalVariation(c.probabilities, sealedAt, sealedCounts!.observed, 0, sheet.sealed.length, set.d) }));

  const exact = exactOn(device, gates, qubits);
  const truth = truthOf(exact, reading.circuits.map((c) => Array.from(c, (k) => set.labels[k]!)));
  const tables = [sheet.estimated, sheet.sealed].map((circuits) => {
    const shots = new Float64Array(circuits.length).fill(cell.shots);
    return { table: new MultinomialTable(clip(exactProbabilities(exact, circuits)), shots, set.d), shots, count: circuits.length };
  });
  const draw = (which: number): Frequencies => drawFrequencies(tables[which]!.table, tables[which]!.count, set.d, tables[which]!.shots, generator);

  // Read once at the truth, so that the eigenvalues of every trial start from the same place.
  sealedCounts = draw(1);
  const fixed = counted.map(({ plan }) => plan.read(truth));
  const found: Found = { trials: cell.chunk, settled: 0, stopped: 0, passed: 0, loss: Math.max(...own.loss.map((p) => p.read(truth))), figures: [] };
  const reader = new Reader(set, reading.circuits);
  const maps = emptyMaps(set);
  for (let trial = 0; trial < cell.chunk; trial++) {
    const counts = draw(0);
    sealedCounts = draw(1);
    const problem: PatchProblem = { ...posed, counts, observed: withoutLast(counts.observed, counts.circuits, set.d), smoothed: withoutLast(counts.smoothed, counts.circuits, set.d) };
    const passes = runPasses(problem, problem.observed, count);
    const replicates = drawReplicates(problem, passes, cell.replicates, generator);
    if (passes.settled) found.settled++;
    if (passes.stopped) found.stopped++;
    applyParameters(set, problem.layout, passes.e, maps);
    if (!posed.complete) {
      const misfit = misfitOf(problem, probabilitiesOf(set, problem.circuits, maps), DRAWS, generator);
      if (intervalsWithheld(problem, misfit)) continue;
    }
    const atEstimate = reader.read(maps);
    const estimates = counted.map(({ plan }) => plan.read(atEstimate));
    const reference = sealedKnown ? new SealedReference(atEstimate.probabilities.slice(sealedAt * set.d, (sealedAt + sheet.sealed.length) * set.d), sealedCounts, generator) : null;
    const values = counted.map(() => new Float64Array(cell.replicates).fill(NaN));
    for (let b = 0; b < cell.replicates; b++) {
      if (!replicates.finite[b]) continue;
      applyParameters(set, problem.layout, replicates.parameters.subarray(b * problem.layout.columns, (b + 1) * problem.layout.columns), maps);
      const context = reader.read(maps);
      counted.forEach(({ plan }, i) => (values[i]![b] = plan.read(context)));
      reference?.add(context.probabilities, sealedAt);
    }
    counted.forEach(({ name, plan }, i) => tally.add(name, name.key === 'prediction-error' ? plan.read(truth) : fixed[i]!, estimates[i]!, values[i]!, plan.distance, passes.settled));
    const at = counted.findIndex(({ name }) => name.key === 'prediction-error');
    if (reference && at >= 0 && reference.check(estimates[at]!, 0)?.passed) found.passed++;
  }
  return { ...found, figures: tally.figures };
}

const truthOf = (exact: Exact, circuits: string[][]) => ({ maps: exact.maps, probabilities: exactProbabilities(exact, circuits) });
