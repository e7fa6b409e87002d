import { registerDois } from '#api/modules/citations/register-dois.ts';
import { defineJob } from './define-job.ts';

/** Registers what DOIs are owed. The minute's run is what tries again; a freezing asks for one at once. */
export const registerDoisJob = defineJob({
  name: 'register-dois',
  schedule: '* * * * *',
  handle: async ({ em, deps, signal }) => registerDois(em, deps, signal),
});
