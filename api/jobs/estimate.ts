import { Submission } from '#api/entities/submission.ts';
import { giveUpEstimate, runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { registryWork } from '#api/lib/work-of.ts';
import { defineJob } from './define-job.ts';
import { latestWrite } from './latest-write.ts';
import type { EstimateReport } from './tasks/estimate-dataset.ts';

/** Checks and estimates one round of a submission. */
export const estimateJob = defineJob({
  name: 'estimate',
  subject: ({ submission }) => `submission:${submission}`,
  handle: async ({ data, em, deps, signal, progress, runInThread }) => {
    const { submission: id, round } = data;
    const fork = em.fork();
    const row = latestWrite<EstimateReport>(
      ({ stage, fraction, replicatesDone }) =>
        fork.nativeUpdate(Submission, { id, round, state: 'checking' }, { progress: Math.min(1, fraction), stage, ...(replicatesDone === undefined ? {} : { replicatesDone }) }),
      (fault) => deps.log.warn({ err: fault, submission: id }, 'progress was not written'),
    );
    try {
      await runEstimate(registryWork(em, deps, runInThread), id, round, {
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
  exhausted: async ({ data, em, deps }) => giveUpEstimate(registryWork(em, deps), data.submission, data.round),
});
