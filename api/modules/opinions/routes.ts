import { z } from 'zod';
import { opinions } from '#shared/contracts/opinions.ts';
import { Submission } from '#api/entities/submission.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { currentMethod } from '#api/lib/method-versions.ts';
import { requireVersion } from '#api/modules/entries/load.ts';
import { loadSubmission } from '#api/modules/submissions/routes.ts';
import { currentEstimate } from '#api/modules/submissions/run-estimate.ts';
import { presentOpinions } from './presenter.ts';

export const opinionRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/submissions/:id/opinions',
    action: 'opinion.read',
    summary: 'Second opinions on the estimate of a submission in review: other routes from the same counts.',
    params: z.object({ id: z.string().max(20) }),
    response: opinions,
    load: loadSubmission,
    handler: async ({ em, loaded }) => {
      const estimate = await currentEstimate({ em }, loaded.submission);
      return presentOpinions(em, estimate?.id ?? null, estimate?.method ?? currentMethod);
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/opinions',
    action: 'public.read',
    summary: 'Second opinions on a version of an entry. Not the registry’s figures; never on boards.',
    params: z.object({ accession: z.string().max(20), version: z.coerce.number().int().min(1).max(1_000_000) }),
    response: opinions,
    handler: async ({ em, params }) => {
      const { id } = await requireVersion(em, params.accession, params.version);
      const row = await em.findOneOrFail(EntryVersion, { id }, { fields: ['submissionId', 'method'] });
      const submission = await em.findOneOrFail(Submission, { id: row.submissionId }, { fields: ['estimateId'] });
      return presentOpinions(em, submission.estimateId ?? null, row.method);
    },
  }),
];
