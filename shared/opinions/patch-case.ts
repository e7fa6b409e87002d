import type { DatasetCircuit, GateClass, GateDeclaration } from '#shared/formats/types.ts';
import { frequenciesOf, type Frequencies } from '#shared/method/frequencies.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps, type NoisyMaps } from '#shared/method/parameters.ts';
import { runPasses, type Passes } from '#shared/method/passes.ts';
import { poseProblem, type PatchProblem } from '#shared/method/patch-problem.ts';
import type { OpinionInput } from '#shared/opinions/types.ts';

/** One jointly estimated patch with the official estimate of it: what every second opinion starts from. */
export interface PatchCase {
  problem: PatchProblem;
  passes: Passes;
  qubits: readonly number[];
  declared: readonly GateDeclaration[];
  /** Of a joint dataset; null in a chained register, whose bench circuits are not those of a patch. */
  gateClass: GateClass | null;
  /** Are figures over the bench circuits read from this patch? */
  whole: boolean;
  circuits: readonly DatasetCircuit[];
  sealed: { source: readonly DatasetCircuit[]; circuits: Int32Array[]; counts: Frequencies };
}

/** The only patch of a joint dataset, or each one-qubit patch of a chained one. */
export function patchCases({ dataset, gateClass, seal }: OpinionInput): PatchCase[] {
  const whole = dataset.patches.length === 1;
  const kept = new Set(seal?.sealed ?? []);
  return dataset.patches.filter(({ qubits }) => whole || qubits.length === 1).map(({ qubits, circuits }) => {
    const set = idealGateSet(dataset.gates, qubits);
    const open = circuits.filter(({ id }) => !kept.has(id));
    const source = circuits.filter(({ id }) => kept.has(id));
    const problem = poseProblem(set, open);
    return {
      problem, passes: runPasses(problem), qubits, declared: dataset.gates, gateClass: whole ? gateClass : null, whole, circuits: open,
      sealed: { source, circuits: indexCircuits(set, source), counts: frequenciesOf(source, set.n) },
    };
  });
}

/** Maps of a parameter vector of the problem. */
export function mapsOf(problem: Pick<PatchProblem, 'set' | 'layout'>, e: Float64Array | null): NoisyMaps {
  const maps = emptyMaps(problem.set);
  applyParameters(problem.set, problem.layout, e, maps);
  return maps;
}
