import { z } from 'zod';
import { campaignStates } from '#shared/domain/campaigns.ts';
import { pageOf, timestamp } from './common.ts';

/** GET /api/v1/campaigns/plan?method=M2 : what a campaign would do, counted in versions of entries. */
export const campaignPlan = z.object({
  method: z.string(),
  /** Public versions without a result by this method version: these would be estimated. */
  toEstimate: z.number().int(),
  /** Public versions that have one already. */
  present: z.number().int(),
  /** Left out: not public until a later date. */
  embargoed: z.number().int(),
  /** Left out: their data is no longer handed out. */
  withdrawn: z.number().int(),
});
export const campaignPlanQuery = z.object({ method: z.string().max(8) });

/** POST /api/v1/campaigns : steward. */
export const campaignStart = z.object({ method: z.string().max(8) });

export const campaignCounts = z.object({
  total: z.number().int(), waiting: z.number().int(), queued: z.number().int(), running: z.number().int(), done: z.number().int(),
  failed: z.number().int(), skipped: z.number().int(), cancelled: z.number().int(),
});

export const campaignSummary = z.object({
  /** "C-000003" */
  id: z.string(),
  method: z.string(),
  state: z.enum(campaignStates),
  startedBy: z.string(),
  startedAt: timestamp,
  changedAt: timestamp,
  endedAt: timestamp.nullable(),
  counts: campaignCounts,
});

const itemRef = { accession: z.string(), version: z.number().int() };
export const campaign = campaignSummary.extend({
  /** Nothing is handed out because estimates and run sheets of contributors come first. */
  held: z.boolean(),
  running: z.array(z.object({ ...itemRef, stage: z.string().nullable(), fraction: z.number() })),
  /** What failed for good and what was left out, with the reason; at most two hundred. */
  problems: z.array(z.object({ ...itemRef, state: z.enum(['failed', 'skipped']), attempts: z.number().int(), reason: z.string(), at: timestamp })),
});
export const campaignList = pageOf(campaignSummary);

export type CampaignPlan = z.infer<typeof campaignPlan>;
export type CampaignSummary = z.infer<typeof campaignSummary>;
export type CampaignView = z.infer<typeof campaign>;
