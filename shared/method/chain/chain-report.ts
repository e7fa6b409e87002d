import type { PatchResult } from '#shared/formats/types.ts';
import { firstReplicates, type LocalEstimate } from '#shared/method/chain/estimate-local.ts';
import type { PairEstimate } from '#shared/method/chain/estimate-pair.ts';
import { designWarnings, misfitWarnings, passWarnings, reportPatch } from '#shared/method/patch-report.ts';

export function reportLocal({ qubit, problem, passes, misfit }: LocalEstimate): PatchResult {
  return reportPatch(problem, null, [qubit], passes, misfit);
}

/** Rank, ratio and spectrum are those at the ideal local gates; error maps of the entangling gates only. */
export function reportPair({ qubits, layout, judged, sound, fit }: PairEstimate): PatchResult {
  const design = {
    qubits: [...qubits], columns: layout.columns, gaugeDimension: 0, rank: judged.rank, conditionRatio: judged.conditionRatio,
    rankAmbiguous: judged.rankAmbiguous, complete: judged.rank === layout.columns, sound, spectrum: [...judged.spectrum],
  };
  if (!fit) return { ...design, settled: false, misfit: null, gateMaps: [] };
  const { settled, misfit, gateMaps } = reportPatch(fit.problem, null, qubits, fit.passes, fit.misfit);
  return { ...design, settled, misfit, gateMaps };
}

export function warnOfLocal({ qubit, problem, passes, replicates, misfit }: LocalEstimate, register: readonly string[], count: number): string[] {
  const { inverse, layout, gauge, complete } = problem;
  const out: string[] = [];
  if (inverse.rankAmbiguous) out.push('The rank of the design is ambiguous: a cut other than 1e-9 gives another one.');
  if (!complete) out.push(`The counts determine ${inverse.rank} of the ${layout.columns - gauge.dimension} combinations that the gates allow: pairs with this qubit and circuits that touch it are not determined.`);
  out.push(...designWarnings(problem, null), ...passWarnings(passes, firstReplicates(replicates, count)), ...misfitWarnings(misfit));
  return out.map((sentence) => `Patch of ${register[qubit]}: ${sentence}`);
}

export function warnOfPair({ qubits, blocked, fit }: PairEstimate, register: readonly string[]): string[] {
  const out: string[] = [];
  if (blocked !== null) out.push(`The gates of this pair are not determined: ${blocked.replace(/^not determined: /, '')}.`);
  if (fit) out.push(...passWarnings(fit.passes, fit.replicates), ...misfitWarnings(fit.misfit));
  return out.map((sentence) => `Patch of ${qubits.map((q) => register[q]).join(' and ')}: ${sentence}`);
}
