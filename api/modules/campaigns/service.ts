import { campaignMoves, campaignStateWords, mayMoveCampaign, type CampaignMove } from '#shared/domain/campaigns.ts';
import { campaignIdOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { findMethod, methodVersions } from '#shared/method/versions.ts';
import { Campaign } from '#api/entities/campaign.ts';
import { requireActor } from '#api/lib/actor.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { nextNumber } from '#api/lib/names.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { advanceCampaign } from './advance.ts';
import { listItems } from './scope.ts';
import { countItems, lockCampaign } from './store.ts';

/** Refuses a version that this build does not have. */
export const requireVersion = (id: string): string => {
  if (!findMethod(id)) throw new AppError('invalid-request', `/method: this registry has no method version ${JSON.stringify(id)}; it has ${methodVersions.map((v) => v.id).join(', ')}.`, [{ pointer: '/method', message: `Not one of ${methodVersions.map((v) => v.id).join(', ')}. Given: ${JSON.stringify(id)}.` }]);
  return id;
};

const openOf = (work: Work, method: string): Promise<Campaign | null> => work.em.findOne(Campaign, { method, state: { $in: ['running', 'paused'] } });

const noted = (work: Work, id: string, action: string, detail: Record<string, unknown>): void => {
  recordAudit(work.em, { at: work.clock.now(), action, ...(work.caller ? { caller: work.caller } : {}), subjectType: 'campaign', subjectId: id, requestId: work.requestId ?? null, detail });
};

/** Starts a campaign over every public version that has no result by this method version yet. */
export const startCampaign = (work: Work, method: string): Promise<string> =>
  inTransaction(work, async (tx) => {
    requireVersion(method);
    const { userId } = await requireActor(tx);
    // Starts take turns, so that the second of two hears of the first instead of the index.
    await runSql(tx.em, `select pg_advisory_xact_lock(hashtext('campaign:' || $1))`, [method]);
    const open = await openOf(tx, method);
    if (open) throw new AppError('already-exists', `A campaign for ${method} is open already: ${open.id}. Let it end, or cancel it.`);
    const now = tx.clock.now();
    const id = campaignIdOf(await nextNumber(tx.em, 'campaign_number'));
    tx.em.create(Campaign, { id, method, state: 'running', startedBy: userId, startedAt: now, changedAt: now, endedAt: null });
    await tx.em.flush();
    const items = await listItems(tx.em, id, method, now);
    if (items === 0) throw new AppError('wrong-state', `There is nothing to estimate: every public version has a result by ${method} already.`);
    noted(tx, id, 'campaign.start', { method, items });
    await advanceCampaign(tx, id);
    return id;
  });

/** What a move does to items: cancelling ends what has not begun; trying again makes what failed wait. Running items always end by themselves. */
const moveItems = async (tx: Work, id: string, move: CampaignMove): Promise<void> => {
  const now = tx.clock.now();
  if (move === 'cancel') await runSql(tx.em, `update campaign_item set state = 'cancelled', changed_at = $2 where campaign_id = $1 and state in ('waiting', 'queued')`, [id, now]);
  if (move === 'retry') await runSql(tx.em, `update campaign_item set state = 'waiting', attempts = 0, fault = null, changed_at = $2 where campaign_id = $1 and state = 'failed'`, [id, now]);
};

/** Pauses, goes on, cancels or tries again. */
export const moveCampaign = (work: Work, id: string, move: CampaignMove): Promise<void> =>
  inTransaction(work, async (tx) => {
    const campaign = await lockCampaign(tx.em, id);
    if (!mayMoveCampaign(move, campaign.state)) throw new AppError('wrong-state', `This cannot be done now: ${id} is "${campaignStateWords[campaign.state].toLowerCase()}".`);
    const counts = (await countItems(tx.em, [id])).get(id)!;
    if (move === 'retry' && counts.failed === 0) throw new AppError('wrong-state', `Nothing of ${id} has failed.`);
    if (move === 'retry' && campaign.state === 'finished') {
      const open = await openOf(tx, campaign.method);
      if (open) throw new AppError('already-exists', `A newer campaign for ${campaign.method} is open: ${open.id}. It takes up what failed here.`);
    }
    const { to } = campaignMoves[move];
    const now = tx.clock.now();
    tx.em.assign(campaign, { state: to, changedAt: now, endedAt: to === 'cancelled' ? now : null });
    await moveItems(tx, id, move);
    noted(tx, id, `campaign.${move}`, { waiting: counts.waiting + counts.queued, running: counts.running, failed: counts.failed });
    await tx.em.flush();
    await advanceCampaign(tx, id);
  });
