import { spawn } from 'node:child_process';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { reEstimateJob } from '#api/jobs/re-estimate.ts';
import { startWorker, type RunningWorker } from '#api/jobs/start-worker.ts';
import { startCampaign } from '#api/modules/campaigns/service.ts';
import { cannedEstimates, clearContributorsJobs, makeEntries, viewOf } from '#tests/support/campaigns.ts';
import { makeSteward } from '#tests/support/people.ts';
import { makeDesk, workFor } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp({ faultsExpected: true });
const soon = { timeout: 90_000, interval: 50 };
let worker: RunningWorker | undefined;
afterEach(() => worker?.stop());

describe('a campaign whose worker is killed with -9', () => {
  it('loses nothing: the item it had begun is estimated by the next worker, and so are the others', async () => {
    await makeEntries(app(), await makeDesk(app()), 2);
    await clearContributorsJobs(app());
    const id = await startCampaign(await workFor(app(), await makeSteward(app().deps.orm.em.fork())), 'M2');
    const child = spawn(process.execPath, ['--import', 'tsx', '--disable-warning=DeprecationWarning', 'tests/support/campaign-process.ts', app().database.url], { stdio: 'inherit' });
    await vi.waitFor(async () => expect((await viewOf(app(), id)).counts).toMatchObject({ running: 1, queued: 1 }), soon);
    const exited = new Promise((resolve) => child.once('exit', resolve));
    child.kill('SIGKILL');
    await exited;
    expect((await viewOf(app(), id)).counts).toMatchObject({ done: 0, running: 1, queued: 1 });
    worker = await startWorker({ ...app().deps, threads: { ...app().deps.threads, run: cannedEstimates(app()) } }, [reEstimateJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
    await vi.waitFor(async () => expect(await viewOf(app(), id)).toMatchObject({ state: 'finished', counts: { total: 2, done: 2, failed: 0 } }), soon);
    const { rows } = await app().deps.pool.query<{ attempts: number }>('select attempts from campaign_item where campaign_id = $1 order by attempts', [id]);
    expect(rows.map((r) => r.attempts)).toEqual([1, 2]);
    expect((await app().deps.pool.query('select 1 from entry_result')).rowCount).toBe(2);
  }, 240_000);
});
