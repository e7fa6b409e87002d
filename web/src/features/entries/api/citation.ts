import { queryOptions } from '@tanstack/react-query';
import { citation } from '#shared/contracts/citations.ts';
import { apiGet } from '#web/lib/api-client.ts';

/** How one version is cited: styles, formats, DOI. */
export const citationQuery = (accession: string, version: number) =>
  queryOptions({
    queryKey: ['citation', accession, version],
    queryFn: ({ signal }) => apiGet(`/api/v1/entries/${encodeURIComponent(accession)}/v/${version}/citation`, citation, { signal }),
  });
