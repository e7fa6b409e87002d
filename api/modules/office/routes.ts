import { jobParams, jobsOverview, mailOverview, peopleOverview } from '#shared/contracts/office.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { workOf } from '#api/lib/work-of.ts';
import { readJobs, retryJob } from './jobs.ts';
import { readMail } from './mail.ts';
import { readPeople } from './people.ts';

/** What a steward looks after, apart from campaigns. */
export const officeRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/jobs',
    action: 'job.read',
    summary: 'The job queue: how many jobs wait, run and failed, by queue, with the reasons.',
    response: jobsOverview,
    handler: async ({ em }) => readJobs(em),
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/jobs/:queue/:id/retry',
    action: 'job.retry',
    summary: 'One more attempt at a job that failed for good.',
    params: jobParams,
    handler: async (scope) => retryJob(workOf(scope), scope.params.queue, scope.params.id),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/mail',
    action: 'mail.read',
    summary: 'The outbox: messages owed, with the fault of the last attempt, and the last ones sent. Without their text.',
    response: mailOverview,
    handler: async ({ em }) => readMail(em),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/people',
    action: 'people.read',
    summary: 'People with the roles they hold now, and organisations with their members.',
    response: peopleOverview,
    handler: async ({ em, deps }) => readPeople(em, deps.clock.now()),
  }),
];
