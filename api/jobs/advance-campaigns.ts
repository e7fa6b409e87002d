import { registryWork } from '#api/lib/work-of.ts';
import { advanceCampaigns } from '#api/modules/campaigns/advance.ts';
import { defineJob } from './define-job.ts';

/** Lets campaigns go on that were held back by contributors' work, or whose jobs were lost. */
export const advanceCampaignsJob = defineJob({
  name: 'advance-campaigns',
  schedule: '* * * * *',
  handle: async ({ em, deps, runInThread }) => advanceCampaigns(registryWork(em, deps, runInThread)),
});
