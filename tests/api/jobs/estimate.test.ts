import pg from 'pg';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Submission } from '#api/entities/submission.ts';
import { estimateJob } from '#api/jobs/estimate.ts';
import { startWorker, type RunningWorker } from '#api/jobs/start-worker.ts';
import { readBytes } from '#api/modules/submissions/file-store.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { canonicalJson, contentIdOf } from '#shared/formats/canonical-json.ts';
import { estimate } from '#shared/method/estimate.ts';
import { readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { makeDataset, makeDesk, makeDrawnSheet } from '#tests/support/record.ts';
import { receive } from '#tests/support/life.ts';
import { useTestApp } from '#tests/support/test-app.ts';
import { startWorkerProcess } from '#tests/support/worker-process.ts';

const app = useTestApp({ faultsExpected: true });
const em = () => app().deps.orm.em.fork();
const soon = { timeout: 90_000, interval: 40 };
const row = (id: string): Promise<Submission> => em().findOneOrFail(Submission, { id });

let worker: RunningWorker | undefined;
afterEach(async () => {
  await worker?.stop();
  worker = undefined;
});

const held = 4711;

/**
 * Makes every write to a submission that follows its first counted replicates wait, so that a fast machine cannot finish before
 * it is killed. The returned function ends the connections that wait, as the dead process would, and lets others write again.
 */
const holdAfterFirstReplicates = async (): Promise<() => Promise<void>> => {
  const owner = new pg.Client({ connectionString: app().database.ownerUrl });
  await owner.connect();
  await owner.query('select pg_advisory_lock($1)', [held]);
  await owner.query(`create function hold_write() returns trigger language plpgsql as $$ begin perform pg_advisory_xact_lock_shared(${held}); return new; end $$`);
  await owner.query('create trigger hold_write before update on submission for each row when (old.replicates_done > 0) execute function hold_write()');
  return async () => {
    await app().deps.pool.query("select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and wait_event_type = 'Lock' and wait_event = 'advisory'");
    await owner.query('drop trigger hold_write on submission');
    await owner.end();
  };
};

describe('the estimate job', () => {
  it('killed with -9 in the middle is taken up by another worker and gives, to the byte, what the method gives', async () => {
    const desk = await makeDesk(app());
    const sheet = await makeDrawnSheet(app(), desk);
    const dataset = makeDataset(desk, sheet);
    const replicates = 12_000;
    const id = await receive(app(), desk, dataset, { replicates });

    const letWrite = await holdAfterFirstReplicates();
    const process = startWorkerProcess(app().database.url);
    await vi.waitFor(async () => expect((await row(id)).replicatesDone).toBeGreaterThan(0), soon);
    process.kill('SIGKILL');
    await new Promise((resolve) => process.once('exit', resolve));
    const halfway = await row(id);
    expect(halfway).toMatchObject({ state: 'checking', estimateId: null });
    expect(halfway.progress).toBeGreaterThan(0);
    expect(halfway.progress).toBeLessThan(1);
    expect(halfway.checks.length).toBeGreaterThan(0);
    await letWrite();

    worker = await startWorker(app().deps, [estimateJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
    await vi.waitFor(async () => expect((await row(id)).state).toBe('ready'), soon);
    const done = await row(id);
    expect(done).toMatchObject({ progress: 1, stage: null, replicatesDone: replicates });
    const expected = estimate({ dataset, contentId: contentIdOf(dataset), gateClass: gateClassById('quarter-turn-1q/1'), seal: await readSheetSeal(em(), sheet.id), replicates });
    const stored = await readBytes(em(), 'result', done.estimateId ?? '');
    expect(stored?.toString('utf8')).toBe(canonicalJson(expected.result));
    const { rows } = await app().deps.pool.query<{ replicates: Buffer }>('select replicates from submission_estimate where submission_id = $1', [id]);
    expect(rows).toHaveLength(1);
    expect(Buffer.compare(rows[0]!.replicates, Buffer.from(expected.replicates.values.buffer))).toBe(0);
  }, 240_000);

  it('given up for good leaves the submission blocked with the reason, not waiting', async () => {
    const desk = await makeDesk(app());
    const id = await receive(app(), desk, makeDataset(desk, null));
    await app().deps.pool.query("update pgboss.queue set retry_limit = 0 where name = 'estimate'");
    await app().deps.pool.query("update pgboss.job set retry_limit = 0 where name = 'estimate'");
    const deps = { ...app().deps, threads: { ...app().deps.threads, run: () => Promise.reject(new Error('no memory left')) } };
    worker = await startWorker(deps, [estimateJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
    await vi.waitFor(async () => expect((await row(id)).state).toBe('blocked'), soon);
    expect((await row(id)).checks.find((c) => c.status === 'failed')).toMatchObject({ id: 'estimate', detail: expect.stringContaining('The fault is ours') as string });
  });
});
