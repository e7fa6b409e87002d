import type { GateClass, Misfit, PatchResult } from '#shared/formats/types.ts';
import { SOUND_RATIO, TOO_WEAK_RATIO } from '#shared/linalg/tolerances.ts';
import { MISFIT_RANGE, MOST_DROPPED } from '#shared/method/constants.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import type { Passes } from '#shared/method/passes.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import type { Replicates } from '#shared/method/replicates.ts';
import { smallestChoiEigenvalue } from '#shared/quantum/choi.ts';

/** r equals the expected rank (a custom set's: columns − gauge dimension), unambiguous, σ_r/σ₁ ≥ 0.01. */
export function isSound(problem: PatchProblem, gateClass: GateClass | null): boolean {
  const { rank, rankAmbiguous, conditionRatio } = problem.inverse;
  const expected = gateClass ? gateClass.expectedRank : problem.layout.columns - problem.gauge.dimension;
  return rank === expected && !rankAmbiguous && conditionRatio >= SOUND_RATIO;
}

export function reportPatch(problem: PatchProblem, gateClass: GateClass | null, qubits: readonly number[], passes: Passes, misfit: Misfit | null): PatchResult {
  const { set, layout, inverse, gauge } = problem;
  const maps = emptyMaps(set);
  applyParameters(set, layout, passes.e, maps);
  const size = set.D * set.D;
  return {
    qubits: [...qubits], columns: layout.columns, gaugeDimension: gauge.dimension, rank: inverse.rank, conditionRatio: inverse.conditionRatio,
    rankAmbiguous: inverse.rankAmbiguous, complete: problem.complete, sound: isSound(problem, gateClass), settled: passes.settled,
    spectrum: [...inverse.spectrum], misfit,
    gateMaps: set.labels.flatMap((gate, k) => {
      if (layout.gateAt[k]! < 0) return [];
      const errorMap = new Array<number>(size).fill(0);
      for (let i = set.D; i < size; i++) errorMap[i] = passes.e[layout.gateAt[k]! + i - set.D]!;
      return [{ gate, errorMap, smallestChoiEigenvalue: smallestChoiEigenvalue(maps.gates.subarray(k * size, (k + 1) * size), set.n) }];
    }),
  };
}

/** Why nothing of a patch is determined, or null. */
export function blockingReason(problem: PatchProblem, replicates: Replicates): string | null {
  if (problem.inverse.conditionRatio < TOO_WEAK_RATIO) return 'not determined: the circuits hold too little about these gates (smallest to largest singular value below 0.001)';
  return droppedReason(replicates.dropped, replicates.count);
}

/** More than one replicate in a hundred left out: nothing is determined. */
export function droppedReason(dropped: number, count: number): string | null {
  return dropped > MOST_DROPPED * count ? `not determined: ${dropped} of ${count} replicates were not finite` : null;
}

/** Whether the intervals of an incomplete set's predictions are withheld: its counts do not fit the first-order model. */
export function intervalsWithheld(problem: PatchProblem, misfit: Misfit | null): boolean {
  return !problem.complete && misfit !== null && Math.abs(misfit.sigmas) > MISFIT_RANGE;
}

/** What a reader of the result must be told, in plain sentences. */
export function warningsOf(problem: PatchProblem, gateClass: GateClass | null, passes: Passes, replicates: Replicates, misfit: Misfit | null): string[] {
  const { inverse, layout, gauge } = problem;
  const out: string[] = [];
  if (inverse.rankAmbiguous) out.push('The rank of the design is ambiguous: a cut other than 1e-9 gives another one.');
  if (!problem.complete) {
    out.push(`The counts determine ${inverse.rank} of the ${layout.columns - gauge.dimension} combinations that the gates allow: what is predicted holds to first order only, and some figures are not determined.`);
  }
  out.push(...designWarnings(problem, gateClass), ...passWarnings(passes, replicates));
  if (intervalsWithheld(problem, misfit)) out.push('The counts do not fit the first-order model: predictions and figures read from them stand without intervals.');
  else out.push(...misfitWarnings(misfit));
  return out;
}

/** A design that is too weak, or not sound enough for ranking. */
export function designWarnings(problem: PatchProblem, gateClass: GateClass | null): string[] {
  const { inverse } = problem;
  const out: string[] = [];
  if (inverse.conditionRatio < TOO_WEAK_RATIO) out.push(`The circuits are too weak a design: smallest to largest singular value ${inverse.conditionRatio.toPrecision(2)}, below 0.001.`);
  else if (!isSound(problem, gateClass)) {
    out.push(inverse.conditionRatio < SOUND_RATIO
      ? `The design is not sound enough for ranking: smallest to largest singular value ${inverse.conditionRatio.toPrecision(2)}, below 0.01.`
      : 'The design is not sound enough for ranking: it does not have the rank of its gate class.');
  }
  return out;
}

export function passWarnings(passes: Passes, replicates: Replicates): string[] {
  const out: string[] = [];
  if (passes.stopped) out.push('The passes ran away and were stopped: figures, replicates and predictions are those of the single pass.');
  else if (!passes.settled) out.push('The passes have not settled: the last one still moved the predicted probabilities by a tenth of the shot noise or more.');
  if (replicates.dropped > 0) out.push(`${replicates.dropped} of ${replicates.count} replicates were not finite and are left out.`);
  return out;
}

export function misfitWarnings(misfit: Misfit | null): string[] {
  if (misfit && misfit.sigmas > MISFIT_RANGE) return ['The counts scatter more about the estimate than shot noise allows: drift, leakage or crosstalk may be present.'];
  if (misfit && misfit.sigmas < -MISFIT_RANGE) return ['The counts scatter less about the estimate than shot noise allows.'];
  return [];
}
