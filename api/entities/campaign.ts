import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { CampaignState } from '#shared/domain/campaigns.ts';
import { instant } from './columns.ts';
import { User } from './user.ts';

/** One run of all public entries through another method version. Its items are rows of campaign_item, its results of entry_result. */
export const Campaign = defineEntity({
  name: 'Campaign',
  tableName: 'campaign',
  properties: {
    /** "C-000003" */
    id: p.string().primary(),
    method: p.string(),
    state: p.string().$type<CampaignState>(),
    startedBy: () => p.manyToOne(User).ref(),
    startedAt: instant(),
    changedAt: instant(),
    endedAt: instant().nullable(),
  },
});
export type Campaign = InferEntity<typeof Campaign>;
