import { liftEmbargoes } from '#api/modules/entries/freeze.ts';
import { registryWork } from '#api/lib/work-of.ts';
import { defineJob } from './define-job.ts';

/** Makes public what was kept until today. */
export const liftEmbargoesJob = defineJob({
  name: 'lift-embargoes',
  schedule: '7 * * * *',
  handle: async ({ em, deps, runInThread }) => {
    const lifted = await liftEmbargoes(registryWork(em, deps, runInThread));
    if (lifted > 0) deps.log.info({ lifted }, 'embargoes ended');
  },
});
