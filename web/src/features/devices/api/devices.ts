import { queryOptions } from '@tanstack/react-query';
import { device, deviceList } from '#shared/contracts/devices.ts';
import { apiGet } from '#web/lib/api-client.ts';

export const deviceListQuery = (cursor?: string) =>
  queryOptions({ queryKey: ['devices', cursor ?? null], queryFn: ({ signal }) => apiGet('/api/v1/devices', deviceList, { signal, query: { limit: 200, cursor } }) });

export const deviceQuery = (id: string) => queryOptions({ queryKey: ['device', id], queryFn: ({ signal }) => apiGet(`/api/v1/devices/${encodeURIComponent(id)}`, device, { signal }) });
