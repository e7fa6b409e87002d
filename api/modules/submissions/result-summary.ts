import type { Dataset, Figure, PatchResult, Result, SealedCheck } from '#shared/formats/types.ts';

/** How much of a patch was estimated from and how much was kept sealed. */
export interface PatchCount {
  qubits: number[];
  estimated: number;
  sealed: number;
  /** Fewest shots of a circuit estimated from. */
  minShots: number;
  /** Gates in the longest circuit estimated from. */
  longest: number;
}

/** A result without its maps and spectra: what pages and boards read. */
export interface ResultSummary {
  method: string;
  replicates: number;
  sealed: number;
  figures: Figure[];
  sealedCheck: SealedCheck | null;
  warnings: string[];
  patches: Omit<PatchResult, 'spectrum' | 'gateMaps'>[];
  counts: PatchCount[];
}

/** Patches that are estimated: the only one of a joint dataset, those of one or two qubits of a chained one. */
export const isEstimated = (dataset: Dataset, qubits: readonly number[]): boolean => dataset.patches.length === 1 || qubits.length <= 2;

export const countPatches = (dataset: Dataset, sealed: ReadonlySet<string>): PatchCount[] =>
  dataset.patches.map((patch) => {
    const open = isEstimated(dataset, patch.qubits) ? patch.circuits.filter((c) => !sealed.has(c.id)) : [];
    return {
      qubits: patch.qubits,
      estimated: open.length,
      sealed: patch.circuits.length - open.length,
      minShots: open.reduce((least, c) => Math.min(least, c.shots), open[0]?.shots ?? 0),
      longest: open.reduce((most, c) => Math.max(most, c.gates.length), 0),
    };
  });

export const summariseResult = (result: Result, dataset: Dataset, sealed: ReadonlySet<string>): ResultSummary => ({
  method: result.method,
  replicates: result.replicates,
  sealed: result.sealed,
  figures: result.figures,
  sealedCheck: result.sealedCheck,
  warnings: result.warnings,
  patches: result.patches.map(({ spectrum: _spectrum, gateMaps: _gateMaps, ...patch }) => patch),
  counts: countPatches(dataset, sealed),
});
