import { beforeAll, describe, expect, it } from 'vitest';
import { runSql } from '#api/lib/run-sql.ts';
import { withdrawalList, type Withdrawal } from '#shared/contracts/withdrawals.ts';
import { makeCurator } from '#tests/support/people.ts';
import { makeDataset, makeDesk, type Desk } from '#tests/support/record.ts';
import { accepted, inReview, stateOf } from '#tests/support/life.ts';
import { asStranger, signInAs, type Client } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
const reason = 'The wrong qubit was recorded.';
let desk: Desk;
let second: Client;
let reader: Client;
beforeAll(async () => {
  desk = await makeDesk(app());
  second = await signInAs(app(), await makeCurator(app().deps.orm.em.fork()));
  reader = asStranger(app());
});

const ask = (client: Client, accession: string, body: object = { reason, noInterest: true }) => client('post', `/api/v1/entries/${accession}/v/1/withdrawal`).send(body);
const answer = (client: Client, id: string, body: object = { answer: 'confirm', noInterest: true }) => client('post', `/api/v1/withdrawals/${id}/answer`).send(body);
const asked = async (accession: string): Promise<Withdrawal> => (await ask(desk.curatorClient, accession).expect(201)).body as Withdrawal;
const letters = () => runSql<{ recipient: string; subject: string; body: string }>(app().deps.orm.em.fork(), `select recipient, subject, body from mail_outbox where subject ilike '%withdraw%'`);

describe('a withdrawal', () => {
  it('takes two curators: the one who asks may not confirm, another may, and then the page stays and the data answers 410', async () => {
    const { id, accession } = await accepted(app(), desk, makeDataset(desk, null));
    const { id: withdrawal, may } = await asked(accession);
    expect(may).toEqual({ confirm: false, drop: true });
    expect((await answer(desk.curatorClient, withdrawal)).body).toMatchObject({ status: 403, detail: expect.stringContaining('two curators') as string });
    expect((await reader('get', `/api/v1/entries/${accession}/v/1/dataset`)).status).toBe(200);
    expect((await answer(second, withdrawal)).body).toMatchObject({ answer: 'confirmed' });
    expect(await stateOf(app(), id)).toBe('withdrawn');
    expect((await reader('get', `/api/v1/entries/${accession}`)).body).toMatchObject({ state: 'withdrawn', withdrawal: { reason, at: app().clock.now().toISOString() } });
    expect((await reader('get', `/api/v1/entries/${accession}/v/1/dataset`)).status).toBe(410);
    for (const kind of ['result', 'proof', 'proof?event=withdrawn']) expect((await reader('get', `/api/v1/entries/${accession}/v/1/${kind}`)).status, kind).toBe(200);
    expect(JSON.stringify((await reader('get', '/api/v1/boards/quarter-turn-1q/1')).body)).not.toContain(`"${accession}"`);
    const sent = await letters();
    expect(sent.some((l) => l.recipient === desk.contributor.email && l.body.includes(reason))).toBe(true);
  });

  it('is dropped by either of them with a note, and the version stays', async () => {
    const { id, accession } = await accepted(app(), desk, makeDataset(desk, null));
    const { id: withdrawal } = await asked(accession);
    expect((await answer(second, withdrawal, { answer: 'drop' })).body).toMatchObject({ status: 400, errors: [{ pointer: '/note' }] });
    expect((await answer(second, withdrawal, { answer: 'drop', note: 'The register is right after all.' })).body).toMatchObject({ answer: 'dropped', note: 'The register is right after all.' });
    expect(await stateOf(app(), id)).toBe('frozen');
    expect((await answer(second, withdrawal)).status).toBe(409);
    expect((await ask(desk.curatorClient, accession)).status, 'it may be asked for again').toBe(201);
  });

  it('waits once: a second request is refused, and so is one without reason or declaration', async () => {
    const { accession } = await accepted(app(), desk, makeDataset(desk, null));
    expect((await ask(desk.curatorClient, accession, { reason: ' ', noInterest: true })).body).toMatchObject({ status: 400, errors: [{ pointer: '/reason' }] });
    expect((await ask(desk.curatorClient, accession, { reason })).body).toMatchObject({ status: 400, errors: [{ pointer: '/noInterest' }] });
    await asked(accession);
    expect((await ask(second, accession)).body).toMatchObject({ status: 409, detail: expect.stringContaining('waits') as string });
  });

  it('is for what is public, and not for the organisation’s own curators or anyone else', async () => {
    await inReview(app(), desk, makeDataset(desk, null));
    expect((await ask(desk.curatorClient, 'EVB-999999')).status).toBe(404);
    const { accession } = await accepted(app(), desk, makeDataset(desk, null));
    expect((await ask(desk.client, accession)).status).toBe(403);
    expect((await ask(reader, accession)).status).toBe(401);
    const tied = await makeCurator(app().deps.orm.em.fork());
    await runSql(app().deps.orm.em.fork(), `insert into membership (id, user_id, organisation_id, role, since, until) select gen_random_uuid(), $1, $2, 'contributor', $3::timestamptz - interval '2 years', $3::timestamptz - interval '6 months'`, [tied.id, desk.organisation.id, app().clock.now()]);
    const tiedClient = await signInAs(app(), tied);
    expect((await ask(tiedClient, accession)).status).toBe(403);
    const { id } = await asked(accession);
    expect((await answer(tiedClient, id)).status).toBe(403);
    const seen = withdrawalList.parse((await tiedClient('get', '/api/v1/withdrawals')).body);
    expect(seen.items).toEqual([]);
  });

  it('is listed with what waits first', async () => {
    const { items } = withdrawalList.parse((await second('get', '/api/v1/withdrawals')).body);
    const waiting = items.map((w) => w.answer === null);
    expect(waiting).toEqual([...waiting].sort((a, b) => Number(b) - Number(a)));
    expect(items.filter((w) => w.answer === null).every((w) => w.may.confirm && w.may.drop)).toBe(true);
  });

  it('cannot be made by hand: the database refuses one curator, and a state without two', async () => {
    const { accession } = await accepted(app(), desk, makeDataset(desk, null));
    const { id } = await asked(accession);
    const em = app().deps.orm.em.fork();
    await expect(runSql(em, `insert into withdrawal_answer (withdrawal_id, answer, note, answered_by_id, answered_at) select $1, 'confirmed', '', asked_by_id, now() from withdrawal where id = $1`, [id])).rejects.toMatchObject({ code: 'EB002' });
    await expect(runSql(em, `insert into entry_state (accession, version, state, at) values ($1, 1, 'withdrawn', now())`, [accession])).rejects.toMatchObject({ code: 'EB003' });
  });
});
