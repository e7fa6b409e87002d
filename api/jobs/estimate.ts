import { giveUpEstimate, runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { submissionProgress } from '#api/modules/submissions/progress.ts';
import { defineJob } from './define-job.ts';

/** Checks and estimates one round of a submission. */
export const estimateJob = defineJob({
  name: 'estimate',
  subject: ({ submission }) => `submission:${submission}`,
  handle: async ({ data, em, deps, signal, progress, runInThread }) => {
    const row = submissionProgress(em.fork(), data.submission, data.round, (fault) => deps.log.warn({ err: fault, submission: data.submission }, 'progress was not written'));
    try {
      await runEstimate({ em, clock: deps.clock, queue: deps.queue, runInThread, caller: null }, data.submission, data.round, {
        signal,
        onProgress: (report) => {
          progress(report.stage, report.fraction);
          row.report(report);
        },
      });
    } finally {
      await row.settle();
    }
  },
  exhausted: async ({ data, em, deps }) => giveUpEstimate({ em, clock: deps.clock, queue: deps.queue, runInThread: deps.threads.run, caller: null }, data.submission, data.round),
});
