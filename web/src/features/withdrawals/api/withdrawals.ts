import { queryOptions } from '@tanstack/react-query';
import { withdrawal, withdrawalList, type Withdrawal, type WithdrawalAnswered, type WithdrawalAsked } from '#shared/contracts/withdrawals.ts';
import { apiGet, apiSend } from '#web/lib/api-client.ts';

/** Other curators answer too, so it is read again every minute. */
export const withdrawalsQuery = () =>
  queryOptions({ queryKey: ['withdrawals'], queryFn: ({ signal }) => apiGet('/api/v1/withdrawals', withdrawalList, { signal }), refetchInterval: 60_000 });

export const askWithdrawal = ({ accession, version }: { accession: string; version: number }, asked: WithdrawalAsked): Promise<Withdrawal> =>
  apiSend('POST', `/api/v1/entries/${accession}/v/${version}/withdrawal`, withdrawal, { json: asked });
export const answerWithdrawal = (id: string, answer: WithdrawalAnswered): Promise<Withdrawal> => apiSend('POST', `/api/v1/withdrawals/${id}/answer`, withdrawal, { json: answer });
