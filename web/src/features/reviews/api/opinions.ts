import { queryOptions } from '@tanstack/react-query';
import { opinions } from '#shared/contracts/opinions.ts';
import { opinionPolling } from '#web/components/opinions/opinion-words.ts';
import { apiGet } from '#web/lib/api-client.ts';

/** Second opinions on the estimate of a submission. */
export const submissionOpinionsQuery = (id: string) =>
  queryOptions({
    queryKey: ['submission-opinions', id],
    queryFn: ({ signal }) => apiGet(`/api/v1/submissions/${id}/opinions`, opinions, { signal }),
    refetchInterval: (query) => opinionPolling(query.state.data?.state),
  });
