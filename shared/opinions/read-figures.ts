import type { Figure } from '#shared/formats/types.ts';
import { planBenchFigures } from '#shared/method/bench-plans.ts';
import { determinedCircuits } from '#shared/method/determined.ts';
import type { FigurePlan } from '#shared/method/figure-plan.ts';
import { planGateFigures } from '#shared/method/gate-plans.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { idealProbabilities, probabilitiesOf, Reader, ReadingCircuits } from '#shared/method/readings.ts';
import { TOO_WEAK_RATIO } from '#shared/linalg/tolerances.ts';
import { mapsOf, type PatchCase } from '#shared/opinions/patch-case.ts';
import type { OpinionFigure } from '#shared/opinions/types.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';

/** The depth of the retained signal that boards are read by. */
const HEADLINE_DEPTH = 16;

/** A route's maps of one patch, and the design that says what it determines. */
export interface PatchMaps {
  maps: NoisyMaps;
  /** The problem whose rank decides what is determined. */
  problem: PatchProblem;
  /** Why readout loss has no value by this route; null where it has. */
  readout: string | null;
}

const same = (a: Pick<Figure, 'key' | 'depth' | 'gate' | 'qubits'>, b: typeof a): boolean => a.key === b.key && a.depth === b.depth && a.gate === b.gate && a.qubits.join() === b.qubits.join();

/** A value beside the official one, and their distance in standard errors of the latter. */
export function besideOfficial(plan: Pick<FigurePlan, 'key' | 'depth' | 'gate' | 'qubits'>, value: number | null, reason: string | null, official: readonly Figure[]): OpinionFigure {
  const own = { key: plan.key, depth: plan.depth, gate: plan.gate, qubits: [...plan.qubits] };
  const found = official.find((f) => same(f, own));
  const theirs = found?.value ?? null;
  const error = found?.standardError ?? 0;
  return { ...own, value, reason: value === null ? reason : null, official: theirs, officialError: error > 0 ? error : null, distance: value !== null && theirs !== null && error > 0 ? (value - theirs) / error : null };
}

/** Retained signal after sixteen gates and readout loss (joint datasets), error per gate, and the loss of each gate. */
export function readFigures(patch: PatchCase, { maps, problem, readout }: PatchMaps, official: readonly Figure[]): OpinionFigure[] {
  const circuits = new ReadingCircuits();
  const gates = planGateFigures(problem, patch.qubits);
  const bench = patch.whole ? planBenchFigures(problem, patch.gateClass, patch.declared, patch.qubits, circuits) : null;
  const plans = [
    ...(bench?.retained.filter((p) => p.depth === HEADLINE_DEPTH) ?? []),
    gates.error,
    ...gates.loss,
    ...(bench ? [readout === null ? bench.readout : { ...bench.readout, reason: readout }] : []),
  ];
  const weak = problem.inverse.conditionRatio < TOO_WEAK_RATIO ? 'not determined: the circuits hold too little about these gates' : null;
  const context = new Reader(problem.set, circuits.circuits).read(maps);
  return plans.map((plan) => {
    const reason = plan.reason ?? weak;
    const value = reason === null ? plan.read(context) : NaN;
    return besideOfficial(plan, Number.isFinite(value) ? value : null, reason ?? 'not determined: the eigenvalues of the estimate could not be found', official);
  });
}

/** Sums over sealed circuits, so that several patches can be taken together. */
export interface SealedSums {
  circuits: number;
  value: number;
  official: number;
  ideal: number;
}

/** Total variation distances on the sealed circuits of a patch; null where it has none, or one of them is not determined. */
export function readSealed(patch: PatchCase, problem: PatchProblem, predicted: Float64Array): SealedSums | null {
  const { circuits, counts } = patch.sealed;
  const { set } = problem;
  if (circuits.length === 0 || !determinedCircuits(problem, circuits).every(Boolean)) return null;
  const apart = (p: Float64Array): number => circuits.length * meanTotalVariation(p, 0, counts.observed, 0, circuits.length, set.d);
  return {
    circuits: circuits.length, value: apart(predicted), official: apart(probabilitiesOf(set, circuits, mapsOf(patch.problem, patch.passes.e))), ideal: apart(idealProbabilities(set, circuits)),
  };
}
