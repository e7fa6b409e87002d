import { queryOptions } from '@tanstack/react-query';
import { gateClassList } from '#shared/contracts/gate-classes.ts';
import { apiGet } from '#web/lib/api-client.ts';

/** The gate classes a sheet can be drawn for. They never change once published. */
export const gateClassesQuery = () =>
  queryOptions({ queryKey: ['gate-classes'], staleTime: Number.POSITIVE_INFINITY, queryFn: ({ signal }) => apiGet('/api/v1/gate-classes', gateClassList, { signal }) });
