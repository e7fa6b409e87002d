import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterAll, afterEach, describe, expect, it, vi } from 'vitest';
import { JobRun } from '#api/entities/job-run.ts';
import { defineJob } from '#api/jobs/define-job.ts';
import { startWorker, type RunningWorker } from '#api/jobs/start-worker.ts';
import { startThreads, type ThreadPool } from '#api/jobs/threads.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const folder = mkdtempSync(join(tmpdir(), 'evenbeam-threads-'));
const broken = pathToFileURL(join(folder, 'broken.mjs')).href;
writeFileSync(join(folder, 'broken.mjs'), 'throw new Error("the module cannot be loaded");\n');
afterAll(() => rmSync(folder, { recursive: true }));

const app = useTestApp({ faultsExpected: true });
const pools: ThreadPool[] = [];
const poolOf = (file?: string): ThreadPool => {
  const pool = startThreads({ threads: 1, file });
  pools.push(pool);
  return pool;
};
let worker: RunningWorker | undefined;
afterEach(async () => {
  await worker?.stop();
  worker = undefined;
  await Promise.all(pools.splice(0).map((pool) => pool.stop()));
});

describe('worker threads', () => {
  it('that cannot start reject every call that waits, with the reason', async () => {
    const pool = poolOf(broken);
    const calls = [1, 2, 3].map(() => pool.run('self-check', { steps: 1, pauseMs: 1 }));
    for (const { status, reason } of (await Promise.allSettled(calls)) as PromiseRejectedResult[]) expect([status, String(reason)]).toEqual(['rejected', 'Error: A worker thread could not start: the module cannot be loaded']);
    await expect(pool.run('self-check', { steps: 1, pauseMs: 1 })).rejects.toThrow('the module cannot be loaded');
  });

  it('stop with the caller’s signal, for the caller’s own reason', async () => {
    const stop = new AbortController();
    const call = poolOf().run('self-check', { steps: 1_000, pauseMs: 20 }, { signal: stop.signal, onProgress: () => stop.abort() });
    await expect(call).rejects.toMatchObject({ name: 'AbortError' });
  });

  it('report progress in order and nothing but progress', async () => {
    const seen: unknown[] = [];
    await poolOf().run('self-check', { steps: 3, pauseMs: 60 }, { onProgress: (progress) => seen.push(progress) });
    expect(seen.slice(0, 2)).toEqual([{ stage: 'counting', fraction: 1 / 3 }, { stage: 'counting', fraction: 2 / 3 }]);
  });
});

describe('a job whose thread cannot start', () => {
  it('ends failed with its reason instead of waiting for ever', async () => {
    await app().deps.pool.query("update pgboss.queue set retry_limit = 0 where name = 'estimate'");
    const reasons: string[] = [];
    const job = defineJob({
      name: 'estimate', subject: () => 'submission:S-000001',
      handle: async ({ runInThread }) => void (await runInThread('self-check', { steps: 1, pauseMs: 1 })),
      exhausted: async (_context, reason) => void reasons.push(reason),
    });
    worker = await startWorker({ ...app().deps, threads: poolOf(broken) }, [job], { pollSeconds: 0.5 });
    await app().deps.queue.send('estimate', { submission: 'S-000001', round: 1 });
    await vi.waitFor(async () => expect(await app().deps.orm.em.fork().findOne(JobRun, { subject: 'submission:S-000001' })).toMatchObject({ outcome: 'failed', error: 'A worker thread could not start: the module cannot be loaded' }), { timeout: 60_000, interval: 50 });
    expect(reasons).toEqual(['A worker thread could not start: the module cannot be loaded']);
  });
});
