import { beforeAll, describe, expect, it } from 'vitest';
import type { SubmissionState } from '#shared/domain/life-cycle.ts';
import { decide } from '#api/modules/reviews/service.ts';
import { receiveSubmission } from '#api/modules/submissions/receive.ts';
import { runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { bytesOf, makeDataset, makeDesk, makeDrawnSheet, sendFile, workFor, type Desk } from '#tests/support/record.ts';
import { accepted, estimated, inReview, receive, stateOf } from '#tests/support/life.ts';
import { useTestApp } from '#tests/support/test-app.ts';
import { cancelSubmission } from '#api/modules/submissions/service.ts';

const app = useTestApp();
let desk: Desk;
const ids = new Map<SubmissionState, string>();

const decided = async (outcome: 'return' | 'decline'): Promise<string> => {
  const id = await inReview(app(), desk, makeDataset(desk, null));
  await decide(await workFor(app(), desk.curator), id, { outcome, reason: 'For the test.', noInterest: true });
  return id;
};

beforeAll(async () => {
  desk = await makeDesk(app());
  const ownDesign = () => makeDataset(desk, null);
  ids.set('checking', await receive(app(), desk, ownDesign()));
  ids.set('blocked', await estimated(app(), desk, makeDataset(desk, null, { device: { provider: desk.organisation.name, name: 'Nowhere-1', modality: 'spin' } })));
  ids.set('ready', await estimated(app(), desk, ownDesign()));
  ids.set('in-review', await inReview(app(), desk, ownDesign()));
  ids.set('returned', await decided('return'));
  ids.set('declined', await decided('decline'));
  ids.set('embargoed', (await accepted(app(), desk, ownDesign(), { embargoUntil: '2026-06-01' })).id);
  ids.set('frozen', (await accepted(app(), desk, ownDesign())).id);
  const cancelled = await receive(app(), desk, ownDesign());
  await cancelSubmission(await workFor(app(), desk.contributor), cancelled);
  ids.set('cancelled', cancelled);
});

const all: SubmissionState[] = ['checking', 'blocked', 'ready', 'in-review', 'returned', 'declined', 'embargoed', 'frozen', 'cancelled'];
const decision = (outcome: string) => ({ outcome, reason: 'For the test.', noInterest: true });
/** A request and the states in which it is open; in every other it must be refused and change nothing. */
const requests: [name: string, open: SubmissionState[], send: (id: string) => Promise<{ status: number; body: { code?: string } }>][] = [
  ['editing the record', ['checking', 'blocked', 'ready', 'returned'], async (id) => desk.client('patch', `/api/v1/submissions/${id}`).send({ notes: 'late' })],
  ['a replacement', ['blocked', 'returned'], async (id) => sendFile(desk.client, 'put', `/api/v1/submissions/${id}/dataset`, bytesOf(makeDataset(desk, null)))],
  ['sending to review', ['ready'], async (id) => desk.client('post', `/api/v1/submissions/${id}/submit`)],
  ['cancelling', ['checking', 'blocked', 'ready', 'in-review', 'returned'], async (id) => desk.client('post', `/api/v1/submissions/${id}/cancel`)],
  ['claiming', ['in-review'], async (id) => desk.curatorClient('post', `/api/v1/reviews/${id}/claim`)],
  ['accepting', ['in-review'], async (id) => desk.curatorClient('post', `/api/v1/reviews/${id}/decision`).send(decision('accept'))],
  ['returning', ['in-review'], async (id) => desk.curatorClient('post', `/api/v1/reviews/${id}/decision`).send(decision('return'))],
  ['declining', ['in-review'], async (id) => desk.curatorClient('post', `/api/v1/reviews/${id}/decision`).send(decision('decline'))],
];

const rowsAbout = async (id: string): Promise<unknown> =>
  (await app().deps.pool.query('select s.*, (select count(*) from submission_move m where m.submission_id = s.id) as moves, (select count(*) from submission_file f where f.submission_id = s.id) as files, (select count(*) from decision d where d.submission_id = s.id) as decisions from submission s where id = $1', [id])).rows;

describe('moves that a state does not open', () => {
  it.each(requests)('%s is refused outside of %j and changes nothing', async (_name, open, send) => {
    for (const state of all.filter((s) => !open.includes(s))) {
      const id = ids.get(state) ?? '';
      expect(await stateOf(app(), id)).toBe(state);
      const before = await rowsAbout(id);
      const answer = await send(id);
      expect([answer.status, answer.body.code], `${state}: ${JSON.stringify(answer.body)}`).toEqual([409, 'wrong-state']);
      expect(await rowsAbout(id)).toEqual(before);
    }
  });
});

describe('what blocks, and what the way back is', () => {
  it('blocks a device that is not registered, says the remedy, and takes the same file again once it is', async () => {
    const dataset = makeDataset(desk, null, { device: { provider: desk.organisation.name, name: 'Orchard-2', modality: 'spin' } });
    const id = await estimated(app(), desk, dataset);
    const blocked = (await desk.client('get', `/api/v1/submissions/${id}`)).body as { state: string; checks: { id: string; status: string; detail: string }[] };
    expect(blocked.state).toBe('blocked');
    expect(blocked.checks.find((c) => c.status === 'failed')).toMatchObject({ id: 'device', detail: expect.stringContaining('Register it under Devices') as string });
    expect((await desk.client('post', '/api/v1/devices').send({ organisation: desk.organisation.id, name: 'Orchard-2', modality: 'spin' })).status).toBe(201);
    const again = await sendFile(desk.client, 'put', `/api/v1/submissions/${id}/dataset`, bytesOf(dataset));
    expect([again.status, again.body]).toEqual([202, { id, state: 'checking', href: `/api/v1/submissions/${id}` }]);
    await runEstimate(await workFor(app(), null), id, 2);
    expect((await desk.client('get', `/api/v1/submissions/${id}`)).body).toMatchObject({ state: 'ready', round: 2, device: { name: 'Orchard-2' } });
  });

  it('blocks a circuit that differs from the run sheet and names it', async () => {
    const sheet = await makeDrawnSheet(app(), desk);
    const dataset = makeDataset(desk, sheet);
    const first = dataset.patches[0]!.circuits[0]!;
    first.gates = [...first.gates, 'rx'];
    const id = await estimated(app(), desk, dataset);
    const { body } = await desk.client('get', `/api/v1/submissions/${id}`);
    expect(body).toMatchObject({ state: 'blocked', result: null });
    expect((body as { checks: { id: string; detail: string }[] }).checks.find((c) => c.id === 'run-sheet')?.detail).toContain('/patches/0/circuits/0/gates');
    expect((body as { history: { state: string; reason: string | null }[] }).history.at(-1)).toMatchObject({ state: 'blocked', reason: expect.stringContaining(sheet.id) as string });
  });

  it('blocks a run sheet of another organisation without telling whose it is', async () => {
    const other = await makeDesk(app());
    const sheet = await makeDrawnSheet(app(), other);
    const id = await estimated(app(), desk, { ...makeDataset(desk, sheet), device: { provider: desk.organisation.name, name: desk.device.name, modality: 'superconducting' } });
    const { body } = await desk.client('get', `/api/v1/submissions/${id}`);
    expect(JSON.stringify(body)).toContain(`Your organisation has no drawn run sheet ${sheet.id}.`);
    expect(JSON.stringify(body)).not.toContain(other.organisation.name);
  });

  it('estimates a design of one’s own with every circuit and says that it is never ranked', async () => {
    const id = await estimated(app(), desk, makeDataset(desk, null));
    const { body } = await desk.client('get', `/api/v1/submissions/${id}`);
    const checks = (body as { checks: { id: string; status: string }[] }).checks;
    expect(Object.fromEntries(checks.map((c) => [c.id, c.status]))).toMatchObject({ format: 'passed', counts: 'passed', device: 'passed', 'run-sheet': 'note', design: 'passed', bootstrap: 'passed', sealed: 'note' });
  });

  it('does nothing for a job of an earlier round or of a cancelled submission', async () => {
    const { id } = await receiveSubmission(await workFor(app(), desk.contributor), { organisation: desk.organisation.id, bytes: bytesOf(makeDataset(desk, null)), name: 'a.json', replicates: 5 });
    const work = await workFor(app(), null);
    expect(await runEstimate(work, id, 2)).toBe(false);
    await cancelSubmission(await workFor(app(), desk.contributor), id);
    expect(await runEstimate(work, id, 1)).toBe(false);
    expect(await stateOf(app(), id)).toBe('cancelled');
  });

  it('writes a mail to the contributor for what the registry decided alone', async () => {
    const { rows } = await app().deps.pool.query('select recipient, subject from mail_outbox where topic_id = $1 order by queued_at', [ids.get('blocked')]);
    expect(rows).toEqual([{ recipient: desk.contributor.email, subject: `${ids.get('blocked')} is blocked` }]);
  });
});
