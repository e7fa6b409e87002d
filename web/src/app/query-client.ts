import { QueryClient } from '@tanstack/react-query';
import { asApiError } from '#web/lib/api-error.ts';

/** One repeat after a lost connection or a 5xx answer; a named problem (4xx) or an answer of the wrong form is final. */
const mayRetry = (failures: number, error: Error): boolean => {
  const { fault, status } = asApiError(error);
  return failures < 1 && (fault === 'offline' || (fault === 'problem' && status >= 500));
};

export const createQueryClient = (): QueryClient =>
  new QueryClient({
    defaultOptions: {
      queries: { staleTime: 30_000, retry: mayRetry, refetchOnWindowFocus: false },
      mutations: { retry: false },
    },
  });
