import { queryOptions } from '@tanstack/react-query';
import { jobsOverview, mailOverview, peopleOverview } from '#shared/contracts/office.ts';
import { apiDo, apiGet } from '#web/lib/api-client.ts';

export const jobsQuery = () => queryOptions({ queryKey: ['jobs'], queryFn: ({ signal }) => apiGet('/api/v1/jobs', jobsOverview, { signal }), refetchInterval: 5_000 });
export const mailQuery = () => queryOptions({ queryKey: ['mail'], queryFn: ({ signal }) => apiGet('/api/v1/mail', mailOverview, { signal }), refetchInterval: 15_000 });
export const peopleQuery = () => queryOptions({ queryKey: ['people'], queryFn: ({ signal }) => apiGet('/api/v1/people', peopleOverview, { signal }) });

export const retryJob = ({ queue, id }: { queue: string; id: string }): Promise<void> => apiDo('POST', `/api/v1/jobs/${encodeURIComponent(queue)}/${encodeURIComponent(id)}/retry`);
