import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { DatasetSummary } from '#api/modules/submissions/dataset-summary.ts';
import { instant } from './columns.ts';

/** A dataset file as it was received. Append-only; the bytes themselves are a column read only in pieces (file-store.ts). */
export const SubmissionFile = defineEntity({
  name: 'SubmissionFile',
  tableName: 'submission_file',
  properties: {
    id: p.uuid().primary(),
    submissionId: p.string(),
    round: p.integer(),
    name: p.string(),
    size: p.integer(),
    contentId: p.string(),
    bytesSha256: p.string().fieldName('bytes_sha256'),
    summary: p.json<DatasetSummary>(),
    receivedAt: instant(),
  },
});
export type SubmissionFile = InferEntity<typeof SubmissionFile>;
