import pg from 'pg';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { SecondOpinion } from '#api/entities/second-opinion.ts';
import { opinionsJob } from '#api/jobs/opinions.ts';
import { startWorker, type RunningWorker } from '#api/jobs/start-worker.ts';
import { makeOpinions } from '#api/modules/opinions/make-opinions.ts';
import { opinionMethods } from '#shared/opinions/types.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { estimated } from '#tests/support/life.ts';
import { makeDataset, makeDesk, makeDrawnSheet, workFor, type Desk } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';
import { startWorkerProcess } from '#tests/support/worker-process.ts';

const app = useTestApp({ faultsExpected: true });
const em = () => app().deps.orm.em.fork();
const soon = { timeout: 90_000, interval: 40 };
const owed = (submission: string): Promise<SecondOpinion> => em().findOneOrFail(SecondOpinion, { submissionId: submission });

/** A submission that is ready. Its estimate was made outside the queue, whose job would hold the opinions up. */
const ready = async (desk: Desk, dataset: Dataset): Promise<string> => {
  const id = await estimated(app(), desk, dataset);
  await app().deps.pool.query("delete from pgboss.job where name = 'estimate'");
  return id;
};

let worker: RunningWorker | undefined;
afterEach(async () => {
  await worker?.stop();
  worker = undefined;
});

const held = 4712;

/** Every write to a second opinion waits, until the returned function ends what waits and lets others write. */
const holdWrites = async () => {
  const owner = new pg.Client({ connectionString: app().database.ownerUrl });
  await owner.connect();
  await owner.query('select pg_advisory_lock($1)', [held]);
  await owner.query(`create function hold_opinion() returns trigger language plpgsql as $$ begin perform pg_advisory_xact_lock_shared(${held}); return new; end $$`);
  await owner.query('create trigger hold_opinion before update on second_opinion for each row execute function hold_opinion()');
  const waiting = async (): Promise<number> => (await owner.query("select pid from pg_stat_activity where datname = current_database() and wait_event_type = 'Lock' and wait_event = 'advisory'")).rowCount ?? 0;
  const release = async (): Promise<void> => {
    await owner.query("select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and wait_event_type = 'Lock' and wait_event = 'advisory'");
    await owner.query('drop trigger hold_opinion on second_opinion');
    await owner.end();
  };
  return { waiting, release };
};

describe('the opinions job', () => {
  it('is owed with a submission that becomes ready, behind all estimates; made once, with every route in its order', async () => {
    const desk = await makeDesk(app());
    const id = await ready(desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
    expect(await owed(id)).toMatchObject({ state: 'waiting', opinions: null });
    const { rows } = await app().deps.pool.query<{ priority: number }>("select priority from pgboss.job where name = 'opinions' and data ->> 'submission' = $1", [id]);
    expect(rows).toEqual([{ priority: -10 }]);
    worker = await startWorker(app().deps, [opinionsJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
    await vi.waitFor(async () => expect((await owed(id)).state).toBe('done'), soon);
    const made = await owed(id);
    expect(made.opinions?.map((o) => o.method)).toEqual(opinionMethods);
    expect(made.officialSeconds).toBeGreaterThan(0);
    const offered = made.opinions!.filter((o) => o.reason === null);
    expect(offered.map((o) => o.method)).toEqual(opinionMethods.filter((m) => m !== 'structured'));
    for (const o of offered) {
      expect(o.seconds).toBeGreaterThan(0);
      expect(o.prediction).toMatchObject({ circuits: 50 });
      expect(o.figures.map((f) => f.key)).toEqual(['retained-signal', 'error-per-gate', 'gate-loss', 'gate-loss', 'gate-loss', 'readout-loss']);
    }
    expect(await makeOpinions(await workFor(app(), null), made.estimateId)).toBe(false);
    expect((await owed(id)).madeAt).toEqual(made.madeAt);
    await expect(app().deps.pool.query("update second_opinion set reason = 'other'")).rejects.toThrow('kept as they were written');
  }, 180_000);

  it('killed with -9 before they are written is taken up by another worker', async () => {
    const desk = await makeDesk(app());
    const id = await ready(desk, makeDataset(desk, null));
    const hold = await holdWrites();
    const child = startWorkerProcess(app().database.url);
    await vi.waitFor(async () => expect(await hold.waiting()).toBeGreaterThan(0), soon);
    child.kill('SIGKILL');
    await new Promise((resolve) => child.once('exit', resolve));
    await hold.release();
    expect(await owed(id)).toMatchObject({ state: 'waiting' });
    worker = await startWorker(app().deps, [opinionsJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
    await vi.waitFor(async () => expect((await owed(id)).state).toBe('done'), soon);
    // A design of the contributor's own has no sealed circuits.
    expect((await owed(id)).opinions?.every((o) => o.prediction === null)).toBe(true);
  }, 180_000);

  it('given up for good leaves the reason in place of the opinions', async () => {
    const desk = await makeDesk(app());
    const id = await ready(desk, makeDataset(desk, null));
    await app().deps.pool.query("update pgboss.job set retry_limit = 0 where name = 'opinions'");
    const deps = { ...app().deps, threads: { ...app().deps.threads, run: () => Promise.reject(new Error('no memory left')) } };
    worker = await startWorker(deps, [opinionsJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
    await vi.waitFor(async () => expect(await owed(id)).toMatchObject({ state: 'failed', reason: 'no memory left' }), soon);
  }, 120_000);

  it('waits while an estimate waits, and begins when it is gone', async () => {
    const desk = await makeDesk(app());
    const id = await ready(desk, makeDataset(desk, null));
    const { estimateId } = await owed(id);
    await app().deps.queue.send('estimate', { submission: 'S-999999', round: 1 });
    let begun = false;
    const work = await workFor(app(), null);
    const making = makeOpinions({ ...work, runInThread: (...given) => ((begun = true), work.runInThread(...given)) }, estimateId);
    await new Promise((resolve) => setTimeout(resolve, 1500));
    expect(begun).toBe(false);
    await app().deps.pool.query("delete from pgboss.job where name = 'estimate'");
    expect(await making).toBe(true);
    expect(begun).toBe(true);
  }, 120_000);
});
