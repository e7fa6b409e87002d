import type PgBoss from 'pg-boss';
import { JobRun } from '#api/entities/job-run.ts';
import type { Deps } from '#api/lib/deps.ts';
import type { Job } from './define-job.ts';
import { endRun } from './job-runs.ts';
import type { QueueName } from './queue-names.ts';
import { giveUpIfLast } from './run-attempt.ts';
import type { WorkerLease } from './worker-lease.ts';

interface Recovery {
  deps: Deps;
  boss: PgBoss;
  lease: WorkerLease;
  jobs: readonly Job[];
}

/**
 * Hands back the jobs of workers that died: an attempt is open, but the lock of its worker is free. The queue
 * itself would notice only when the attempt's time runs out, half an hour later.
 */
export const recoverLostRuns = async ({ deps, boss, lease, jobs }: Recovery): Promise<void> => {
  const em = deps.orm.em.fork();
  const open = await em.find(JobRun, { finishedAt: null, workerKey: { $ne: lease.key } });
  for (const key of new Set(open.map((run) => run.workerKey))) {
    if (!(await lease.isDead(key))) continue;
    for (const run of open.filter((candidate) => candidate.workerKey === key)) {
      const reason = 'its worker died';
      const row = await boss.getJobById(run.queue as QueueName, run.id);
      if (row?.state === 'active') {
        deps.log.warn({ job: run.queue, id: run.id, attempt: run.attempt }, 'job taken back from a dead worker');
        await boss.fail(run.queue, run.id, { message: reason });
        const job = jobs.find((candidate) => candidate.name === run.queue);
        if (job) await giveUpIfLast(job, row, deps, reason);
      }
      await endRun(em, deps.clock, run.id, 'lost', reason);
    }
  }
};
