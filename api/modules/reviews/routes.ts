import type { EntityManager } from '@mikro-orm/postgresql';
import { z } from 'zod';
import { pageQuery } from '#shared/contracts/common.ts';
import { review, reviewDecided, reviewDecision, reviewQueue } from '#shared/contracts/reviews.ts';
import { Submission } from '#api/entities/submission.ts';
import type { Caller } from '#api/lib/caller.ts';
import { pageFrom, readTimeCursor } from '#api/lib/cursor.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import type { Deps } from '#api/lib/deps.ts';
import { workOf } from '#api/lib/work-of.ts';
import { loadSubmission } from '#api/modules/submissions/routes.ts';
import { findSubmission } from '#api/modules/submissions/service.ts';
import { presentReview, presentReviewItem } from './presenter.ts';
import { claimReview, decide, releaseReview } from './service.ts';

const one = z.object({ id: z.string().max(20) });

const presentFresh = async ({ em, params, caller, deps }: { em: EntityManager; params: { id: string }; caller: Caller; deps: Deps }) => {
  const fork = em.fork();
  return presentReview(fork, await findSubmission(fork, params.id), caller, deps.clock.now());
};

export const reviewRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/reviews',
    action: 'review.queue',
    summary: 'Submissions in review that this curator may decide on, oldest first; the others by number and organisation only.',
    query: pageQuery,
    response: reviewQueue,
    handler: async ({ em, query, caller, deps }) => {
      const after = readTimeCursor(query.cursor);
      const tied = [...caller.asker.interestIn];
      const rows = await em.find(
        Submission,
        { state: 'in-review', organisation: { $nin: tied }, ...(after ? { $or: [{ sentAt: { $gt: after.at } }, { sentAt: after.at, id: { $gt: after.id } }] } : {}) },
        { orderBy: { sentAt: 'asc', id: 'asc' }, limit: query.limit + 1, populate: ['organisation', 'device.organisation', 'claimedBy'] },
      );
      const kept = tied.length === 0 ? [] : await em.find(Submission, { state: 'in-review', organisation: { $in: tied } }, { orderBy: { sentAt: 'asc', id: 'asc' }, populate: ['organisation'] });
      const now = deps.clock.now();
      return {
        ...pageFrom(rows, query.limit, (s) => [(s.sentAt ?? s.changedAt).toISOString(), s.id], (s) => presentReviewItem(s, caller, now)),
        kept: kept.map((s) => ({ id: s.id, organisation: s.organisation.unwrap().name })),
      };
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/reviews/:id',
    action: 'review.read',
    summary: 'A submission with what a curator needs beside it: drift by block and earlier results.',
    params: one,
    response: review,
    load: loadSubmission,
    handler: async ({ em, caller, deps, loaded }) => presentReview(em, loaded.submission, caller, deps.clock.now()),
  }),
  ...([['claim', 'review.claim', 'Takes a submission for review.', claimReview], ['release', 'review.release', 'Gives a submission back to the queue.', releaseReview]] as const).map(([verb, action, summary, act]) =>
    defineRoute({
      method: 'post',
      path: `/api/v1/reviews/:id/${verb}`,
      action,
      summary,
      params: one,
      response: review,
      load: loadSubmission,
      handler: async (scope) => {
        await act(workOf(scope), scope.params.id);
        return presentFresh(scope);
      },
    }),
  ),
  defineRoute({
    method: 'post',
    path: '/api/v1/reviews/:id/decision',
    action: 'review.decide',
    summary: 'Accepts, returns or declines. Accepting freezes the submission in the same transaction.',
    params: one,
    body: reviewDecision,
    response: reviewDecided,
    load: loadSubmission,
    handler: async (scope) => {
      const { submission, entry } = await decide(workOf(scope), scope.params.id, scope.body);
      return { submission: submission.id, state: submission.state, entry };
    },
  }),
];
