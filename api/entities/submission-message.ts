import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';

export const messageRoles = ['contributor', 'curator', 'registry'] as const;

/** A message in a submission's thread. Append-only; names are kept as they were when it was written. */
export const SubmissionMessage = defineEntity({
  name: 'SubmissionMessage',
  tableName: 'submission_message',
  properties: {
    id: uuidKey(),
    submissionId: p.string(),
    role: p.string().$type<(typeof messageRoles)[number]>(),
    authorId: p.uuid().nullable(),
    authorName: p.string(),
    organisationName: p.string().nullable(),
    at: instant(),
    body: p.text(),
  },
});
export type SubmissionMessage = InferEntity<typeof SubmissionMessage>;
