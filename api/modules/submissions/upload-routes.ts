import { z } from 'zod';
import { submissionAccepted } from '#shared/contracts/submissions.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { Submission } from '#api/entities/submission.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { fingerprintOf, idempotently, readIdempotencyKey } from '#api/lib/idempotent.ts';
import { reply, type JsonReply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { findOrganisation } from '#api/modules/devices/owner.ts';
import { fileNameOf, readUpload } from './read-upload.ts';
import { inspectDataset, receiveSubmission, replaceDataset } from './receive.ts';
import { findSubmission } from './service.ts';

const types = ['application/json'];
const uploadQuery = z.object({ fileName: z.string().max(300).optional() });

const accepted = (s: Submission): JsonReply<z.input<typeof submissionAccepted>> => {
  const href = `/api/v1/submissions/${s.id}`;
  return reply({ id: s.id, state: s.state, href }, { status: 202, headers: { location: href } });
};

const replaceRoute = defineRoute({
  method: 'put',
  path: '/api/v1/submissions/:id/dataset',
  action: 'submission.replace',
  summary: 'A corrected file for a submission that was blocked or returned, or is ready: a new round of checks.',
  params: z.object({ id: z.string().max(20) }),
  query: uploadQuery,
  raw: { types },
  response: submissionAccepted,
  status: 202,
  load: async ({ em, params }) => {
    const found = await findSubmission(em, params.id);
    return { thing: { owner: found.organisation.id, state: found.state } };
  },
  handler: async (scope) => {
    const { params, query, raw, header } = scope;
    const key = readIdempotencyKey(header('idempotency-key'), false);
    const upload = await readUpload(raw);
    const name = fileNameOf({ query: query.fileName, header, unpacked: raw.contentEncoding === 'gzip' });
    // Read before the transaction: a large file takes seconds, and no connection should wait for it.
    const seen = await inspectDataset(workOf(scope), upload.bytes);
    return idempotently(workOf(scope), { key, fingerprint: fingerprintOf('PUT', params.id, upload.sha256) }, async (work) => accepted(await replaceDataset(work, params.id, { bytes: upload.bytes, name, seen })));
  },
});

export const uploadRoutes: Route[] = [
  defineRoute({
    method: 'post',
    path: '/api/v1/submissions',
    action: 'submission.create',
    summary: 'Submits a dataset. It is read whole before the answer; checks and estimate follow by themselves.',
    query: uploadQuery.extend({ organisation: z.string().max(64).optional(), correctionOf: z.string().max(20).optional() }),
    raw: { types },
    response: submissionAccepted,
    status: 202,
    load: async ({ em, query, caller }) => {
      if (query.organisation !== undefined) return { thing: { owner: (await findOrganisation(em, query.organisation)).id } };
      const [only, ...others] = caller.asker.contributorOf;
      if (others.length > 0) throw new AppError('invalid-request', 'In the query, organisation: you contribute to several organisations; say for which one.');
      return { thing: { owner: only ?? null } };
    },
    handler: async (scope) => {
      const { query, raw, header, loaded } = scope;
      const key = readIdempotencyKey(header('idempotency-key'), true);
      const organisation = loaded.thing.owner;
      if (organisation === null) throw new AppError('not-allowed', 'This is open only to contributors of an organisation.');
      const upload = await readUpload(raw);
      const name = fileNameOf({ query: query.fileName, header, unpacked: raw.contentEncoding === 'gzip' });
      const correctionOf = query.correctionOf ?? null;
      const seen = await inspectDataset(workOf(scope), upload.bytes);
      return idempotently(workOf(scope), { key, fingerprint: fingerprintOf('POST', organisation, correctionOf ?? '', upload.sha256) }, async (work) =>
        accepted(await receiveSubmission(work, { organisation, bytes: upload.bytes, name, seen, correctionOf })));
    },
  }),
  replaceRoute,
];
