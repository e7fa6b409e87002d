import type { EntityManager } from '@mikro-orm/postgresql';
import type { CampaignSummary, CampaignView } from '#shared/contracts/campaigns.ts';
import type { Campaign } from '#api/entities/campaign.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { contributorsFirst } from './advance.ts';
import { countItems, type ItemCounts } from './store.ts';

const mostProblems = 200;

const summarise = (campaign: Campaign, counts: ItemCounts): CampaignSummary => ({
  id: campaign.id,
  method: campaign.method,
  state: campaign.state,
  startedBy: campaign.startedBy.unwrap().name,
  startedAt: campaign.startedAt.toISOString(),
  changedAt: campaign.changedAt.toISOString(),
  endedAt: campaign.endedAt?.toISOString() ?? null,
  counts: { total: Object.values(counts).reduce((a, b) => a + b, 0), ...counts },
});

export const presentCampaigns = async (em: EntityManager, campaigns: readonly Campaign[]): Promise<CampaignSummary[]> => {
  const counts = await countItems(em, campaigns.map((c) => c.id));
  return campaigns.map((campaign) => summarise(campaign, counts.get(campaign.id)!));
};

/** A campaign with what runs now and what went wrong. */
export const presentCampaign = async (em: EntityManager, campaign: Campaign): Promise<CampaignView> => {
  const summary = (await presentCampaigns(em, [campaign]))[0]!;
  const running = await runSql<CampaignView['running'][number]>(em, `
    select v.accession, v.version, r.stage, coalesce(r.fraction, 0) as fraction
      from campaign_item i join entry_version v on v.id = i.entry_version_id left join job_run r on r.id = i.job_id
     where i.campaign_id = $1 and i.state = 'running' order by i.place`, [campaign.id]);
  const problems = await runSql<CampaignView['problems'][number]>(em, `
    select v.accession, v.version, i.state, i.attempts, i.fault as reason, i.changed_at as at
      from campaign_item i join entry_version v on v.id = i.entry_version_id
     where i.campaign_id = $1 and i.state in ('failed', 'skipped') order by i.place limit ${mostProblems}`, [campaign.id]);
  const idle = summary.state === 'running' && summary.counts.waiting > 0 && summary.counts.queued + summary.counts.running === 0;
  return {
    ...summary,
    held: idle && (await contributorsFirst(em)),
    running,
    problems: problems.map((p) => ({ ...p, at: new Date(p.at).toISOString() })),
  };
};
