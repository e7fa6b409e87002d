import { queryOptions } from '@tanstack/react-query';
import { message, submission, submissionList, type Submission, type SubmissionRecord } from '#shared/contracts/submissions.ts';
import { apiGet, apiSend } from '#web/lib/api-client.ts';

export const submissionsAddress = '/api/v1/submissions';
const one = (id: string): string => `${submissionsAddress}/${id}`;

/** Twice a second while the registry checks and estimates. */
const checkingPollMs = 500;

export const isChecking = (s: Pick<Submission, 'state'>): boolean => s.state === 'draft' || s.state === 'checking' || s.state === 'accepted';

/** The submissions of one organisation, newest first. */
export const submissionsQuery = (organisation: string) =>
  queryOptions({
    queryKey: ['submissions', organisation],
    queryFn: ({ signal }) => apiGet(submissionsAddress, submissionList, { query: { organisation }, signal }),
    refetchInterval: ({ state }) => (state.data?.items.some(isChecking) ? 4 * checkingPollMs : false),
  });

export const submissionQuery = (id: string) =>
  queryOptions({
    queryKey: ['submission', id],
    queryFn: ({ signal }) => apiGet(one(id), submission, { signal }),
    refetchInterval: ({ state }) => (state.data && isChecking(state.data) ? checkingPollMs : false),
  });

export const saveRecord = (id: string, record: Partial<SubmissionRecord>): Promise<Submission> => apiSend('PATCH', one(id), submission, { json: record });
export const sendToReview = (id: string): Promise<Submission> => apiSend('POST', `${one(id)}/submit`, submission);
export const cancelSubmission = (id: string): Promise<Submission> => apiSend('POST', `${one(id)}/cancel`, submission);
export const writeMessage = (id: string, body: string) => apiSend('POST', `${one(id)}/messages`, message, { json: { body } });
