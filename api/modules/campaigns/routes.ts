import { z } from 'zod';
import { campaign, campaignList, campaignPlan, campaignPlanQuery, campaignStart } from '#shared/contracts/campaigns.ts';
import { pageQuery } from '#shared/contracts/common.ts';
import { Campaign } from '#api/entities/campaign.ts';
import { pageFrom, readCursor } from '#api/lib/cursor.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { presentCampaign, presentCampaigns } from './presenter.ts';
import { planCampaign } from './scope.ts';
import { moveCampaign, requireVersion, startCampaign } from './service.ts';
import { findCampaign } from './store.ts';

const one = z.object({ id: z.string().max(20) });

export const campaignRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/campaigns',
    action: 'campaign.read',
    summary: 'Re-estimation campaigns, newest first.',
    query: pageQuery,
    response: campaignList,
    handler: async ({ em, query }) => {
      const [before] = readCursor(query.cursor, 1) ?? [];
      const rows = await em.find(Campaign, before === undefined ? {} : { id: { $lt: before } }, { orderBy: { id: 'desc' }, limit: query.limit + 1, populate: ['startedBy'] });
      const page = pageFrom(rows, query.limit, (c) => [c.id], (c) => c);
      return { items: await presentCampaigns(em, page.items), nextCursor: page.nextCursor };
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/campaigns/plan',
    action: 'campaign.read',
    summary: 'What a campaign under a method version would do if it were started now.',
    query: campaignPlanQuery,
    response: campaignPlan,
    handler: async ({ em, query }) => planCampaign(em, requireVersion(query.method)),
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/campaigns',
    action: 'campaign.start',
    summary: 'Starts the re-estimation of every public version that has no result by this method version yet.',
    body: campaignStart,
    response: campaign,
    status: 201,
    handler: async (scope) => {
      const id = await startCampaign(workOf(scope), scope.body.method);
      const em = scope.em.fork();
      return reply(await presentCampaign(em, await findCampaign(em, id)), { status: 201, headers: { location: `/api/v1/campaigns/${id}` } });
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/campaigns/:id',
    action: 'campaign.read',
    summary: 'A campaign: how far it is, what runs now, what failed and why.',
    params: one,
    response: campaign,
    handler: async ({ em, params }) => presentCampaign(em, await findCampaign(em, params.id)),
  }),
  ...([
    ['pause', 'campaign.pause', 'Hands out nothing more; what runs ends by itself.'],
    ['resume', 'campaign.resume', 'Goes on where the campaign was paused.'],
    ['cancel', 'campaign.cancel', 'Ends the campaign; results that are there stay.'],
    ['retry', 'campaign.retry', 'Tries again what failed.'],
  ] as const).map(([move, action, summary]) =>
    defineRoute({
      method: 'post',
      path: `/api/v1/campaigns/:id/${move}`,
      action,
      summary,
      params: one,
      response: campaign,
      handler: async (scope) => {
        await moveCampaign(workOf(scope), scope.params.id, move);
        const em = scope.em.fork();
        return presentCampaign(em, await findCampaign(em, scope.params.id));
      },
    })),
];
