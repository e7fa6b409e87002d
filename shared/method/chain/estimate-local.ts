import type { DatasetPatch, GateDeclaration, Misfit } from '#shared/formats/types.ts';
import type { FactorStore } from '#shared/method/factors.ts';
import { tabulate, type MapTable } from '#shared/method/chain/map-table.ts';
import { MISFIT_DRAWS } from '#shared/method/constants.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { misfitOf } from '#shared/method/misfit.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import { runPasses, type Passes } from '#shared/method/passes.ts';
import { blockingReason } from '#shared/method/patch-report.ts';
import { poseProblem, type PatchProblem } from '#shared/method/patch-problem.ts';
import { probabilitiesOf } from '#shared/method/readings.ts';
import { drawReplicates, type Replicates } from '#shared/method/replicates.ts';
import type { MethodVersion } from '#shared/method/versions.ts';
import { openStream } from '#shared/random/streams.ts';

/** One patch of a chained register, estimated. */
export interface LocalEstimate {
  qubit: number;
  /** Place of the patch in the file. */
  patch: number;
  problem: PatchProblem;
  passes: Passes;
  /** At least as many as the misfit of a pair needs, so that it does not depend on how many were asked for. */
  replicates: Replicates;
  misfit: Misfit;
  /** Why nothing of the patch is determined, or null. */
  blocked: string | null;
  table: MapTable;
}

/** What all patches of one dataset share. */
export interface ChainContext {
  gates: readonly GateDeclaration[];
  contentId: string;
  method: MethodVersion;
  sealed: ReadonlySet<string>;
  factors: FactorStore | null;
  /** Replicates that figures are read from. */
  count: number;
  onProgress?: (fraction: number) => void;
}

/** The first `count` of more replicates. */
export function firstReplicates(all: Replicates, count: number): Replicates {
  const finite = all.finite.subarray(0, count);
  const columns = all.parameters.length / all.count;
  return { count: finite.length, parameters: all.parameters.subarray(0, finite.length * columns), finite, dropped: finite.reduce((n, ok) => n + 1 - ok, 0) };
}

/** A one-qubit patch of a chained register: estimated jointly, by itself. */
export function estimateLocal(context: ChainContext, source: DatasetPatch, patch: number): LocalEstimate {
  const { gates, contentId, method, sealed, count, onProgress } = context;
  const set = idealGateSet(gates, source.qubits);
  const problem = poseProblem(set, source.circuits.filter((c) => !sealed.has(c.id)));
  const passes = runPasses(problem, problem.observed, method.passes);
  const drawn = Math.max(count, MISFIT_DRAWS.pair);
  const replicates = drawReplicates(problem, passes, drawn, openStream(contentId, method.id, 'replicates', patch), (done) => onProgress?.(done / drawn));
  const maps = emptyMaps(set);
  applyParameters(set, problem.layout, passes.e, maps);
  const misfit = misfitOf(problem, probabilitiesOf(set, problem.circuits, maps), MISFIT_DRAWS.one, openStream(contentId, method.id, 'misfit', patch));
  return {
    qubit: source.qubits[0]!, patch, problem, passes, replicates, misfit,
    blocked: blockingReason(problem, firstReplicates(replicates, count)), table: tabulate(set, problem.layout, passes, replicates),
  };
}
