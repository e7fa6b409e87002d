import { registryWork } from '#api/lib/work-of.ts';
import { advanceCampaign } from '#api/modules/campaigns/advance.ts';
import { failItem, runItem } from '#api/modules/campaigns/run-item.ts';
import { defineJob } from './define-job.ts';

/** One version of an entry under a campaign's method version; afterwards the campaign hands out the next. */
export const reEstimateJob = defineJob({
  name: 're-estimate',
  subject: ({ campaign, entryVersion }) => `campaign:${campaign}:${entryVersion}`,
  handle: async ({ jobId, data, em, deps, signal, progress, runInThread }) => {
    const work = registryWork(em, deps, runInThread);
    await runItem(work, { ...data, jobId }, { signal, onProgress: ({ stage, fraction }) => progress(stage, fraction) });
    await advanceCampaign(work, data.campaign);
  },
  exhausted: async ({ jobId, data, em, deps }, reason) => {
    const work = registryWork(em, deps);
    await failItem(work, { ...data, jobId }, reason);
    await advanceCampaign(work, data.campaign);
  },
});
