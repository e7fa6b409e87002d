import { queryOptions } from '@tanstack/react-query';
import { campaign, campaignList, campaignPlan, type CampaignView } from '#shared/contracts/campaigns.ts';
import { methodList } from '#shared/contracts/methods.ts';
import type { CampaignMove } from '#shared/domain/campaigns.ts';
import { apiGet, apiSend } from '#web/lib/api-client.ts';

const address = '/api/v1/campaigns';
/** A campaign moves by itself: while one is open the page is read again this often. */
const whileOpenMs = 2_000;

export const methodsQuery = () => queryOptions({ queryKey: ['methods'], queryFn: ({ signal }) => apiGet('/api/v1/methods', methodList, { signal }) });

export const campaignsQuery = () =>
  queryOptions({
    queryKey: ['campaigns'],
    queryFn: ({ signal }) => apiGet(address, campaignList, { signal, query: { limit: 100 } }),
    refetchInterval: ({ state }) => (state.data?.items.some((c) => c.state === 'running' || c.counts.running > 0) ? whileOpenMs : false),
  });

export const campaignQuery = (id: string) =>
  queryOptions({
    queryKey: ['campaign', id],
    queryFn: ({ signal }) => apiGet(`${address}/${encodeURIComponent(id)}`, campaign, { signal }),
    refetchInterval: ({ state }) => (state.data && (state.data.state === 'running' || state.data.counts.running > 0) ? whileOpenMs : false),
  });

/** What a campaign would do now; read again whenever it is looked at. */
export const campaignPlanQuery = (method: string) =>
  queryOptions({ queryKey: ['campaign-plan', method], staleTime: 0, queryFn: ({ signal }) => apiGet(`${address}/plan`, campaignPlan, { signal, query: { method } }) });

export const startCampaign = (method: string): Promise<CampaignView> => apiSend('POST', address, campaign, { json: { method } });
export const moveCampaign = (id: string, move: CampaignMove): Promise<CampaignView> => apiSend('POST', `${address}/${encodeURIComponent(id)}/${move}`, campaign);
