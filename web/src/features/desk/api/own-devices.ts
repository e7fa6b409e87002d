import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { deviceList, deviceSummary, type deviceCreate, type DeviceSummary } from '#shared/contracts/devices.ts';
import { apiGet, apiSend } from '#web/lib/api-client.ts';

const address = '/api/v1/devices';

/** The devices of one organisation, those without an entry among them. */
export const ownDevicesQuery = (organisation: string) =>
  queryOptions({ queryKey: ['own-devices', organisation], queryFn: ({ signal }) => apiGet(`/api/v1/organisations/${encodeURIComponent(organisation)}/devices`, deviceList, { signal }) });

export const addDevice = (device: z.infer<typeof deviceCreate>): Promise<DeviceSummary> => apiSend('POST', address, deviceSummary, { json: device });
