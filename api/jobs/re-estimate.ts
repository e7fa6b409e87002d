import { advanceCampaign } from '#api/modules/campaigns/advance.ts';
import { failItem, runItem } from '#api/modules/campaigns/run-item.ts';
import { defineJob } from './define-job.ts';

/** One version of an entry under a campaign's method version; afterwards the campaign hands out the next. */
export const reEstimateJob = defineJob({
  name: 're-estimate',
  subject: ({ campaign, entryVersion }) => `campaign:${campaign}:${entryVersion}`,
  handle: async ({ jobId, data, em, deps, signal, progress, runInThread }) => {
    const work = { em, clock: deps.clock, queue: deps.queue, runInThread, caller: null };
    await runItem(work, { ...data, jobId }, { signal, onProgress: ({ stage, fraction }) => progress(stage, fraction) });
    await advanceCampaign(work, data.campaign);
  },
  exhausted: async ({ jobId, data, em, deps }, reason) => {
    const work = { em, clock: deps.clock, queue: deps.queue, runInThread: deps.threads.run, caller: null };
    await failItem(work, { ...data, jobId }, reason);
    await advanceCampaign(work, data.campaign);
  },
});
