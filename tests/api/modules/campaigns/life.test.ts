import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { AuditEvent } from '#api/entities/audit-event.ts';
import { advanceCampaignsJob } from '#api/jobs/advance-campaigns.ts';
import { reEstimateJob } from '#api/jobs/re-estimate.ts';
import { startWorker, type RunningWorker } from '#api/jobs/start-worker.ts';
import { advanceCampaigns, mostHandedOut } from '#api/modules/campaigns/advance.ts';
import { campaignStates } from '#shared/domain/campaigns.ts';
import { cannedEstimates, clearContributorsJobs, makeEntries, makeStewardClient, viewOf, withdraw } from '#tests/support/campaigns.ts';
import { makeDesk, workFor, type Desk } from '#tests/support/record.ts';
import { asStranger, type Client } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp({ faultsExpected: true });
const soon = { timeout: 60_000, interval: 40 };
let desk: Desk;
let steward: Client;
let worker: RunningWorker | undefined;

const post = async (path: string, body: object = {}) => (await steward('post', `/api/v1/campaigns${path}`).send(body)).body;
const start = () => steward('post', '/api/v1/campaigns').send({ method: 'M2' });
const work = async (before?: (bytes: Uint8Array) => Promise<void>): Promise<void> => {
  const deps = { ...app().deps, threads: { ...app().deps.threads, run: cannedEstimates(app(), before) } };
  worker = await startWorker(deps, [reEstimateJob, advanceCampaignsJob], { recoverEveryMs: 100, pollSeconds: 0.5 });
};
const stopWork = async (): Promise<void> => {
  await worker?.stop();
  worker = undefined;
};
afterEach(stopWork);

/** Entries of a test's own. */
const entries = async (count: number): Promise<string[]> => {
  const made = await makeEntries(app(), desk, count);
  await clearContributorsJobs(app());
  return made;
};
const resultsOf = async (accession: string): Promise<string[]> =>
  (await asStranger(app())('get', `/api/v1/entries/${accession}/v/1/results`)).body.items.map((r: { method: string }) => r.method);

beforeAll(async () => {
  desk = await makeDesk(app());
  steward = await makeStewardClient(app());
});

