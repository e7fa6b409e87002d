import { queryOptions } from '@tanstack/react-query';
import { review, reviewDecided, reviewQueue, type Review, type ReviewDecision } from '#shared/contracts/reviews.ts';
import { message } from '#shared/contracts/submissions.ts';
import { apiGet, apiSend } from '#web/lib/api-client.ts';

const address = '/api/v1/reviews';

/** What waits for this curator, oldest first. Others decide too, so it is read again every minute. */
export const reviewQueueQuery = () =>
  queryOptions({ queryKey: ['reviews'], queryFn: ({ signal }) => apiGet(address, reviewQueue, { signal }), refetchInterval: 60_000 });

export const reviewQuery = (id: string) =>
  queryOptions({ queryKey: ['review', id], queryFn: ({ signal }) => apiGet(`${address}/${id}`, review, { signal }) });

export const claimReview = (id: string): Promise<Review> => apiSend('POST', `${address}/${id}/claim`, review);
export const releaseReview = (id: string): Promise<Review> => apiSend('POST', `${address}/${id}/release`, review);
export const decideReview = (id: string, decision: ReviewDecision) => apiSend('POST', `${address}/${id}/decision`, reviewDecided, { json: decision });
export const writeReviewMessage = (id: string, body: string) => apiSend('POST', `/api/v1/submissions/${id}/messages`, message, { json: { body } });
