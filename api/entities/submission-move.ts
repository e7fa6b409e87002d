import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { SubmissionState } from '#shared/domain/life-cycle.ts';
import { instant } from './columns.ts';

/** One move in a submission's life. Append-only. */
export const SubmissionMove = defineEntity({
  name: 'SubmissionMove',
  tableName: 'submission_move',
  properties: {
    id: p.bigint('string').primary().autoincrement(),
    submissionId: p.string(),
    move: p.string(),
    state: p.string().$type<SubmissionState>(),
    at: instant(),
    /** Who moved it, as a person reads it; null for the registry itself. */
    byName: p.string().nullable(),
    byId: p.uuid().nullable(),
    reason: p.text().nullable(),
  },
});
export type SubmissionMove = InferEntity<typeof SubmissionMove>;
