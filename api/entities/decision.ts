import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';
import { User } from './user.ts';

export const decisionOutcomes = ['accepted', 'returned', 'declined'] as const;

/** A curator's decision on one round of a submission. Append-only. */
export const Decision = defineEntity({
  name: 'Decision',
  tableName: 'decision',
  properties: {
    id: uuidKey(),
    submissionId: p.string(),
    round: p.integer(),
    outcome: p.string().$type<(typeof decisionOutcomes)[number]>(),
    reason: p.text(),
    curator: () => p.manyToOne(User).ref(),
    at: instant(),
  },
});
export type Decision = InferEntity<typeof Decision>;
