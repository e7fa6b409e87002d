import type { Entry } from '#shared/contracts/entries.ts';
import type { EstimateProgress } from '#shared/method/types.ts';
import type { Comparison, FileCheck, RecordedDigests } from '#shared/recompute/types.ts';

/** What the worker is told: where the files are and what the record says of them. */
export interface RecomputeRequest {
  links: Pick<Entry['links'], 'dataset' | 'result' | 'replicates' | 'seal' | 'runSheet'>;
  recorded: RecordedDigests;
}

export type RecomputeStage = 'files' | 'checks' | EstimateProgress['stage'] | 'comparison';

export interface RecomputeProgress {
  stage: RecomputeStage;
  /** Of the whole, 0 to 1. */
  fraction: number;
  replicatesDone: number | null;
  replicates: number | null;
}

/** What stopped a run, in words, and whether another try may help. */
export interface RecomputeFault {
  title: string;
  detail: string;
  again: boolean;
}

export interface RecomputeOutcome {
  checks: FileCheck[];
  /** Null where the files could not be estimated from; the checks tell why. */
  comparison: Comparison | null;
  seconds: number;
}

export type RecomputeMessage = ({ kind: 'progress' } & RecomputeProgress) | ({ kind: 'done' } & RecomputeOutcome) | ({ kind: 'fault' } & RecomputeFault);

export const requestOf = ({ links, provenance }: Pick<Entry, 'links' | 'provenance'>): RecomputeRequest => ({
  links: { dataset: links.dataset, result: links.result, replicates: links.replicates, seal: links.seal, runSheet: links.runSheet },
  recorded: { contentId: provenance.contentId, bytesSha256: provenance.bytesSha256, resultSha256: provenance.resultSha256, replicatesSha256: provenance.replicatesSha256 },
});
