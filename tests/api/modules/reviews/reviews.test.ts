import { beforeAll, describe, expect, it } from 'vitest';
import { addMember, makeCurator } from '#tests/support/people.ts';
import { makeDataset, makeDesk, workFor, type Desk } from '#tests/support/record.ts';
import { inReview, stateOf } from '#tests/support/life.ts';
import { signInAs, type Client } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';
import { decide } from '#api/modules/reviews/service.ts';
import { runSql } from '#api/lib/run-sql.ts';

const app = useTestApp();
let desk: Desk;
beforeAll(async () => {
  desk = await makeDesk(app());
});
const decision = { outcome: 'accept' as const, reason: 'Sound throughout.', noInterest: true as const };

/** A curator who belonged to the desk's organisation until that day. */
const formerMember = async (until: string | null): Promise<{ id: string; client: Client }> => {
  const em = app().deps.orm.em.fork();
  const curator = await makeCurator(em);
  await addMember(em, curator, await em.findOneOrFail('Organisation', { id: desk.organisation.id }) as typeof desk.organisation, { until: until === null ? null : new Date(until) });
  return { id: curator.id, client: await signInAs(app(), curator) };
};

describe('interest', () => {
  it('keeps a submission from a curator who belonged to the organisation within 12 months, and shows only number and name', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    const { client } = await formerMember('2025-05-05T00:00:00Z');
    const queue = (await client('get', '/api/v1/reviews')).body as { items: { id: string }[]; kept: unknown[] };
    expect(queue.items.map((i) => i.id)).not.toContain(id);
    expect(queue.kept).toContainEqual({ id, organisation: desk.organisation.name });
    for (const [method, path, body] of [['get', ''], ['post', '/claim'], ['post', '/decision', decision]] as const) {
      const request = client(method, `/api/v1/reviews/${id}${path}`);
      const answer = await (body ? request.send(body) : request);
      expect([answer.status, (answer.body as { code: string }).code], path).toEqual([403, 'not-allowed']);
    }
    expect(await stateOf(app(), id)).toBe('in-review');
  });

  it('lets one who left 12 months and a day ago decide', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    const { client } = await formerMember('2025-05-03T00:00:00Z');
    expect((await client('post', `/api/v1/reviews/${id}/decision`).send(decision)).body).toMatchObject({ state: 'frozen' });
  });

  it('is held by the database where the rule table was passed by', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    const { id: tied } = await formerMember(null);
    const insert = (curator: string) => runSql(app().deps.orm.em.fork(), `insert into decision (id, submission_id, round, outcome, reason, curator_id, at) values (gen_random_uuid(), $1, 1, 'accepted', 'x', $2, $3)`, [id, curator, app().clock.now()]);
    await expect(insert(tied)).rejects.toMatchObject({ code: 'EB002' });
    await expect(insert(desk.contributor.id)).rejects.toMatchObject({ code: 'EB002' });
    const work = await workFor(app(), { id: tied });
    const blind = { ...work, caller: { ...work.caller!, asker: { ...work.caller!.asker, interestIn: [] } } };
    await expect(decide(blind, id, decision)).rejects.toMatchObject({ code: 'not-allowed' });
    expect(await stateOf(app(), id)).toBe('in-review');
  });
});

describe('a claim', () => {
  it('keeps other curators from claiming, releasing and deciding with 409, until it is released', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    const second = await signInAs(app(), await makeCurator(app().deps.orm.em.fork()));
    expect((await desk.curatorClient('post', `/api/v1/reviews/${id}/claim`)).body).toMatchObject({ claimedByMe: true });
    for (const [path, body] of [['claim'], ['release'], ['decision', decision]] as const) {
      const request = second('post', `/api/v1/reviews/${id}/${path}`);
      expect((await (body ? request.send(body) : request)).status, path).toBe(409);
    }
    expect((await second('get', `/api/v1/reviews/${id}`)).body).toMatchObject({ claimedBy: desk.curator.name, claimedByMe: false, may: { claim: false, decide: false } });
    await desk.curatorClient('post', `/api/v1/reviews/${id}/release`);
    expect((await second('post', `/api/v1/reviews/${id}/decision`).send({ ...decision, outcome: 'return', reason: 'Block 5 needs a word.' })).body).toMatchObject({ state: 'returned', entry: null });
    const seen = (await desk.client('get', `/api/v1/submissions/${id}`)).body;
    expect(seen).toMatchObject({ state: 'returned', decision: { outcome: 'returned', reason: 'Block 5 needs a word.' }, may: { replace: true, edit: true, send: false } });
  });

  it('asks for a reason and for the word that there is no tie', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    expect((await desk.curatorClient('post', `/api/v1/reviews/${id}/decision`).send({ outcome: 'accept', reason: ' ', noInterest: true })).body).toMatchObject({ status: 400, errors: [{ pointer: '/reason' }] });
    expect((await desk.curatorClient('post', `/api/v1/reviews/${id}/decision`).send({ outcome: 'accept', reason: 'x', noInterest: false })).body).toMatchObject({ status: 400, errors: [{ pointer: '/noInterest' }] });
  });

  it('two decisions at the same instant: one counts, the other is told 409', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    const second = await signInAs(app(), await makeCurator(app().deps.orm.em.fork()));
    const answers = await Promise.all([desk.curatorClient, second].map((client) => client('post', `/api/v1/reviews/${id}/decision`).send(decision)));
    expect(answers.map((a) => a.status).sort()).toEqual([200, 409]);
    expect((await app().deps.pool.query('select count(*)::int as n from entry_version where submission_id = $1', [id])).rows).toEqual([{ n: 1 }]);
  });
});

describe('the thread', () => {
  it('mails the other side and is not open to a curator with an interest', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    await desk.curatorClient('post', `/api/v1/reviews/${id}/claim`);
    expect((await desk.curatorClient('post', `/api/v1/submissions/${id}/messages`).send({ body: 'What happened in block 5?' })).body).toMatchObject({ role: 'curator', author: desk.curator.name });
    expect((await desk.client('post', `/api/v1/submissions/${id}/messages`).send({ body: 'A restart.' })).body).toMatchObject({ role: 'contributor', organisation: desk.organisation.name });
    const { rows } = await app().deps.pool.query(`select recipient from mail_outbox where topic_id = $1 and subject like 'A message%' order by queued_at, recipient`, [id]);
    expect(rows.map((r: { recipient: string }) => r.recipient).sort()).toEqual([desk.contributor.email, desk.curator.email].sort());
    const { client } = await formerMember('2025-12-01T00:00:00Z');
    expect((await client('post', `/api/v1/submissions/${id}/messages`).send({ body: 'x' })).status).toBe(403);
  });
});
