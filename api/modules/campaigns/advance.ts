import type { EntityManager } from '@mikro-orm/postgresql';
import { Campaign } from '#api/entities/campaign.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { countItems, lockCampaign, moveItem } from './store.ts';

/** Items that stand in the queue or run at one time: enough for a few workers, few enough that a pause is felt at once. */
export const mostHandedOut = 4;

/** Does work of contributors wait or run? What is put off to a later time does not count. */
export const contributorsFirst = async (em: EntityManager): Promise<boolean> => {
  const [row] = await runSql<{ busy: boolean }>(em, `select exists (
    select 1 from pgboss.job where name in ('estimate', 'draw-sheet') and (state = 'active' or (state in ('created', 'retry') and start_after <= now()))) as busy`);
  return row?.busy ?? false;
};

/** Items whose job is gone without having ended them (stopped on its last attempt, or lost with the queue) wait again. */
const takeBackLost = async (em: EntityManager, id: string, at: Date): Promise<void> => {
  await runSql(em, `update campaign_item i set state = 'waiting', job_id = null, changed_at = $2
    where campaign_id = $1 and state in ('queued', 'running')
      and not exists (select 1 from pgboss.job j where j.name = 're-estimate' and j.id = i.job_id and j.state in ('created', 'retry', 'active'))`, [id, at]);
};

/**
 * One step of a running campaign: takes back what was lost, hands out the next items while no work of contributors waits,
 * and ends the campaign when nothing is left. Safe to call at any time and as often as one likes.
 */
export const advanceCampaign = (work: Work, id: string): Promise<void> =>
  inTransaction(work, async ({ em, clock, queue }) => {
    const campaign = await lockCampaign(em, id);
    if (campaign.state !== 'running') return;
    const now = clock.now();
    await takeBackLost(em, id, now);
    const counts = (await countItems(em, [id])).get(id)!;
    const handedOut = counts.queued + counts.running;
    if (counts.waiting + handedOut === 0) {
      em.assign(campaign, { state: 'finished', changedAt: now, endedAt: now });
      recordAudit(em, { at: now, action: 'campaign.finish', subjectType: 'campaign', subjectId: id, detail: { done: counts.done, failed: counts.failed, skipped: counts.skipped } });
      return;
    }
    const room = Math.min(mostHandedOut - handedOut, counts.waiting);
    if (room <= 0 || (await contributorsFirst(em))) return;
    const next = await runSql<{ id: string }>(em, `select entry_version_id as id from campaign_item where campaign_id = $1 and state = 'waiting' order by place limit $2`, [id, room]);
    for (const { id: entryVersion } of next) {
      const jobId = await queue.send('re-estimate', { campaign: id, entryVersion }, { em });
      await moveItem(em, id, entryVersion, { state: 'queued', at: now, jobId });
    }
  });

/** The same for every running campaign; each in a transaction of its own. */
export const advanceCampaigns = async (work: Work): Promise<void> => {
  const running = await work.em.fork().find(Campaign, { state: 'running' }, { fields: ['id'], orderBy: { id: 'asc' } });
  for (const { id } of running) await advanceCampaign(work, id);
};
