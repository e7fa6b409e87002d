import PgBoss from 'pg-boss';
import type { Deps } from '#api/lib/deps.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Job } from './define-job.ts';
import { beginRun, endRun } from './job-runs.ts';
import { recoverLostRuns } from './recover-lost-runs.ts';
import { runAttempt, type BossJob } from './run-attempt.ts';
import { takeLease } from './worker-lease.ts';

export interface WorkerOptions {
  /** How often jobs of dead workers are looked for. */
  recoverEveryMs?: number;
  pollSeconds?: number;
  /** How long a stop waits for running handlers after their signal has fired. */
  graceMs?: number;
  /** The lease's connection broke: this worker may be taken for dead and must go. */
  onLeaseLost?: (fault: Error) => void;
}

export interface RunningWorker {
  /** Stops taking jobs, signals the running ones, hands back what is unfinished. */
  stop(): Promise<void>;
}

/** Takes jobs from the queues until stopped. Any number of workers may run on any number of machines. */
export const startWorker = async (deps: Deps, jobs: readonly Job[], options: WorkerOptions = {}): Promise<RunningWorker> => {
  const { config, log, orm, clock } = deps;
  const lease = await takeLease(config.databaseUrl, (fault) => {
    log.fatal({ err: fault }, 'the connection that shows this worker alive broke');
    options.onLeaseLost?.(fault);
  });
  const boss = new PgBoss({ connectionString: config.databaseUrl, max: 4, migrate: false, supervise: true, schedule: true, application_name: 'evenbeam-worker' });
  boss.on('error', (fault) => log.error({ err: fault }, 'job queue'));
  await boss.start();
  const stopping = new AbortController();
  const working = new Set<Promise<void>>();

  const attempt = async (job: Job, row: BossJob): Promise<void> => {
    const em = orm.em.fork();
    const subject = job.subject?.(row.data as never) ?? null;
    await beginRun(em, clock, { id: row.id, queue: job.name, subject, attempt: row.retryCount + 1, workerKey: lease.key });
    const outcome = await runAttempt({ job, row, deps, signal: stopping.signal });
    // The queue is told first: a crash between the two lines leaves a note to tidy, never a job done twice.
    if (outcome.kind === 'done') await boss.complete(job.name, row.id);
    else {
      // A stop is nobody's fault: it takes no attempt away, or the last one would end without being given up.
      if (outcome.kind === 'lost') await runSql(em, 'update pgboss.job set retry_limit = retry_limit + 1 where name = $1 and id = $2', [job.name, row.id]);
      await boss.fail(job.name, row.id, { message: outcome.reason });
    }
    await endRun(em, clock, row.id, outcome.kind, outcome.kind === 'done' ? null : outcome.reason);
  };

  for (const job of jobs) {
    for (let i = 0; i < (job.concurrency ?? 1); i += 1) {
      await boss.work(job.name, { batchSize: 1, includeMetadata: true, pollingIntervalSeconds: options.pollSeconds ?? 0.5 }, async ([row]: PgBoss.JobWithMetadata[]) => {
        if (!row) return;
        const run = attempt(job, row).catch((fault: unknown) => log.error({ err: fault, job: job.name, id: row.id }, 'an attempt could not be noted'));
        working.add(run);
        await run;
        working.delete(run);
      });
    }
    if (job.schedule) await boss.schedule(job.name, job.schedule, {});
  }

  let recovering: Promise<void> = Promise.resolve();
  const recover = (): void => {
    recovering = recovering.then(() => recoverLostRuns({ deps, boss, lease, jobs })).catch((fault: unknown) => log.error({ err: fault }, 'looking for lost jobs'));
  };
  recover();
  const timer = setInterval(recover, options.recoverEveryMs ?? 5_000);

  return {
    stop: async () => {
      clearInterval(timer);
      stopping.abort(new Error('the worker is stopping'));
      await Promise.race([Promise.all(working), new Promise((resolve) => setTimeout(resolve, options.graceMs ?? 10_000).unref())]);
      await recovering;
      await boss.stop({ graceful: false });
      await lease.release();
    },
  };
};
