import type { DatasetPatch, Misfit } from '#shared/formats/types.ts';
import { SOUND_RATIO } from '#shared/linalg/tolerances.ts';
import { firstReplicates, type ChainContext, type LocalEstimate } from '#shared/method/chain/estimate-local.ts';
import { LocalBase, type LocalGate } from '#shared/method/chain/local-base.ts';
import { ESTIMATE, REPLICATES, tabulate, type MapTable } from '#shared/method/chain/map-table.ts';
import { MISFIT_DRAWS } from '#shared/method/constants.ts';
import { designMatrix } from '#shared/method/design.ts';
import { idealGateSet, indexCircuits, type GateSet } from '#shared/method/gate-set.ts';
import { keptJudgement, type Judgement } from '#shared/method/kept-inverse.ts';
import { misfitOf } from '#shared/method/misfit.ts';
import { applyParameters, emptyMaps, layoutOf, type Layout } from '#shared/method/parameters.ts';
import { runPasses, type Passes } from '#shared/method/passes.ts';
import { droppedReason } from '#shared/method/patch-report.ts';
import { poseProblem, type PatchProblem } from '#shared/method/patch-problem.ts';
import { probabilitiesOf } from '#shared/method/readings.ts';
import { drawReplicates, type Replicates } from '#shared/method/replicates.ts';
import { openStream } from '#shared/random/streams.ts';

/** What was estimated of a pair that can be. */
export interface PairFit {
  problem: PatchProblem;
  passes: Passes;
  replicates: Replicates;
  misfit: Misfit;
}

export interface PairEstimate {
  qubits: readonly number[];
  patch: number;
  /** The pair's ideal set and the columns of its entangling gates. */
  set: GateSet;
  layout: Layout;
  /** At the ideal local gates, preparation and effects: only there can a deficient design be told. */
  judged: Judgement;
  sound: boolean;
  longest: number;
  /** Null where the pair is unsound or stands on nothing: the passes would run away. */
  fit: PairFit | null;
  blocked: string | null;
  table: MapTable;
}

/** Gates of the pair's set that act on both qubits, and where the others come from. */
function divide(context: ChainContext, set: GateSet, qubits: readonly number[], locals: readonly LocalEstimate[]): { both: Set<number>; local: LocalGate[] } {
  const targets = new Map(context.gates.map((g) => [g.label, g.targets]));
  const both = new Set<number>();
  const local: LocalGate[] = [];
  set.labels.forEach((label, gate) => {
    const own = targets.get(label)!;
    if (own.length > 1) both.add(gate);
    else {
      const side = own[0] === qubits[0] ? 0 : 1;
      local.push({ gate, side, source: locals[side]!.problem.set.labels.indexOf(label) });
    }
  });
  return { both, local };
}

/** Why a pair cannot be determined, whatever its own counts say. */
function reasonAgainst(locals: readonly LocalEstimate[], judged: PairEstimate['judged'], columns: number, sound: boolean): string | null {
  if (!sound) return `unsound pair: rank ${judged.rank} of ${columns}${judged.rankAmbiguous ? ', ambiguous' : ''}, smallest to largest singular value ${judged.conditionRatio.toPrecision(2)}`;
  if (locals.some((l) => l.blocked !== null)) return 'not determined: a one-qubit patch of the pair is not determined';
  if (locals.some((l) => !l.problem.complete)) return 'not determined: a one-qubit patch of the pair is incomplete';
  return null;
}

/**
 * A pair patch of a chained register: its entangling gates together, 240 columns each, while local gates, preparation and
 * effects are held at the estimates of the two one-qubit patches, in their own gauge. Replicate b stands on replicate b of
 * both, C⁺ kept; so does draw b of the misfit. Null where the pair has no gate of its own.
 * @param locals of the patch's qubits, in their order
 */
export function estimatePair(context: ChainContext, source: DatasetPatch, patch: number, locals: readonly [LocalEstimate, LocalEstimate]): PairEstimate | null {
  const { qubits } = source;
  const set = idealGateSet(context.gates, qubits);
  const { both, local } = divide(context, set, qubits, locals);
  if (both.size === 0) return null;
  const circuits = source.circuits.filter((c) => !context.sealed.has(c.id));
  const layout = layoutOf(set, both);
  const indexed = indexCircuits(set, circuits);
  const judged = keptJudgement({ set, layout, circuits: indexed, design: () => designMatrix(set, layout, indexed) }, context.factors);
  const { rank, rankAmbiguous, conditionRatio } = judged;
  const sound = rank === layout.columns && !rankAmbiguous && conditionRatio >= SOUND_RATIO;
  const against = reasonAgainst(locals, judged, layout.columns, sound);
  const base = new LocalBase(set, [locals[0].table, locals[1].table], local);
  const fit = against === null ? fitPair(context, poseProblem(base.setAt(ESTIMATE), circuits, undefined, layout), base, patch) : null;
  const blocked = fit ? droppedReason(fit.replicates.dropped, fit.replicates.count) : against;
  return {
    qubits, patch, set, layout, judged, sound, longest: indexed.reduce((most, c) => Math.max(most, c.length), 0), fit, blocked,
    table: tabulate(set, layout, blocked === null ? fit!.passes : null, blocked === null ? fit!.replicates : null),
  };
}

function fitPair(context: ChainContext, problem: PatchProblem, base: LocalBase, patch: number): PairFit {
  const { contentId, method, count, onProgress } = context;
  const { set, layout } = problem;
  const passes = runPasses(problem, problem.observed, method.passes);
  const replicates = drawReplicates(problem, passes, count, openStream(contentId, method.id, 'replicates', patch), (done) => onProgress?.(done / count), (b, e, maps) => {
    applyParameters(set, layout, e, maps);
    base.write(REPLICATES + b, maps);
  });
  const maps = emptyMaps(set);
  applyParameters(set, layout, passes.e, maps);
  const centre = new Float64Array(problem.inverse.rows);
  const predicted = probabilitiesOf(set, problem.circuits, maps);
  const misfit = misfitOf(problem, predicted, MISFIT_DRAWS.pair, openStream(contentId, method.id, 'misfit', patch), (b) => {
    base.write(REPLICATES + b, maps);
    problem.evaluator.run(maps, centre);
    return Number.isFinite(centre[0]!) ? centre : null;
  });
  return { problem, passes, replicates: firstReplicates(replicates, count), misfit };
}
