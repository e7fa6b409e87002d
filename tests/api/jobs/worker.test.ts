import { spawn } from 'node:child_process';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { JobRun } from '#api/entities/job-run.ts';
import { defineJob, type Job, type JobContext } from '#api/jobs/define-job.ts';
import { progressOf } from '#api/jobs/job-runs.ts';
import { startWorker, type RunningWorker } from '#api/jobs/start-worker.ts';
import { systemClock } from '#api/lib/clock.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const test = useTestApp({ faultsExpected: true });
const em = () => test().deps.orm.em.fork();
const soon = { timeout: 60_000, interval: 50 };

let workers: RunningWorker[] = [];
const work = async (jobs: Job[]): Promise<RunningWorker> => {
  const worker = await startWorker({ ...test().deps, clock: systemClock }, jobs, { recoverEveryMs: 100, pollSeconds: 0.5 });
  workers.push(worker);
  return worker;
};
afterEach(async () => {
  await Promise.all(workers.map((worker) => worker.stop()));
  workers = [];
});

type EstimateContext = JobContext<{ submission: string; round: number }>;
const estimate = (handle: (context: EstimateContext) => Promise<void>, more: { exhausted?: (context: unknown, reason: string) => Promise<void> } = {}): Job =>
  defineJob({ name: 'estimate', subject: ({ submission }) => `submission:${submission}`, handle, ...more });

describe('jobs', () => {
  it('exist if and only if the transaction that sends them commits', async () => {
    const done: string[] = [];
    const { queue } = test().deps;
    await expect(em().transactional(async (tx) => {
      await queue.send('estimate', { submission: 'S-000001', round: 1 }, { em: tx });
      throw new Error('undone');
    })).rejects.toThrow('undone');
    await em().transactional((tx) => queue.send('estimate', { submission: 'S-000002', round: 1 }, { em: tx }));
    await work([estimate(async ({ data }) => void done.push(data.submission))]);
    await vi.waitFor(() => expect(done).toEqual(['S-000002']), soon);
  });

  it('run tasks in a thread, and their progress can be read by subject until they are done', async () => {
    await test().deps.queue.send('estimate', { submission: 'S-000003', round: 1 });
    await work([estimate(async ({ runInThread, progress }) => {
      await runInThread('self-check', { steps: 8, pauseMs: 150 }, { onProgress: ({ stage, fraction }) => progress(stage, fraction) });
    })]);
    await vi.waitFor(async () => expect(await progressOf(em(), 'submission:S-000003')).toMatchObject({ stage: 'counting', finished: false }), soon);
    await vi.waitFor(async () => expect(await progressOf(em(), 'submission:S-000003')).toEqual({ stage: 'counting', fraction: 1, finished: true }), soon);
  });

  it('are tried again after a fault, with the attempt counted', async () => {
    const attempts: number[] = [];
    await test().deps.queue.send('estimate', { submission: 'S-000004', round: 1 });
    await work([estimate(async ({ attempt }) => {
      attempts.push(attempt);
      if (attempt === 1) throw new Error('a passing fault');
    })]);
    await vi.waitFor(() => expect(attempts).toEqual([1, 2]), soon);
    await vi.waitFor(async () => expect(await em().findOneOrFail(JobRun, { subject: 'submission:S-000004' })).toMatchObject({ outcome: 'done', attempt: 2 }), soon);
  });

  it('of a worker that is told to stop are handed back and finished by the next', async () => {
    const seen: string[] = [];
    await test().deps.queue.send('estimate', { submission: 'S-000005', round: 1 });
    const first = await work([estimate(async ({ signal }) => {
      seen.push('first');
      await new Promise((_, reject) => signal.addEventListener('abort', () => reject(new Error('told to stop'))));
    })]);
    await vi.waitFor(() => expect(seen).toEqual(['first']), soon);
    await first.stop();
    await work([estimate(async () => void seen.push('second'))]);
    await vi.waitFor(() => expect(seen).toEqual(['first', 'second']), soon);
  });

  it('stopped on their last attempt are finished by the next worker all the same', async () => {
    const seen: string[] = [];
    const id = await test().deps.queue.send('estimate', { submission: 'S-000008', round: 1 });
    await test().deps.pool.query('update pgboss.job set retry_limit = 0 where id = $1', [id]);
    const first = await work([estimate(async ({ signal }) => {
      seen.push('first');
      await new Promise((_, reject) => signal.addEventListener('abort', () => reject(new Error('told to stop'))));
    })]);
    await vi.waitFor(() => expect(seen).toEqual(['first']), soon);
    await first.stop();
    await work([estimate(async () => void seen.push('second'))]);
    await vi.waitFor(() => expect(seen).toEqual(['first', 'second']), soon);
  });

  it('of a worker process that is killed are taken up by another', async () => {
    await test().deps.queue.send('estimate', { submission: 'S-000006', round: 1 });
    const child = spawn(process.execPath, ['--import', 'tsx', '--disable-warning=DeprecationWarning', 'tests/support/job-process.ts', test().database.url], { stdio: 'inherit' });
    await vi.waitFor(async () => expect(await progressOf(em(), 'submission:S-000006')).toMatchObject({ stage: 'working', finished: false }), soon);
    const exited = new Promise((resolve) => child.once('exit', resolve));
    child.kill('SIGKILL');
    await exited;
    const attempts: number[] = [];
    await work([estimate(async ({ attempt }) => void attempts.push(attempt))]);
    await vi.waitFor(() => expect(attempts).toEqual([2]), soon);
  });

  it('that fail for the last time are given up once, with the reason', async () => {
    await test().deps.pool.query("update pgboss.queue set retry_limit = 0 where name = 'estimate'");
    const reasons: string[] = [];
    await test().deps.queue.send('estimate', { submission: 'S-000007', round: 1 });
    await work([estimate(async () => { throw new Error('beyond repair'); }, { exhausted: async (_context, reason) => void reasons.push(reason) })]);
    await vi.waitFor(() => expect(reasons).toEqual(['beyond repair']), soon);
  });
});
