import { liftEmbargoes } from '#api/modules/entries/freeze.ts';
import { defineJob } from './define-job.ts';

/** Makes public what was kept until today. */
export const liftEmbargoesJob = defineJob({
  name: 'lift-embargoes',
  schedule: '7 * * * *',
  handle: async ({ em, deps, runInThread }) => {
    const lifted = await liftEmbargoes({ em, clock: deps.clock, queue: deps.queue, runInThread, caller: null });
    if (lifted > 0) deps.log.info({ lifted }, 'embargoes ended');
  },
});
