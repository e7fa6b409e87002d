import { queryOptions } from '@tanstack/react-query';
import { opinions } from '#shared/contracts/opinions.ts';
import { opinionPolling } from '#web/components/opinions/opinion-words.ts';
import { apiGet } from '#web/lib/api-client.ts';

/** Second opinions on a version of an entry. */
export const entryOpinionsQuery = (accession: string, version: number) =>
  queryOptions({
    queryKey: ['entry-opinions', accession, version],
    queryFn: ({ signal }) => apiGet(`/api/v1/entries/${encodeURIComponent(accession)}/v/${version}/opinions`, opinions, { signal }),
    refetchInterval: (query) => opinionPolling(query.state.data?.state),
  });
