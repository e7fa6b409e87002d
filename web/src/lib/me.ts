import { queryOptions, useQuery } from '@tanstack/react-query';
import { me, type Me } from '#shared/contracts/session.ts';
import { apiGet, keepCsrfToken } from './api-client.ts';

/** Who is asking. Kept for five minutes; changes on sign-in and sign-out, which reload the page. */
export const meQuery = () =>
  queryOptions({
    queryKey: ['me'],
    staleTime: 5 * 60_000,
    queryFn: async ({ signal }): Promise<Me> => {
      const answer = await apiGet('/api/v1/me', me, { signal });
      keepCsrfToken(answer.csrfToken);
      return answer;
    },
  });

/** The person at the screen, or null while unknown. */
export const useMe = (): Me | null => useQuery(meQuery()).data ?? null;

export const isContributor = (person: Me | null): boolean => person?.organisations.some((o) => o.role === 'contributor') ?? false;

/** Where sign-in starts; afterwards the reader is back at `returnTo`. */
export const signInAddress = (returnTo: string): string => `/auth/google?returnTo=${encodeURIComponent(returnTo)}`;
