import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { TimedOpinion } from '#shared/contracts/opinions.ts';
import { instant } from './columns.ts';

export const secondOpinionStates = ['waiting', 'done', 'failed'] as const;

/** Second opinions on one estimate: owed, made, or failed with the reason. Unchangeable once made. */
export const SecondOpinion = defineEntity({
  name: 'SecondOpinion',
  tableName: 'second_opinion',
  properties: {
    estimateId: p.uuid().primary(),
    submissionId: p.string(),
    state: p.string().$type<(typeof secondOpinionStates)[number]>(),
    reason: p.text().nullable(),
    opinions: p.json<TimedOpinion[]>().nullable(),
    officialSeconds: p.double().$type<number>().nullable(),
    queuedAt: instant(),
    madeAt: instant().nullable(),
  },
});
export type SecondOpinion = InferEntity<typeof SecondOpinion>;
