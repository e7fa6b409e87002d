import type { EntityManager } from '@mikro-orm/postgresql';
import type { CampaignItemState } from '#shared/domain/campaigns.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Campaign } from '#api/entities/campaign.ts';
import { runSql } from '#api/lib/run-sql.ts';

export const findCampaign = async (em: EntityManager, id: string): Promise<Campaign> => {
  const campaign = await em.findOne(Campaign, { id }, { populate: ['startedBy'] });
  if (!campaign) throw new AppError('not-found', `There is no campaign ${JSON.stringify(id)}.`);
  return campaign;
};

/** The same, held to the end of the transaction: whatever hands out, ends or moves items takes its turn. */
export const lockCampaign = async (em: EntityManager, id: string): Promise<Campaign> => {
  await runSql(em, 'select id from campaign where id = $1 for update', [id]);
  return findCampaign(em, id);
};

export type ItemCounts = Record<CampaignItemState, number>;

const noItems = (): ItemCounts => ({ waiting: 0, queued: 0, running: 0, done: 0, failed: 0, skipped: 0, cancelled: 0 });

/** How many items of each campaign are in which state. */
export const countItems = async (em: EntityManager, ids: readonly string[]): Promise<Map<string, ItemCounts>> => {
  const rows = await runSql<{ id: string; state: CampaignItemState; n: string }>(em, 'select campaign_id as id, state, count(*) as n from campaign_item where campaign_id = any($1) group by campaign_id, state', [ids]);
  const counts = new Map(ids.map((id) => [id, noItems()]));
  for (const { id, state, n } of rows) (counts.get(id) ?? noItems())[state] = Number(n);
  return counts;
};

export interface ItemMove {
  state: CampaignItemState;
  at: Date;
  fault?: string | null;
  jobId?: string | null;
}

/** Writes an item's state. The attempt is counted when it begins. */
export const moveItem = async (em: EntityManager, campaign: string, entryVersion: string, { state, at, fault = null, jobId = null }: ItemMove): Promise<void> => {
  await runSql(em, `update campaign_item set state = $3, changed_at = $4, fault = $5, job_id = $6, attempts = attempts + case when $3 = 'running' then 1 else 0 end where campaign_id = $1 and entry_version_id = $2`, [campaign, entryVersion, state, at, fault, jobId]);
};
