import { z } from 'zod';
import { pageQuery } from '#shared/contracts/common.ts';
import { message, messageCreate, submission, submissionList, submissionPatch } from '#shared/contracts/submissions.ts';
import { Submission } from '#api/entities/submission.ts';
import { pageFrom, readTimeCursor } from '#api/lib/cursor.ts';
import { defineRoute, type Loaded, type Route } from '#api/lib/define-route.ts';
import { bytes, reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { listOrganisations } from '#api/modules/devices/owner.ts';
import type { EntityManager } from '@mikro-orm/postgresql';
import { SubmissionFile } from '#api/entities/submission-file.ts';
import { streamBytes } from './file-store.ts';
import { presentItem, presentMessage, presentSubmission } from './presenter.ts';
import { cancelSubmission, changeRecord, findSubmission, sendToReview, writeMessage } from './service.ts';
import { uploadRoutes } from './upload-routes.ts';

const one = z.object({ id: z.string().max(20) });
type Found = Loaded & { submission: Submission };

export const loadSubmission = async ({ em, params }: { em: EntityManager; params: { id: string } }): Promise<Found> => {
  const found = await findSubmission(em, params.id);
  return { thing: { owner: found.organisation.id, state: found.state }, submission: found };
};

export const submissionRoutes: Route[] = [
  ...uploadRoutes,
  defineRoute({
    method: 'get',
    path: '/api/v1/submissions',
    action: 'submission.list',
    summary: 'The submissions of an organisation, newest first; of all the caller contributes to where none is named.',
    query: pageQuery.extend({ organisation: z.string().max(64).optional() }),
    response: submissionList,
    load: async ({ em, query, caller }) => listOrganisations(em, query.organisation, caller),
    handler: async ({ em, query, loaded }) => {
      const after = readTimeCursor(query.cursor);
      const rows = await em.find(
        Submission,
        { organisation: { $in: loaded.organisations }, ...(after ? { $or: [{ createdAt: { $lt: after.at } }, { createdAt: after.at, id: { $lt: after.id } }] } : {}) },
        { orderBy: { createdAt: 'desc', id: 'desc' }, limit: query.limit + 1, populate: ['device.organisation'], exclude: ['checks'] },
      );
      return pageFrom(rows, query.limit, (s) => [s.createdAt.toISOString(), s.id], presentItem);
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/submissions/:id',
    action: 'submission.read',
    summary: 'A submission: state, progress, checks, figures, history and thread.',
    params: one,
    response: submission,
    load: loadSubmission,
    handler: async ({ em, caller, loaded }) => presentSubmission(em, loaded.submission, caller.asker),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/submissions/:id/dataset',
    action: 'submission.read',
    summary: 'The dataset as it was sent, after Content-Encoding is removed.',
    params: one,
    produces: ['application/json'],
    load: loadSubmission,
    handler: async ({ em, loaded }) => {
      const file = await em.findOneOrFail(SubmissionFile, { id: loaded.submission.fileId });
      return bytes(streamBytes(em, 'dataset', file.id), 'application/json', {
        headers: { etag: `"${file.bytesSha256}"`, 'content-length': String(file.size), 'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(file.name)}` },
      });
    },
  }),
  defineRoute({
    method: 'patch',
    path: '/api/v1/submissions/:id',
    action: 'submission.edit',
    summary: 'Sets fields of the record: access to the device, interests, embargo, notes.',
    params: one,
    body: submissionPatch.strict(),
    response: submission,
    load: loadSubmission,
    handler: async (scope) => {
      await changeRecord(workOf(scope), scope.params.id, scope.body);
      return presentFresh(scope);
    },
  }),
  ...([['submit', 'submission.send', 'Sends a ready submission with a complete record to review.', sendToReview], ['cancel', 'submission.cancel', 'Cancels a submission; its run sheet can be used again.', cancelSubmission]] as const).map(
    ([verb, action, summary, act]) =>
      defineRoute({
        method: 'post',
        path: `/api/v1/submissions/:id/${verb}`,
        action,
        summary,
        params: one,
        response: submission,
        load: loadSubmission,
        handler: async (scope) => {
          await act(workOf(scope), scope.params.id);
          return presentFresh(scope);
        },
      }),
  ),
  defineRoute({
    method: 'post',
    path: '/api/v1/submissions/:id/messages',
    action: 'submission.write-message',
    summary: 'Writes to the thread of a submission.',
    params: one,
    body: messageCreate,
    response: message,
    status: 201,
    load: loadSubmission,
    handler: async (scope) => reply(presentMessage(await writeMessage(workOf(scope), scope.params.id, scope.body.body)), { status: 201 }),
  }),
];

/** Read again after a move, with a fresh view of the database. */
export const presentFresh = async ({ em, params, caller }: { em: EntityManager; params: { id: string }; caller: Parameters<typeof workOf>[0]['caller'] }) => {
  const fork = em.fork();
  return presentSubmission(fork, await findSubmission(fork, params.id), caller.asker);
};
