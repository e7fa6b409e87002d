import type { Deps } from '#api/lib/deps.ts';
import type { Job } from './define-job.ts';
import { progressWriter } from './job-runs.ts';
import { queues, type QueueName } from './queue-names.ts';

/** What the queue hands over with a job. */
export interface BossJob {
  id: string;
  data: unknown;
  retryCount: number;
  retryLimit: number;
}

export type Outcome = { kind: 'done' } | { kind: 'failed' | 'lost'; reason: string };

interface Attempt {
  job: Job;
  row: BossJob;
  deps: Deps;
  signal: AbortSignal;
}

/** One attempt at one job. Never throws: a fault is an outcome. */
export const runAttempt = async ({ job, row, deps, signal }: Attempt): Promise<Outcome> => {
  const log = deps.log.child({ job: job.name, id: row.id, attempt: row.retryCount + 1 });
  const note = progressWriter(deps.orm.em.fork(), deps.clock, row.id, (fault) => log.warn({ err: fault }, 'progress was not written'));
  const base = { jobId: row.id, attempt: row.retryCount + 1, deps };
  const started = performance.now();
  try {
    const data = queues[job.name as QueueName].parse(row.data ?? {}) as never;
    await job.handle({
      ...base,
      data,
      em: deps.orm.em.fork(),
      signal,
      progress: note.report,
      runInThread: (name, input, more = {}) => deps.threads.run(name, input, { ...more, signal: more.signal ? AbortSignal.any([more.signal, signal]) : signal }),
    });
    log.info({ ms: Math.round(performance.now() - started) }, 'job done');
    return { kind: 'done' };
  } catch (fault) {
    if (signal.aborted) {
      log.info('job handed back: the worker is stopping');
      return { kind: 'lost', reason: 'the worker was stopped' };
    }
    const reason = fault instanceof Error ? fault.message : String(fault);
    log.error({ err: fault }, 'job failed');
    await giveUpIfLast(job, row, deps, reason);
    return { kind: 'failed', reason };
  } finally {
    await note.settle();
  }
};

/** After the last attempt the definition's `exhausted` runs, so that whatever waits for the job learns of it. */
export const giveUpIfLast = async (job: Job, row: BossJob, deps: Deps, reason: string): Promise<void> => {
  if (!job.exhausted || row.retryCount < row.retryLimit) return;
  try {
    await job.exhausted({ jobId: row.id, attempt: row.retryCount + 1, data: row.data as never, em: deps.orm.em.fork(), deps }, reason);
  } catch (fault) {
    deps.log.error({ err: fault, job: job.name, id: row.id }, 'giving a job up failed');
  }
};
