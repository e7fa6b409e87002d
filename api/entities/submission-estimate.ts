import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { SealedPoint } from '#shared/contracts/entries.ts';
import type { BlockMisfit } from '#shared/domain/checks.ts';
import type { ResultSummary } from '#api/modules/submissions/result-summary.ts';
import { instant } from './columns.ts';

/** The estimate of one round. Append-only; result and replicates as bytes are columns read through file-store.ts. */
export const SubmissionEstimate = defineEntity({
  name: 'SubmissionEstimate',
  tableName: 'submission_estimate',
  properties: {
    id: p.uuid().primary(),
    submissionId: p.string(),
    round: p.integer(),
    method: p.string(),
    resultSha256: p.string().fieldName('result_sha256'),
    replicatesSha256: p.string().fieldName('replicates_sha256'),
    replicateCount: p.integer(),
    summary: p.json<ResultSummary>(),
    drift: p.json<BlockMisfit[]>(),
    /** Names sealed circuits: shown only from the moment of freezing. */
    sealedPoints: p.json<SealedPoint[]>(),
    madeAt: instant(),
  },
});
export type SubmissionEstimate = InferEntity<typeof SubmissionEstimate>;
