import type { EntityManager } from '@mikro-orm/postgresql';
import type { CampaignPlan } from '#shared/contracts/campaigns.ts';
import { runSql } from '#api/lib/run-sql.ts';

/** Every version of every entry with its newest state, and whether it has a result by method version $1. */
const standing = `
  select v.id, v.accession, v.version,
         (select s.state from entry_state s where s.accession = v.accession and s.version = v.version order by s.id desc limit 1) as state,
         v.method = $1 or exists (select 1 from entry_result r where r.entry_version_id = v.id and r.method = $1) as present
    from entry_version v`;
const isPublic = `state in ('frozen', 'superseded')`;

/** What a campaign under this version would do if it were started now. */
export const planCampaign = async (em: EntityManager, method: string): Promise<CampaignPlan> => {
  const [row] = await runSql<Record<'to_estimate' | 'present' | 'embargoed' | 'withdrawn', string>>(
    em,
    `select count(*) filter (where ${isPublic} and not present) as to_estimate, count(*) filter (where ${isPublic} and present) as present,
            count(*) filter (where state = 'embargoed') as embargoed, count(*) filter (where state = 'withdrawn') as withdrawn
       from (${standing}) v`,
    [method],
  );
  return { method, toEstimate: Number(row?.to_estimate), present: Number(row?.present), embargoed: Number(row?.embargoed), withdrawn: Number(row?.withdrawn) };
};

/** Writes one item for each public version without a result, in the order of accessions. Returns how many. */
export const listItems = async (em: EntityManager, campaign: string, method: string, at: Date): Promise<number> => {
  const rows = await runSql(
    em,
    `insert into campaign_item (campaign_id, entry_version_id, place, state, changed_at)
     select $2, id, row_number() over (order by accession, version), 'waiting', $3 from (${standing}) v where ${isPublic} and not present returning place`,
    [method, campaign, at],
  );
  return rows.length;
};