describe('a re-estimation campaign', () => {
  it('is told beforehand, runs over every public version, and ends by itself with each result beside the frozen one', async () => {
    const made = await entries(3);
    const [kept] = await makeEntries(app(), desk, 1, { embargoUntil: '2026-07-01' });
    await withdraw(app(), made[2]!);
    await clearContributorsJobs(app());
    expect((await steward('get', '/api/v1/campaigns/plan?method=M2')).body).toEqual({ method: 'M2', toEstimate: 2, present: 0, embargoed: 1, withdrawn: 1 });
    const begun = await start();
    expect(begun.status).toBe(201);
    expect(begun.headers.location).toBe(`/api/v1/campaigns/${begun.body.id}`);
    expect(begun.body).toMatchObject({ method: 'M2', state: 'running', held: false, counts: { total: 2, queued: 2, waiting: 0 } });
    await work();
    await vi.waitFor(async () => expect(await viewOf(app(), begun.body.id)).toMatchObject({ state: 'finished', counts: { done: 2, failed: 0 } }), soon);
    for (const accession of made.slice(0, 2)) expect(await resultsOf(accession)).toEqual(['M1', 'M2']);
    expect((await asStranger(app())('get', `/api/v1/entries/${kept}/v/1/results`)).status).toBe(404);
    expect((await steward('get', '/api/v1/campaigns/plan?method=M2')).body).toMatchObject({ toEstimate: 0, present: 2 });
    const trail = await app().deps.orm.em.fork().find(AuditEvent, { subjectId: begun.body.id }, { orderBy: { id: 'asc' } });
    expect(trail.map((e) => [e.action, e.actorKind])).toEqual([['campaign.start', 'person'], ['campaign.finish', 'registry']]);
  });

  it('does not start where nothing is left to estimate, for a version that is not there, or twice at once', async () => {
    expect((await start()).body).toMatchObject({ status: 409, code: 'wrong-state', detail: expect.stringContaining('nothing to estimate') as string });
    expect((await steward('post', '/api/v1/campaigns').send({ method: 'M7' })).body).toMatchObject({ status: 400, detail: expect.stringContaining('"M7"') as string });
    await entries(1);
    const { id } = (await start()).body;
    expect((await start()).body).toMatchObject({ status: 409, code: 'already-exists', detail: expect.stringContaining(id) as string });
    await post(`/${id}/cancel`);
    expect((await viewOf(app(), id)).counts).toMatchObject({ total: 1, cancelled: 1 });
  });

  it('paused hands out nothing more and lets what runs end; resumed it goes on and leaves nothing out', async () => {
    await entries(5);
    let open = (): void => undefined;
    const gate = new Promise<void>((resolve) => { open = resolve; });
    let seen = 0;
    const { id } = (await start()).body;
    expect((await viewOf(app(), id)).counts).toMatchObject({ total: 6, queued: mostHandedOut, waiting: 2 });
    await work(async () => {
      seen += 1;
      await gate;
    });
    await vi.waitFor(() => expect(seen).toBe(1), soon);
    expect((await viewOf(app(), id)).running).toHaveLength(1);
    expect(await post(`/${id}/pause`)).toMatchObject({ state: 'paused' });
    expect(await post(`/${id}/pause`)).toMatchObject({ status: 409, code: 'wrong-state' });
    open();
    await vi.waitFor(async () => expect((await viewOf(app(), id)).counts).toMatchObject({ done: 1, running: 0, queued: 0, waiting: 5 }), soon);
    expect(seen).toBe(1);
    expect(await post(`/${id}/resume`)).toMatchObject({ state: 'running' });
    await vi.waitFor(async () => expect(await viewOf(app(), id)).toMatchObject({ state: 'finished', counts: { total: 6, done: 6 } }), soon);
  });

  it('notes what failed with its reason, goes on with the rest, and tries it again when told to', async () => {
    const [bad] = await entries(2);
    await app().deps.pool.query("update pgboss.queue set retry_limit = 0 where name = 're-estimate'");
    let broken = true;
    const { id } = (await start()).body;
    const { rows } = await app().deps.pool.query<{ bytes: Buffer }>("select bytes from entry_bytes where accession = $1 and kind = 'dataset'", [bad]);
    await work(async (bytes) => {
      if (broken && rows[0]!.bytes.equals(bytes)) throw new Error('no memory left');
    });
    await vi.waitFor(async () => expect(await viewOf(app(), id)).toMatchObject({ state: 'finished', counts: { total: 2, done: 1, failed: 1 } }), soon);
    expect((await viewOf(app(), id)).problems).toMatchObject([{ accession: bad, version: 1, state: 'failed', attempts: 1, reason: 'no memory left' }]);
    expect(await resultsOf(bad!)).toEqual(['M1']);
    broken = false;
    expect(await post(`/${id}/retry`)).toMatchObject({ state: 'running', endedAt: null, problems: [] });
    await vi.waitFor(async () => expect(await viewOf(app(), id)).toMatchObject({ state: 'finished', counts: { done: 2, failed: 0 } }), soon);
    expect(await post(`/${id}/retry`)).toMatchObject({ status: 409, code: 'wrong-state' });
    expect(await resultsOf(bad!)).toEqual(['M1', 'M2']);
  });

  it('waits while estimates of contributors wait or run, and leaves out what is withdrawn meanwhile', async () => {
    const [gone] = await entries(2);
    await app().deps.queue.send('estimate', { submission: 'S-999999', round: 1 });
    const { id, held, counts } = (await start()).body;
    expect({ held, counts }).toMatchObject({ held: true, counts: { waiting: 2, queued: 0 } });
    await withdraw(app(), gone!);
    await clearContributorsJobs(app());
    await app().deps.queue.send('estimate', { submission: 'S-999999', round: 1 }, { startAfter: new Date(Date.now() + 86_400_000) });
    await advanceCampaigns(await workFor(app(), null));
    expect(await viewOf(app(), id)).toMatchObject({ held: false, counts: { queued: 2 } });
    await work();
    await vi.waitFor(async () => expect(await viewOf(app(), id)).toMatchObject({ state: 'finished', counts: { done: 1, skipped: 1 } }), soon);
    expect((await viewOf(app(), id)).problems).toMatchObject([{ accession: gone, state: 'skipped', reason: expect.stringContaining('withdrawn') as string }]);
  });

  it('takes back items whose jobs were lost with the queue', async () => {
    await entries(2);
    const { id } = (await start()).body;
    await app().deps.pool.query("delete from pgboss.job where name = 're-estimate'");
    await advanceCampaigns(await workFor(app(), null));
    await work();
    await vi.waitFor(async () => expect(await viewOf(app(), id)).toMatchObject({ state: 'finished', counts: { done: 2 } }), soon);
  });

  it('is listed newest first, page by page, and states are those of the table', async () => {
    const first = (await steward('get', '/api/v1/campaigns?limit=2')).body;
    expect(first.items).toHaveLength(2);
    const second = (await steward('get', `/api/v1/campaigns?limit=2&cursor=${first.nextCursor}`)).body;
    const ids = [...first.items, ...second.items].map((c: { id: string }) => c.id);
    expect(ids).toEqual([...ids].sort().reverse());
    for (const { state } of first.items) expect(campaignStates).toContain(state);
    expect((await steward('get', '/api/v1/campaigns/C-999999')).body).toMatchObject({ status: 404, code: 'not-found' });
  });
});
