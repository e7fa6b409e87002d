import { queryOptions } from '@tanstack/react-query';
import { logGrowth, logHead, logLeafList } from '#shared/contracts/log.ts';
import { apiGet } from '#web/lib/api-client.ts';

export const logHeadQuery = () => queryOptions({ queryKey: ['log', 'head'], queryFn: ({ signal }) => apiGet('/api/v1/log/head', logHead, { signal }) });
export const logGrowthQuery = () => queryOptions({ queryKey: ['log', 'growth'], queryFn: ({ signal }) => apiGet('/api/v1/log/growth', logGrowth, { signal }) });
export const newestLeavesQuery = () => queryOptions({ queryKey: ['log', 'newest'], queryFn: ({ signal }) => apiGet('/api/v1/log/leaves', logLeafList, { signal, query: { order: 'newest', limit: 12 } }) });
