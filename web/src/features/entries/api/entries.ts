import { queryOptions } from '@tanstack/react-query';
import { entry, entryList } from '#shared/contracts/entries.ts';
import { versionResults } from '#shared/contracts/methods.ts';
import { apiGet } from '#web/lib/api-client.ts';

/** One entry: a version of it, or the newest when `version` is null. */
export const entryQuery = (accession: string, version: number | null) =>
  queryOptions({
    queryKey: ['entry', accession, version],
    queryFn: ({ signal }) => apiGet(`/api/v1/entries/${encodeURIComponent(accession)}${version === null ? '' : `/v/${version}`}`, entry, { signal }),
  });

/** Entries, newest first; `q` is free text over device, provider and accession. */
export const entriesQuery = (filter: { q?: string; device?: string; limit?: number; cursor?: string }) =>
  queryOptions({ queryKey: ['entries', filter], queryFn: ({ signal }) => apiGet('/api/v1/entries', entryList, { signal, query: { ...filter } }) });

/** Every result of a version: the frozen one, and those that campaigns added. */
export const versionResultsQuery = (accession: string, version: number) =>
  queryOptions({
    queryKey: ['version-results', accession, version],
    queryFn: ({ signal }) => apiGet(`/api/v1/entries/${encodeURIComponent(accession)}/v/${version}/results`, versionResults, { signal }),
  });
