import { giveUpOpinions, makeOpinions } from '#api/modules/opinions/make-opinions.ts';
import { opinionSubject } from '#api/modules/opinions/presenter.ts';
import { registryWork } from '#api/lib/work-of.ts';
import { defineJob } from './define-job.ts';

/** Second opinions on one estimate. */
export const opinionsJob = defineJob({
  name: 'opinions',
  subject: ({ estimate }) => opinionSubject(estimate),
  handle: async ({ data, em, deps, signal, progress, runInThread }) => {
    await makeOpinions(registryWork(em, deps, runInThread), data.estimate, { signal, onProgress: progress });
  },
  exhausted: async ({ data, em }, reason) => giveUpOpinions({ em }, data.estimate, reason),
});
